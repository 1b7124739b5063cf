import { describe, expect, it } from 'vitest'
import {
  type Mark,
  beamTone,
  fitPlanSketch,
  fitSideSketch,
  planMarks,
  sideMarks,
} from '#shared/domain/lighting/sketch.ts'
import { MODIFIER_SHAPES } from '#shared/domain/kit/schema.ts'
import { FULL_WARM, HALF_BLUE, OCTA, STAND, light, modifier, whole } from '#tests/support/lighting-sample.ts'

const BOX = { width: 300, height: 200, left: 20, right: 20, top: 20, bottom: 20 }
const main = light(1, { purpose: 'main', at: [-1, 2, 1], aim: [0, 1.5, 0], modifier: OCTA })
const setup = whole({ lights: [main], props: [{ kind: 'flag', at: [1, 1, 1] }] })
const numbersOf = (mark: Mark | undefined) =>
  [...(mark?.d ?? '').matchAll(/-?\d+(\.\d+)?/g)].map(([text]) => Number(text))

describe('fitPlanSketch', () => {
  it('shows everything inside its margins', () => {
    const fit = fitPlanSketch(setup, BOX)
    for (const [x, , z] of [main.at, setup.setup.camera.at]) {
      expect(fit.originX + x * fit.perM).toBeGreaterThanOrEqual(BOX.left - 1e-9)
      expect(fit.originZ + z * fit.perM).toBeLessThanOrEqual(BOX.height - BOX.bottom + 1e-9)
    }
    expect(fit.originZ + setup.setup.background.zM * fit.perM).toBeGreaterThanOrEqual(BOX.top - 1e-9)
  })

  it('takes the wanted scale below the largest', () => {
    const free = fitPlanSketch(setup, BOX)
    const fit = fitPlanSketch(setup, BOX, (perM) => Math.floor(perM / 10) * 10)
    expect(fit.perM).toBe(Math.floor(free.perM / 10) * 10)
  })
})

describe('planMarks', () => {
  it('draws a face at its true size: 0.9 m across at 100 units a metre', () => {
    const straight = light(1, { purpose: 'main', at: [-1, 1.5, 0], aim: [0, 1.5, 0], modifier: OCTA })
    const fit = { perM: 100, originX: 200, originZ: 200, width: 400, height: 400 }
    const shell = planMarks(whole({ lights: [straight] }), fit).find((mark) => mark.key.endsWith(':shell'))
    // Looking along +x, the face is the line x = 100 from y 155 to 245.
    expect(numbersOf(shell).slice(0, 4)).toEqual([100, 155, 100, 245])
  })

  it('has a mark for every part and finite numbers in all, whatever the modifier', () => {
    for (const shape of MODIFIER_SHAPES) {
      const lit = whole({
        lights: [
          light(1, { purpose: 'rim', at: [1, 2, -1], aim: [1, 2, -1], modifier: modifier(2, shape, { shape }) }),
        ],
        props: [{ kind: 'prop', at: [0.5, 0.4, 0] }],
      })
      const marks = [...planMarks(lit, fitPlanSketch(lit, BOX)), ...sideMarks(lit, fitSideSketch(lit, BOX))]
      for (const part of [...lit.lights, ...lit.places, ...lit.props])
        expect(marks.some((mark) => mark.key.startsWith(part.id))).toBe(true)
      expect(marks.every((mark) => !/NaN|Infinity/.test(mark.d))).toBe(true)
    }
  })

  it('gives no beam to a light that is off', () => {
    const off = whole({ lights: [{ ...main, isOn: false }] })
    expect(planMarks(off, fitPlanSketch(off, BOX)).some((mark) => mark.key.endsWith(':beam'))).toBe(false)
    expect(planMarks(setup, fitPlanSketch(setup, BOX)).some((mark) => mark.key.endsWith(':beam'))).toBe(true)
  })
})

describe('sideMarks', () => {
  it('stands a light on its pole at its height', () => {
    const stood = whole({ lights: [light(1, { purpose: 'main', at: [-1, 2, 1], aim: [0, 1.5, 0], support: STAND })] })
    const fit = fitSideSketch(stood, BOX)
    const pole = sideMarks(stood, fit).find((mark) => mark.key.endsWith(':support'))
    const [x = 0, y = 0, floor = 0] = numbersOf(pole)
    expect(x).toBeCloseTo(fit.originX + 1 * fit.perM, 1)
    expect(floor - y).toBeCloseTo(2 * fit.perM, 1)
  })
})

describe('beamTone', () => {
  it('is warm or cool against the white balance', () => {
    expect(beamTone(main, 5500)).toBe('neutral beam')
    expect(beamTone({ ...main, gels: light(1, { ...main, gels: [FULL_WARM] }).gels }, 5500)).toBe('warm beam')
    expect(beamTone({ ...main, gels: light(1, { ...main, gels: [HALF_BLUE] }).gels }, 5500)).toBe('cool beam')
    // Set to what the gel makes of it, the camera sees it neutral.
    expect(beamTone(main, 3000)).toBe('cool beam')
  })
})
