import { describe, expect, it } from 'vitest'
import { cautionsOf, redCautions } from '#shared/domain/lighting/cautions.ts'
import { BOOM, FULL_WARM, OCTA, STAND, light, modifier, support, unit, whole } from '#tests/support/lighting-sample.ts'

const FACE: [number, number, number] = [0, 1.5, 0]
const main = (more: object = {}) =>
  light(1, { purpose: 'main', at: [-1.2, 1.7, 1.2], aim: FACE, power: 1 / 16, support: STAND, ...more })
const titles = (setup: ReturnType<typeof whole>, options = {}) =>
  cautionsOf(setup, options).map((caution) => caution.title)
/** Camera open so wide or so little that exposure is right for the lights given. */
const right = (fNumber: number) => ({ fNumber })

describe('cautionsOf', () => {
  it('has nothing but good news for a plain main', () => {
    const setup = whole({ lights: [main()], camera: right(40 / 4 / 1.7) })
    expect(cautionsOf(setup, { frames: 40 }).map((caution) => [caution.tone, caution.title])).toEqual([
      ['fine', 'Out of frame'],
      ['fine', 'Eyes stay open'],
      ['fine', 'Power to spare'],
    ])
  })

  it('asks for a bag on a high stand and under a large face, deferring to the maker', () => {
    expect(titles(whole({ lights: [main({ at: [-1.2, 2, 1.2] })], camera: right(6) }))).toContain('Bag the main stand')
    const large = cautionsOf(whole({ lights: [main({ modifier: OCTA })], camera: right(6) })).find(
      (caution) => caution.title === 'Bag the main stand',
    )
    expect(large?.words).toContain('Follow the stand maker’s limits and the venue’s rules.')
  })

  it('is red when a load or a height is beyond the support', () => {
    const heavy = modifier(950, 'Heavy dish', { massKg: { value: 4, from: 'assumed', source: 'sample' } })
    expect(redCautions(whole({ lights: [main({ modifier: heavy })], camera: right(6) }))).toEqual([
      'Too heavy for its 2.4 m stand',
    ])
    const low = support(951, 'Low stand', 'stand', 1.2)
    expect(redCautions(whole({ lights: [main({ support: low })], camera: right(6) }))).toEqual([
      'Higher than its low stand goes',
    ])
  })

  it('works out the counterweight of a boom from the lever', () => {
    // (1.5·1.5 + 1·(1.5 − 0.5)/2)/0.5 = 5.5 kg for head and octa of 1.5 kg on an arm of 1 kg.
    const boom = cautionsOf(whole({ lights: [main({ support: BOOM, modifier: OCTA })], camera: right(6) })).find(
      (caution) => caution.key.endsWith(':boom'),
    )
    expect(boom?.words).toContain('5.5 kg at 0.5 m')
  })

  it('is red below the least power, and when full power is not enough', () => {
    expect(redCautions(whole({ lights: [main({ power: 1 / 256 })], camera: right(1.5) }))).toEqual([
      'The main cannot go that low',
    ])
    expect(redCautions(whole({ lights: [main({ power: 0.5 })], camera: right(64) }))).toEqual(['Not enough power'])
  })

  it('says when the face comes out dark or bright', () => {
    expect(titles(whole({ lights: [main()], camera: right(11.3137) }))).toContain('The face comes out dark')
    expect(titles(whole({ lights: [main()], camera: right(2.8284) }))).toContain('The face comes out bright')
  })

  it('minds heat from half power behind a gel or a closed modifier', () => {
    expect(titles(whole({ lights: [main({ power: 0.5, gels: [FULL_WARM] })], camera: right(11.3) }))).toContain(
      'The main gets hot',
    )
    expect(titles(whole({ lights: [main({ power: 0.25, gels: [FULL_WARM] })], camera: right(8) }))).not.toContain(
      'The main gets hot',
    )
  })

  it('minds eyes in shadow, a light near the face, fast shutters and tired batteries', () => {
    expect(titles(whole({ lights: [main({ at: [-0.5, 2.4, 0.5] })], camera: right(6) }))).toContain(
      'Eyes may fall into shadow',
    )
    expect(titles(whole({ lights: [main({ at: [-0.3, 1.6, 0.3] })], camera: right(22.6) }))).toContain(
      'The main is close to the face',
    )
    expect(titles(whole({ lights: [main()], camera: { fNumber: 6, shutterS: 1 / 500 } }))).toContain(
      'Shutter may be faster than the flash',
    )
    const weak = main({ unit: unit(undefined, { fullPops: { value: 2, from: 'assumed', source: 'sample' } }) })
    expect(titles(whole({ lights: [weak], camera: right(6) }), { frames: 40 })).toContain('Bring fresh batteries')
  })

  it('puts red first and good news last', () => {
    const tones = cautionsOf(whole({ lights: [main({ at: [-1.2, 2, 1.2], power: 1 / 256 })], camera: right(1.4) })).map(
      (caution) => caution.tone,
    )
    expect(tones).toEqual(
      [...tones].sort((a, b) => ['red', 'mind', 'fine'].indexOf(a) - ['red', 'mind', 'fine'].indexOf(b)),
    )
  })

  it('says nothing of an empty setup', () => {
    expect(cautionsOf(whole({}), { frames: 40 })).toEqual([])
  })
})

describe('redCautions', () => {
  it('is one sentence each for what must be put right', () => {
    const rim = light(2, { purpose: 'rim', at: [0.5, 1.6, -1], aim: FACE, support: null })
    expect(redCautions(whole({ lights: [main(), rim], camera: right(6) }))).toEqual(['The rim is in the picture'])
  })
})
