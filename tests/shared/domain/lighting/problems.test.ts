import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { cautionsOf } from '#shared/domain/lighting/cautions.ts'
import { problemsOf } from '#shared/domain/lighting/problems.ts'
import { readSetup } from '#shared/domain/lighting/readings.ts'
import type { Light } from '#shared/domain/lighting/schema.ts'
import { anySetup } from '#tests/support/any-setup.ts'
import { lampUnit } from '#tests/support/lamp-sample.ts'
import { gel, light, modifier, unit, whole } from '#tests/support/lighting-sample.ts'

const FACE: [number, number, number] = [0, 1.5, 0]
const main = light(1, { purpose: 'main', at: [0, 1.5, 2], aim: FACE, power: 1 })
const rim = (more: object = {}) => light(2, { purpose: 'rim', at: [1, 2, -1], aim: FACE, ...more })
/** Past the schema, as an older or foreign document may hold it. */
const setupWith = (odd: Light) => ({ ...whole({ lights: [main] }), lights: [main, odd] })
const stated = (value: number) => ({ value, from: 'assumed' as const, source: 'sample' })

function everyNumber(value: unknown): number[] {
  if (typeof value === 'number') return [value]
  return value !== null && typeof value === 'object' ? Object.values(value).flatMap(everyNumber) : []
}

const ODD: [string, Light, string, RegExp, number | null][] = [
  [
    'no guide number',
    rim({ unit: unit(undefined, { guideNumberM: stated(0) }) }),
    'guide-number',
    /^The rim’s unit, small flash, has no guide number: put in/,
    0,
  ],
  [
    'a negative guide number',
    rim({ unit: unit(undefined, { guideNumberM: stated(-40) }) }),
    'guide-number',
    /no guide number/,
    0,
  ],
  [
    'a guide number that is none',
    { ...rim(), unit: { ...main.unit, numbers: { ...main.unit.numbers, guideNumberM: stated(NaN) } } },
    'guide-number',
    /no guide number/,
    0,
  ],
  ['a lamp without lux', rim({ unit: lampUnit(0) }), 'lux', /has no lux at a metre/, 0],
  ['negative power', { ...rim(), power: -0.5 }, 'power', /^The rim is set to −0\.5\. Power is above 0/, 0],
  ['no power', { ...rim(), power: NaN }, 'power', /has no power/, 0],
  [
    'more than full power',
    { ...rim(), power: 2 },
    'power',
    /^The rim is set to 2\. Nothing gives more than full power/,
    null,
  ],
  [
    'a gel that lets nothing through',
    rim({ gels: [gel(960, 'Tin foil', 0, 0)] }),
    'gel-transmission',
    /^The gel tin foil lets no light through/,
    0,
  ],
  [
    'gels that leave no colour temperature',
    rim({ gels: [gel(961, 'Double blue −260', -260, 0.1)] }),
    'gel-colour',
    /leave no colour temperature/,
    null,
  ],
  [
    'a light on the eyes',
    rim({ at: FACE, aim: [0, 1.4, 0] }),
    'distance',
    /^The rim stands on the sitter’s eyes/,
    null,
  ],
  ['a light that looks at itself', rim({ aim: [1, 2, -1] }), 'aim', /^The rim looks at the point it stands on/, null],
  ['a light behind the wall', rim({ at: [1, 2, -3] }), 'behind-wall', /^The rim stands behind the wall/, 0],
  [
    'a unit of no colour',
    rim({ unit: unit(undefined, { flashColourK: stated(0) }) }),
    'colour',
    /^The rim’s unit, small flash, has no colour temperature: .* 5500 K is taken/,
    null,
  ],
  [
    'a guide number of another world',
    rim({ unit: unit(undefined, { guideNumberM: stated(1e300) }) }),
    'guide-number',
    /no guide number/,
    0,
  ],
  [
    'a gain of another world',
    rim({ modifier: modifier(962, 'Old box', { lossStops: stated(-1e6) }) }),
    'modifier-loss',
    /^The loss of the old box is no number of stops/,
    null,
  ],
  [
    'a loss that is no number',
    {
      ...rim(),
      modifier: {
        ...modifier(962, 'Old box'),
        numbers: { ...modifier(962, 'Old box').numbers, lossStops: stated(NaN) },
      },
    } as Light,
    'modifier-loss',
    /^The loss of the old box is no number of stops/,
    null,
  ],
]

describe('problemsOf', () => {
  it('has nothing to say of a plain setup', () => {
    expect(problemsOf(whole({ lights: [main, rim()] }))).toEqual([])
  })
  it.each(ODD)('names %s in a sentence, and the rest is read as ever', (_, odd, key, words, reads) => {
    const setup = setupWith(odd)
    const problems = problemsOf(setup)
    expect(problems.map((problem) => [problem.lightId, problem.key])).toEqual([[odd.id, key]])
    expect(problems[0]?.words).toMatch(words)
    expect(problems[0]?.words).toMatch(/\.$/)
    const reading = readSetup(setup)
    expect(reading.problems).toEqual(problems)
    expect(reading.mainFNumber).toBeCloseTo(20, 1)
    if (reads !== null) expect(reading.lights[1]?.fNumber).toBe(reads)
    expect(everyNumber({ ...reading, supplies: [] }).filter(Number.isNaN)).toEqual([])
    expect(
      cautionsOf(setup, { frames: 40 })
        .map((caution) => caution.words)
        .join(' '),
    ).not.toMatch(/NaN|Infinity|undefined/)
  })
  it('lets a light behind the wall shine past its edge', () => {
    const past = { ...whole({ lights: [main, rim({ at: [3, 2, -3] })], background: { widthM: 1 } }) }
    expect(problemsOf(past)).toEqual([])
    expect(readSetup(past).lights[1]?.fNumber).toBeGreaterThan(0)
  })
  it('leaves no reading that is not a number, whatever the setup', () => {
    fc.assert(
      fc.property(anySetup, (setup) => {
        expect(everyNumber(readSetup(setup, { frames: 40 })).filter(Number.isNaN)).toEqual([])
        expect(
          cautionsOf(setup, { frames: 40 })
            .flatMap(({ words, how }) => [words, how])
            .join(' '),
        ).not.toMatch(/NaN|Infinity/)
      }),
      { numRuns: 300 },
    )
  })
})
