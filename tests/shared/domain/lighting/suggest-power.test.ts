import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { readSetup } from '#shared/domain/lighting/readings.ts'
import { stopsBetween } from '#shared/domain/lighting/stops.ts'
import { type PowerWish, suggestPower } from '#shared/domain/lighting/suggest-power.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { drawnSetup } from '#tests/support/drawn-setup.ts'
import { lampUnit } from '#tests/support/lamp-sample.ts'
import { GRID, OCTA, id, light, unit, whole } from '#tests/support/lighting-sample.ts'

const FACE: [number, number, number] = [0, 1.5, 0]
const main = (more: object = {}) =>
  light(1, { purpose: 'main', at: [0, 1.5, 2], aim: FACE, modifier: OCTA, power: 1, ...more })
const fill = light(2, { purpose: 'fill', at: [1.4, 1.5, 2], aim: FACE })
const glow = light(3, { purpose: 'background', at: [0.8, 1, -1], aim: [0, 1.6, -2], modifier: GRID })
const SIXTH = 1 / 6 + 1e-6

function taken(setup: WholeSetup, suggestions: ReturnType<typeof suggestPower>): WholeSetup {
  const power = new Map(suggestions.map((suggestion) => [suggestion.lightId, suggestion.power]))
  return { ...setup, lights: setup.lights.map((entry) => ({ ...entry, power: power.get(entry.id) ?? entry.power })) }
}

describe('suggestPower', () => {
  it('sets main f/5.6, fill −2 and background −⅔, each where it is read', () => {
    const setup = whole({ lights: [main(), fill, glow] })
    const suggestions = suggestPower(setup, [
      { lightId: id(1), fNumber: 5.656854 },
      { lightId: id(2), againstMainStops: -2 },
      { lightId: id(3), againstMainStops: -2 / 3 },
    ])
    expect(suggestions.map((suggestion) => suggestion.lightId)).toEqual([id(1), id(2), id(3)])
    const reading = readSetup(taken(setup, suggestions))
    expect(Math.abs(stopsBetween(reading.mainFNumber ?? 0, 5.656854))).toBeLessThan(SIXTH)
    expect(Math.abs((reading.lights[1]?.underMainStops ?? 9) - 2)).toBeLessThan(SIXTH)
    expect(reading.lights[2]?.where).toBe('wall')
    expect(Math.abs((reading.lights[2]?.underMainStops ?? 9) - 2 / 3)).toBeLessThan(SIXTH)
    suggestions.forEach((suggestion, index) => {
      expect(suggestion.words).toBeNull()
      expect(suggestion.readsFNumber).toBeCloseTo(reading.lights[index]?.fNumber ?? 0, 9)
    })
  })

  it('says how much a unit is too weak, and how much nearer it had to be', () => {
    // A bare head of guide number 40 reads f/20 at 2 m; f/40 is two stops more, half the distance.
    const [only] = suggestPower(whole({ lights: [main({ modifier: null })] }), [{ lightId: id(1), fNumber: 40 }])
    expect(only).toMatchObject({ power: 1 })
    expect(only?.offStops).toBeCloseTo(-2, 2)
    expect(only?.words).toBe('At full power the main stays 2.0 stops under: move it to about 1.0 m, or raise the ISO.')
    const [inFeet] = suggestPower(
      whole({ lights: [main({ modifier: null })] }),
      [{ lightId: id(1), fNumber: 40 }],
      'ft',
    )
    // 1 m is 39.4 inches.
    expect(inFeet?.words).toContain('move it to about 3′ 3″,')
  })

  it('says how much it is too strong at its least', () => {
    const weak = main({ modifier: null, unit: unit(undefined, { minPowerDenominator: 4 }) })
    const [only] = suggestPower(whole({ lights: [weak] }), [{ lightId: id(1), fNumber: 5 }])
    expect(only?.power).toBeCloseTo(1 / 4, 9)
    expect(only?.words).toMatch(
      /^At 1\/4, its least, the main is 2\.0 stops over: move it back to about 4\.0 m, put a gel/,
    )
  })

  it('dims lamps, and says so of one that cannot be dimmed', () => {
    // 4000 lx at a metre are 1000 lx at 2 m: 6.25 lx·s in 1/160 s, f/1.58; a stop less is half the power.
    const lamp = (denominator: number) =>
      main({ modifier: null, unit: lampUnit(4000, { minPowerDenominator: denominator }) })
    const wish: PowerWish[] = [{ lightId: id(1), fNumber: Math.sqrt(6.25 / 2.5 / 2) }]
    expect(suggestPower(whole({ lights: [lamp(100)] }), wish)[0]?.power).toBeCloseTo(0.5, 9)
    const fixed = suggestPower(whole({ lights: [lamp(1)] }), wish)[0]
    expect(fixed).toMatchObject({ power: 1 })
    expect(fixed?.words).toMatch(/^It cannot be dimmed: the main is 1\.0 stops over/)
  })

  it('sends nobody to the ISO for stops against the main, which it does not change', () => {
    const words = (againstMainStops: number) =>
      suggestPower(whole({ lights: [main(), fill] }), [{ lightId: id(2), againstMainStops }])[0]?.words
    expect(words(9)).toMatch(/stops under: .*, or take the main down\.$/)
    expect(words(-15)).toMatch(/stops over: .*, or take the main up\.$/)
  })

  it('sets several lights of one purpose apart, and measures against all mains together', () => {
    const second = light(4, { purpose: 'main', at: [1, 1.5, 2], aim: FACE })
    const setup = whole({ lights: [main(), second, fill] })
    const suggestions = suggestPower(setup, [
      { lightId: id(1), fNumber: 8 },
      { lightId: id(4), fNumber: 4 },
      { lightId: id(2), againstMainStops: -1 },
    ])
    const reading = readSetup(taken(setup, suggestions))
    expect(Math.abs((reading.lights[2]?.underMainStops ?? 9) - 1)).toBeLessThan(SIXTH)
  })

  it('leaves alone what cannot be set, in a sentence each', () => {
    const dead = light(2, {
      purpose: 'fill',
      at: [1, 1.5, 2],
      aim: FACE,
      unit: unit(undefined, { guideNumberM: { value: 0, from: 'assumed' } }),
    })
    const words = (lights: (typeof dead)[], wish: PowerWish) => suggestPower(whole({ lights }), [wish])[0]?.words
    expect(words([main(), dead], { lightId: id(2), againstMainStops: -2 })).toMatch(
      /^The fill gives no light where it is read/,
    )
    expect(words([fill], { lightId: id(2), againstMainStops: -2 })).toMatch(/^There is no main to measure against/)
    expect(words([main()], { lightId: id(1), fNumber: -4 })).toMatch(/no f-number to reach/)
    expect(words([main(), fill], { lightId: id(2), againstMainStops: NaN })).toMatch(/^Put in stops against the main/)
    expect(words([main({ isOn: false })], { lightId: id(1), fNumber: 8 })).toBe('The main is off: switch it on.')
    expect(suggestPower(whole({ lights: [main()] }), [{ lightId: id(77), fNumber: 8 }])).toEqual([])
  })

  it('reaches every wish within a sixth of a stop, or says why not', () => {
    const wish = fc.oneof(
      fc.record({ fNumber: fc.double({ min: 1, max: 45, noNaN: true }) }),
      fc.record({ againstMainStops: fc.double({ min: -5, max: 2, noNaN: true }) }),
    )
    fc.assert(
      fc.property(drawnSetup(), fc.array(wish, { minLength: 5, maxLength: 5 }), (drawn, kinds) => {
        const setup = { ...drawn, lights: drawn.lights.map((entry) => ({ ...entry, isOn: true })) }
        const wishes = setup.lights.map((entry, index): PowerWish => {
          const kind = kinds[index] ?? { fNumber: 8 }
          // A main measured against the others is left out: readings know only all of them together.
          return { lightId: entry.id, ...(entry.purpose === 'main' ? { fNumber: 8 } : kind) }
        })
        const suggestions = suggestPower(setup, wishes)
        const reading = readSetup(taken(setup, suggestions))
        suggestions.forEach((suggestion, index) => {
          const own = reading.lights[index]
          expect(suggestion.power).toBeGreaterThan(0)
          expect(suggestion.power).toBeLessThanOrEqual(1)
          if (suggestion.words !== null) return
          const asked = wishes[index]
          const off =
            asked && 'fNumber' in asked
              ? stopsBetween(own?.fNumber ?? 0, asked.fNumber)
              : -(own?.underMainStops ?? 99) - (asked?.againstMainStops ?? 99)
          expect(Math.abs(off)).toBeLessThanOrEqual(SIXTH)
          expect(suggestion.offStops ?? 99).toBeCloseTo(off, 6)
        })
      }),
      { numRuns: 100 },
    )
  })
})
