import { describe, expect, it } from 'vitest'
import { addEmitter, plainExposure, roomExposure, sent } from '#shared/domain/lighting/test-frame/shade.ts'
import { emptySpot } from '#shared/domain/lighting/test-frame/spot.ts'
import { FINE, stageOf } from '#shared/domain/lighting/test-frame/stage.ts'
import { beam, emitter, scene } from '#tests/support/frame-sample.ts'

function staged(more: Parameters<typeof emitter>[0]) {
  const stage = stageOf(scene({ emitters: [emitter(more)], room: { areaM2: 100, reflectance: 0.5 } }), FINE)
  const [only] = stage.emitters
  if (!only) throw new Error('no emitter')
  return { stage, only }
}

function lit(more: Parameters<typeof emitter>[0], normal: [number, number, number], mirror = 0): number {
  const spot = {
    ...emptySpot(),
    x: 0,
    y: 1.5,
    z: -2,
    r: 1,
    g: 1,
    b: 1,
    nx: normal[0],
    ny: normal[1],
    nz: normal[2],
    mirror,
    rough: 0.5,
  }
  sent.r = sent.g = sent.b = 0
  addEmitter(staged(more).only, spot, 0, 0, 1, 1)
  return sent.g
}

describe('addEmitter', () => {
  it('gives of a ball as much as from its middle, and of a disc d²/(d² + r²)', () => {
    // Closed forms: a Lambertian sphere, a disc on its axis (IES definitions 9.1.1); 1 m off, 0.65 m wide.
    const size = { at: [0, 1.5, -1] as const, aim: [0, 1.5, -2] as const, widthM: 0.65, heightM: 0.65 }
    expect(lit({ ...size, shape: 'ball' }, [0, 0, 1])).toBeCloseTo(1000, 6)
    expect(plainExposure(staged({ ...size, shape: 'ball' }).only, 0, 1.5, -2, 0, 0, 1)).toBeCloseTo(1000, 6)
    expect(lit({ ...size, shape: 'disc' }, [0, 0, 1]) / (1000 / (1 + 0.325 ** 2))).toBeCloseTo(1, 2)
  })
  it('follows the cosine of the slant: 1000 cd at 2 m, 30° are 216.5064 lx', () => {
    // E = I·cos θ/d² (IES 9.1.2; check values, topic 06).
    const slanted: [number, number, number] = [Math.sin(Math.PI / 6), 0, Math.cos(Math.PI / 6)]
    expect(lit({}, slanted)).toBeCloseTo(216.5064, 1)
  })

  it('gives nothing from behind the surface or the light', () => {
    expect(lit({}, [0, 0, -1])).toBe(0)
    expect(lit({ aim: [0, 1.5, 2] }, [0, 0, 1])).toBe(0)
  })

  it('adds a gloss that only brightens', () => {
    expect(lit({}, [0, 0, 1], 0.04)).toBeGreaterThan(lit({}, [0, 0, 1]))
  })
})

describe('plainExposure', () => {
  it('is I/(d² + r²) on the axis', () => {
    const { only } = staged({ widthM: 1, heightM: 1, beam: beam(120) })
    expect(plainExposure(only, 0, 1.5, -2, 0, 0, 1)).toBeCloseTo(1000 / (4 + 0.25), 6)
    expect(plainExposure(only, 0, 1.5, -2, 0, 0, -1)).toBe(0)
  })
})

describe('roomExposure', () => {
  it('is flux·ρ/(surface·(1 − ρ)): the integrating sphere', () => {
    // cosⁿ of 120° is cos¹, flux π·I₀ (computations 5).
    const { stage, only } = staged({ beam: beam(120) })
    expect(roomExposure(stage, only)).toBeCloseTo((Math.PI * 1000 * 0.5) / (100 * 0.5), 0)
  })
})
