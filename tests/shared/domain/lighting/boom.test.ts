import { describe, expect, it } from 'vitest'
import { bagWords, boomBalanceOf, loadKgOf } from '#shared/domain/lighting/boom.ts'
import { BOOM, OCTA, STAND, light } from '#tests/support/lighting-sample.ts'

const stated = (value: number) => ({ value, from: 'assumed' as const, source: 'sample' })
const hung = (numbers: object = {}) =>
  light(1, {
    purpose: 'main',
    at: [0, 2.3, 1],
    aim: [0, 1.5, 0],
    modifier: OCTA,
    support: { ...BOOM, numbers: { ...BOOM.numbers, ...numbers } },
  })

describe('loadKgOf', () => {
  it('is head and modifier', () => {
    expect(loadKgOf(hung())).toBeCloseTo(1.5, 9)
  })
})

describe('boomBalanceOf', () => {
  it('takes reach, counterweight and arm for granted where they are not known, and says which', () => {
    // Lever: (1.5·1.5 + 1·(1.5 − 0.5)/2)/0.5.
    const balance = boomBalanceOf(hung())
    expect(balance?.counterweightKg).toBeCloseTo(5.5, 9)
    expect(balance?.assumed).toEqual(['reachM', 'counterReachM', 'armMassKg'])
    expect(balance?.bags).toBe('a 10 kg bag')
  })
  it('takes the boom’s own', () => {
    // Published example in pounds and feet: 5 at 4 needs 10 at 2; here 1.5 kg at 2 m needs 3 kg at 1 m.
    const balance = boomBalanceOf(hung({ reachM: stated(2), counterReachM: stated(1), armMassKg: stated(0) }))
    expect(balance?.counterweightKg).toBeCloseTo(3, 9)
    expect(balance?.assumed).toEqual([])
    expect(balance?.bags).toBe('a 5 kg bag')
  })
  it('needs nothing where the short side is the heavier one, and takes no arm of zero length', () => {
    const heavyTail = hung({ reachM: stated(0.3), counterReachM: stated(1.5), armMassKg: stated(4) })
    expect(boomBalanceOf(heavyTail)).toMatchObject({ counterweightKg: 0, bags: 'no bag' })
    expect(boomBalanceOf(hung({ counterReachM: stated(0) }))?.assumed).toContain('counterReachM')
  })
  it('is for booms only', () => {
    expect(boomBalanceOf(light(1, { purpose: 'main', at: [0, 2, 1], aim: [0, 1, 0], support: STAND }))).toBeNull()
    expect(boomBalanceOf(light(1, { purpose: 'main', at: [0, 2, 1], aim: [0, 1, 0], support: null }))).toBeNull()
  })
})

describe('bagWords', () => {
  it.each([
    [0, 'no bag'],
    [0.1, 'a 5 kg bag'],
    [5, 'a 5 kg bag'],
    [5.1, 'a 10 kg bag'],
    [13, 'a 10 kg and a 5 kg bag'],
    [20, 'two 10 kg bags'],
    [22, 'two 10 kg and a 5 kg bag'],
  ])('%d kg are %s', (kg, words) => {
    expect(bagWords(kg)).toBe(words)
  })
})
