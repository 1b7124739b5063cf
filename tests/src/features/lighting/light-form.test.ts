import { describe, expect, it } from 'vitest'
import type { Point } from '#shared/domain/lighting/schema.ts'
import {
  beamAngleDeg,
  beamForm,
  boomForm,
  frameOf,
  hull,
  lightForm,
  outline,
} from '#src/features/lighting/light-form.ts'
import { angleBetweenDeg, distanceBetween, minus } from '#shared/domain/lighting/geometry.ts'
import { BOOM, GRID, OCTA, light, modifier, unit, whole } from '#tests/support/lighting-sample.ts'

const stated = (value: number) => ({ value, from: 'published' as const })

const span = (points: readonly Point[]) => Math.max(...points.flatMap((a) => points.map((b) => distanceBetween(a, b))))

describe('frameOf', () => {
  it('is three unit vectors at right angles, straight down too', () => {
    for (const aim of [
      [0, 1.5, 0],
      [-1, 0, 1],
      [-1, 2, 1],
    ] as const) {
      const { look, side, up } = frameOf(light(1, { purpose: 'main', at: [-1, 2, 1], aim: [...aim] }))
      for (const [a, b] of [
        [look, side],
        [side, up],
        [look, up],
      ] as const)
        expect(angleBetweenDeg(a, b)).toBeCloseTo(90, 6)
      expect(Math.hypot(...up)).toBeCloseTo(1, 9)
      expect(up[1]).toBeGreaterThanOrEqual(-1e-9)
    }
  })
})

describe('lightForm', () => {
  it('has a face of its true size, across its axis', () => {
    const octa = light(1, { purpose: 'main', at: [-1, 2, 1], aim: [0, 1.5, 0], modifier: OCTA })
    const { face } = lightForm(octa, 0)
    expect(span(face)).toBeCloseTo(0.9, 9)
    for (const corner of face)
      expect(angleBetweenDeg(minus(corner, octa.at), minus(octa.aim, octa.at))).toBeCloseTo(90, 6)
  })
  it('draws what is too small to see at the least size', () => {
    expect(span(lightForm(light(1, { purpose: 'rim', at: [1, 2, -1], aim: [0, 1.5, 0] }), 0.5).face)).toBeGreaterThan(
      0.4,
    )
  })
})

describe('beamAngleDeg', () => {
  it('is the modifier’s, a bare lamp’s own, or the mean of what the zoom covers', () => {
    const aims = { purpose: 'rim', at: [1, 2, -1], aim: [0, 1.5, 0] } as const
    const at = { ...aims, at: [...aims.at] as Point, aim: [...aims.aim] as Point }
    expect(beamAngleDeg(light(1, { ...at, modifier: GRID }))).toBe(10)
    expect(beamAngleDeg(light(1, { ...at, modifier: OCTA }))).toBeNull()
    // 50 mm sees 39.598° × 26.991°: published lens table.
    expect(
      beamAngleDeg(
        light(1, { ...at, unit: unit(undefined, { zoom: [{ focalMm: 50, guideNumberM: 36 }] }), zoomMm: 50 }),
      ),
    ).toBeCloseTo((39.598 + 26.991) / 2, 2)
    const lamp = {
      ...unit(),
      numbers: {
        luxAtMetre: { value: 5000, from: 'assumed' as const },
        watts: { value: 60, from: 'assumed' as const },
        colourK: { value: 5600, from: 'assumed' as const },
        beamDeg: { value: 55, from: 'assumed' as const },
        massKg: { value: 1, from: 'assumed' as const },
      },
    }
    expect(beamAngleDeg(light(1, { ...at, unit: lamp }))).toBe(55)
  })
})

describe('beamForm', () => {
  it('opens by half its angle to each side, from the edges of its face, as far as the sitter', () => {
    const spot = light(1, { purpose: 'rim', at: [0, 1.5, -2], aim: [0, 1.5, 0], modifier: GRID })
    const form = beamForm(spot, whole({ lights: [spot] }))
    if (!form) throw new Error('it has a length')
    const half = (5 * Math.PI) / 180
    const wide = Math.max(...form.points.map(([x]) => x))
    // The face of the sample's grid is 0.9 m wide; half of 10° to each side over two metres.
    expect(wide).toBeCloseTo(0.45 + 2 * Math.sin(half), 9)
    expect(Math.max(...form.points.map(([, , z]) => z))).toBeCloseTo(-2 + 2 * Math.cos(half), 9)
  })
  it('ends on the wall, where a background light makes its glow', () => {
    const glow = light(1, {
      purpose: 'background',
      at: [1, 0.7, -1],
      aim: [0, 1.4, -2],
      modifier: modifier(914, '40° reflector', {
        shape: 'reflector',
        widthM: 0.15,
        heightM: 0.15,
        beamDeg: { value: 40, from: 'assumed' },
      }),
    })
    const form = beamForm(glow, whole({ lights: [glow] }))
    expect(form?.onWall.length).toBeGreaterThan(10)
    for (const [, y, z] of form?.points ?? []) {
      expect(z).toBeGreaterThanOrEqual(-2 - 1e-9)
      expect(y).toBeGreaterThanOrEqual(-0.1)
    }
  })
  it('is nothing for a light that looks at itself', () => {
    const lost = light(1, { purpose: 'rim', at: [0, 1, 0], aim: [0, 1, 0] })
    expect(beamForm(lost, whole({ lights: [lost] }))).toBeNull()
  })
})

describe('boomForm', () => {
  it('reaches from a stand farther out to the head, its weight beyond', () => {
    const long = { reachM: stated(2), counterReachM: stated(0.5) }
    const support = { ...BOOM, numbers: { ...BOOM.numbers, ...long } }
    const head = light(1, { purpose: 'rim', at: [0.6, 2.3, 0.8], aim: [0, 1.5, 0], support })
    const boom = boomForm(head, whole({ lights: [head] }))
    if (!boom) throw new Error('it is one')
    expect(distanceBetween(boom.top, head.at)).toBeCloseTo(2, 9)
    expect(Math.hypot(boom.foot[0], boom.foot[2])).toBeCloseTo(1 + 2, 9)
    expect(boom.foot[1]).toBe(0)
    expect(distanceBetween(boom.counter, head.at)).toBeCloseTo(2.5, 9)
  })
  it('is null for a plain stand', () => {
    const head = light(1, { purpose: 'rim', at: [0.6, 2.3, 0.8], aim: [0, 1.5, 0] })
    expect(boomForm(head, whole({}))).toBeNull()
  })
})

describe('hull', () => {
  it('is the outline: every point lies inside or on it', () => {
    const points = Array.from({ length: 60 }, (_, n): [number, number] => [
      Math.sin(n * 12.9) * n,
      Math.cos(n * 7.3) * n,
    ])
    const around = hull(points)
    expect(around.length).toBeLessThan(points.length)
    around.forEach((a, index) => {
      const b = around[(index + 1) % around.length] ?? a
      for (const [x, y] of points)
        expect((b[0] - a[0]) * (y - a[1]) - (b[1] - a[1]) * (x - a[0])).toBeGreaterThanOrEqual(-1e-6)
    })
  })
  it('is a path for one that can be drawn, and nothing for none', () => {
    expect(outline([])).toBe('')
    expect(
      outline([
        [0, 0],
        [2, 0],
        [1, 0.2],
        [0, 2],
      ]),
    ).toBe('M0.0 0.0L2.0 0.0L0.0 2.0Z')
  })
})
