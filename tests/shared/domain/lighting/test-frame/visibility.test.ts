import { describe, expect, it } from 'vitest'
import { emptySpot } from '#shared/domain/lighting/test-frame/spot.ts'
import { FINE, stageOf } from '#shared/domain/lighting/test-frame/stage.ts'
import { facePoint, onFace, visibleShare } from '#shared/domain/lighting/test-frame/visibility.ts'
import { emitter, scene } from '#tests/support/frame-sample.ts'

const SPOT = { ...emptySpot(), x: 0, y: 1.5, z: -2, gz: 1 }

function share(sheetX: number): number {
  const sheet = { at: [sheetX, 1.5, -1] as const, turn: 0, widthM: 2, heightM: 4, colour: [0, 0, 0] as const }
  const stage = stageOf(
    scene({
      emitters: [emitter({ shape: 'rectangle', widthM: 1, heightM: 1 })],
      sheets: [{ ...sheet, at: [sheetX, 1.5, -1] }],
    }),
    FINE,
  )
  const [only] = stage.emitters
  return only ? visibleShare(stage, only, SPOT, 400, 0, 1) : NaN
}

describe('visibleShare', () => {
  it('is the part of a face that a straight edge leaves free', () => {
    // The edge at x = e, half way to the light, hides what lies beyond 2e on the face.
    expect(share(1)).toBeCloseTo(0.5, 1)
    expect(share(1.125)).toBeCloseTo(0.75, 1)
    expect(share(1.3)).toBe(1)
    expect(share(0)).toBe(0)
  })

  it('is nothing behind the light and behind the surface', () => {
    const away = stageOf(scene({ emitters: [emitter({ aim: [0, 1.5, 5] })] }), FINE)
    const [turned] = away.emitters
    expect(turned && visibleShare(away, turned, SPOT, 4, 0, 1)).toBe(0)
    const stage = stageOf(scene(), FINE)
    const [only] = stage.emitters
    expect(only && visibleShare(stage, only, { ...SPOT, gz: -1 }, 4, 0, 1)).toBe(0)
  })
})

describe('facePoint', () => {
  it('fills disc and rectangle evenly', () => {
    let inner = 0
    let left = 0
    for (let i = 0; i < 1000; i++) {
      facePoint(i, true)
      if (Math.hypot(onFace.u, onFace.v) < Math.SQRT1_2) inner++
      facePoint(i, false)
      if (onFace.u < 0) left++
    }
    expect(Math.abs(inner - 500)).toBeLessThan(10)
    expect(Math.abs(left - 500)).toBeLessThan(10)
  })
})
