import { describe, expect, it } from 'vitest'
import { cautionsOf, redCautions } from '#shared/domain/lighting/cautions.ts'
import { lampUnit } from '#tests/support/lamp-sample.ts'
import {
  BOOM,
  FULL_WARM,
  OCTA,
  STAND,
  gel,
  light,
  modifier,
  support,
  unit,
  whole,
} from '#tests/support/lighting-sample.ts'

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

  it('counts what cannot be worked out as red, and a gel without a colour temperature as taste', () => {
    const none = unit(undefined, { guideNumberM: { value: 0, from: 'assumed', source: '' } })
    const [first, ...others] = redCautions(whole({ lights: [main({ unit: none })], camera: right(6) }))
    expect(first).toContain('guide number')
    expect(others).toEqual([])
    const blue = gel(940, 'Double full blue', -260, 0.13)
    expect(redCautions(whole({ lights: [main({ gels: [blue] })], camera: right(2.8) }))).toEqual([])
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

  it('says of each light that it is close, of a lamp that it is switched on, and asks nobody to set what is off', () => {
    const near = (n: number, more: object) =>
      light(n, { purpose: 'fill', at: [0.3, 1.6, 0.3], aim: FACE, support: null, ...more })
    const lights = [main({ at: [-0.3, 1.6, 0.3] }), near(2, { unit: lampUnit(4000), power: 1, gels: [FULL_WARM] })]
    const found = cautionsOf(whole({ lights, camera: right(22.6) }))
    expect(
      found.filter(({ key }) => key.endsWith(':near')).map(({ words }) => /before it (\w+)/.exec(words)?.[1]),
    ).toEqual(['flashes', 'is'])
    expect(found.find(({ key }) => key.endsWith(':heat'))?.words).not.toMatch(/pace|head/)
    const low = near(3, { power: 1 / 1024, isOn: false })
    expect(titles(whole({ lights: [main(), low], camera: right(8) }))).not.toContain('The fill cannot go that low')
  })

  it('puts red first and good news last', () => {
    const tones = cautionsOf(whole({ lights: [main({ at: [-1.2, 2, 1.2], power: 1 / 256 })], camera: right(1.4) })).map(
      (caution) => caution.tone,
    )
    expect(tones).toEqual(
      [...tones].sort((a, b) => ['red', 'mind', 'fine'].indexOf(a) - ['red', 'mind', 'fine'].indexOf(b)),
    )
  })

  it('says every length in feet when asked to', () => {
    const high = main({ at: [-1.2, 2.6, 1.2], modifier: OCTA })
    const boomed = light(2, { purpose: 'fill', at: [0.2, 1.6, 0.3], aim: FACE, support: BOOM })
    const all = cautionsOf(whole({ lights: [high, boomed], camera: right(6) }), { frames: 40, unit: 'ft' })
    const text = all.map(({ words, how }) => `${words} ${how}`).join(' ')
    // 2.6 m and 2.4 m in whole inches of 0.0254 m (NIST SP 811).
    expect(text).toContain('drawn at 8′ 6″; the support goes to 7′ 10″')
    expect(text).toContain('sq ft')
    expect(text).not.toMatch(/\d (m|cm|m²)\b/)
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

describe('cautions of what the setup knows', () => {
  const stated = (value: number) => ({ value, from: 'assumed' as const, source: 'sample' })
  const words = (setup: ReturnType<typeof whole>, key: string) =>
    cautionsOf(setup, { frames: 40 }).find((caution) => caution.key.endsWith(key))

  it('balances a boom with its own arm and names the bags', () => {
    const own = { reachM: stated(2), counterReachM: stated(1), armMassKg: stated(0) }
    const support = { ...BOOM, numbers: { ...BOOM.numbers, ...own } }
    const boom = words(whole({ lights: [main({ support, modifier: OCTA })], camera: right(6) }), ':boom')
    // 1.5 kg · 2 m / 1 m.
    expect(boom?.words).toContain('1.5 kg out at 2 m wants about 3.0 kg at 1 m (a 5 kg bag, slid until it balances)')
    expect(boom?.how).toContain('the boom’s own numbers')
  })

  it('takes the camera’s own sync speed', () => {
    const at = (shutterS: number, syncS: number | null) =>
      words(whole({ lights: [main()], camera: { fNumber: 6, shutterS, syncS } }), 'sync')
    expect(at(1 / 250, null)?.words).toContain('up to 1/200 (assumed)')
    expect(at(1 / 250, 1 / 250)).toBeUndefined()
    expect(at(1 / 200, 1 / 160)?.words).toContain('up to 1/160.')
  })

  it('minds the mains and never permits', () => {
    const lamps = (watts: number, circuit: { volts: number; amps: number } | null) => {
      const setup = whole({ lights: [main({ unit: lampUnit(4000, { watts: stated(watts) }) })], camera: right(1.4) })
      setup.setup.circuit = circuit
      return words(setup, 'mains')
    }
    // NEC 210.20(A): 20 A at 120 V, 1920 W for three hours or more.
    expect(lamps(1900, { volts: 120, amps: 20 })).toMatchObject({
      tone: 'mind',
      title: 'Keep the circuit for the lights',
    })
    expect(lamps(1930, { volts: 120, amps: 20 })).toMatchObject({ tone: 'mind', title: 'Close to the circuit’s limit' })
    expect(lamps(2500, { volts: 120, amps: 20 })).toMatchObject({ tone: 'red', title: 'Too much for one circuit' })
    expect(lamps(1900, null)?.title).toBe('Ask for the circuit')
    expect(lamps(1900, { volts: 120, amps: 20 })?.how).toContain('1920 W (NEC 210.20(A)')
    expect(lamps(100, { volts: 230, amps: 16 })?.words).toContain('no permit')
  })

  it('asks for fresh batteries for each light that wants them', () => {
    const weak = unit(undefined, { fullPops: stated(2) })
    const both = [main({ unit: weak }), light(2, { purpose: 'fill', at: [1.4, 1.7, 1.4], aim: FACE, unit: weak })]
    const asked = cautionsOf(whole({ lights: both, camera: right(6) }), { frames: 40 }).filter((caution) =>
      caution.key.endsWith(':power'),
    )
    expect(asked.map((caution) => caution.lightId)).toEqual([both[1]?.id, both[0]?.id])
    expect(asked[0]?.words).toContain('Bring 5 sets or charges.')
  })

  it('asks nothing of power, heat and shutter of a light that is off', () => {
    const off = main({ isOn: false, power: 1, gels: [FULL_WARM] })
    expect(titles(whole({ lights: [off], camera: { fNumber: 8, shutterS: 1 / 500 } }), { frames: 40 })).toEqual([
      'Out of frame',
      'Eyes stay open',
    ])
  })
})
