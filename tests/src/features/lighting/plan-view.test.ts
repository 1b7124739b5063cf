import { describe, expect, it } from 'vitest'
import { beamTint, fitPlan, spreadLabels, toX, toZ } from '#src/features/lighting/plan-view.ts'
import { FULL_WARM, HALF_BLUE, light, whole } from '#tests/support/lighting-sample.ts'

const margins = { left: 150, right: 165, top: 40, bottom: 42 }

describe('fitPlan', () => {
  it('keeps everything of the setup inside the margins, both ways at one scale', () => {
    const setup = whole({ lights: [light(1, { purpose: 'main', at: [-3, 2, 1], aim: [0, 1.5, 0] })] })
    const view = fitPlan(setup, 800, 600, margins)
    expect(toX(view, -3)).toBeGreaterThanOrEqual(149.9)
    expect(toZ(view, -2)).toBeGreaterThanOrEqual(39.9)
    expect(toZ(view, 3)).toBeLessThanOrEqual(558.1)
    expect(toX(view, 1) - toX(view, 0)).toBeCloseTo(toZ(view, 1) - toZ(view, 0), 9)
  })
  it('puts the camera at the foot and camera right at the right', () => {
    const view = fitPlan(whole({}), 800, 600, margins)
    expect(toZ(view, 3)).toBeGreaterThan(toZ(view, 0))
    expect(toX(view, 1)).toBeGreaterThan(toX(view, 0))
  })
})

describe('spreadLabels', () => {
  it('moves labels on one side apart and leaves the other side alone', () => {
    const labels = spreadLabels([
      { key: 'a', x: 10, y: 100, side: 'left', lines: ['one', 'two'] },
      { key: 'b', x: 20, y: 105, side: 'left', lines: ['one'] },
      { key: 'c', x: 20, y: 105, side: 'right', lines: ['one'] },
    ])
    expect(labels.map((label) => [label.key, label.y])).toEqual([
      ['a', 100],
      ['b', 133],
      ['c', 105],
    ])
  })
})

describe('beamTint', () => {
  it('is amber behind a warm gel, blue behind a blue one, the drawing’s own otherwise', () => {
    const tint = (gels: (typeof FULL_WARM)[]) =>
      beamTint(light(1, { purpose: 'rim', at: [1, 2, -1], aim: [0, 1, 0], gels }), 5500).colour
    expect(new Set([tint([]), tint([FULL_WARM]), tint([HALF_BLUE])]).size).toBe(3)
  })
})
