import { describe, expect, it } from 'vitest'
import { readSetup } from '#shared/domain/lighting/readings.ts'
import { suggestPower } from '#shared/domain/lighting/suggest-power.ts'
import { changedPowers, draftOf, firstWish, wishOptions, wishesOf } from '#src/features/lighting/power-wishes.ts'
import { OCTA, id, light, whole } from '#tests/support/lighting-sample.ts'

const face: [number, number, number] = [0, 1.5, 0]
const main = light(1, { purpose: 'main', at: [-1.2, 1.9, 1.2], aim: face, modifier: OCTA })
const fill = light(2, { purpose: 'fill', at: [1.2, 1.9, 1.2], aim: face, modifier: OCTA, power: 1 / 16 })
const second = light(3, { purpose: 'main', at: [0, 2, 2], aim: face })
const away = light(4, { purpose: 'rim', at: [0.5, 2, -1], aim: [0.5, 2, -1.9] })
const off = light(5, { purpose: 'rim', at: [0.5, 2, -1], aim: face, isOn: false })
const setup = whole({ lights: [main, fill, second, away, off], camera: { fNumber: 5.6 } })
const reading = readSetup(setup)

describe('firstWish', () => {
  it('asks the camera’s f-number of the first main and nothing of others and of what is off', () => {
    // f/5.6 is the 15th third from f/1: 2^(15/6) = 5.657.
    expect([main, second, off].map((one) => firstWish(one, setup, reading))).toEqual([15, 'keep', 'keep'])
  })
  it('asks of the others what they are now, or what is usual where they read nothing', () => {
    const alone = whole({ lights: [main, fill, away] })
    // Same place, same octa, a quarter of the power: two stops.
    expect(firstWish(fill, alone, readSetup(alone))).toBe(-6)
    expect(firstWish(away, alone, readSetup(alone))).toBe(-1)
  })
})

describe('wishOptions', () => {
  it('offers nominal f-numbers for mains and thirds against the main for others, and to leave it', () => {
    const mains = wishOptions('main').map(({ label }) => label)
    expect([mains[0], mains[1], mains.at(-1)]).toEqual(['as it is', 'f/1', 'f/45'])
    const others = wishOptions('fill').map(({ label }) => label)
    expect([others[1], others.at(-1)]).toEqual(['+3', '−7'])
    expect(others).toContain('level with the main')
    expect(wishOptions('rim').map(({ value }) => draftOf(value))).toContain(-1)
  })
})

describe('wishesOf and changedPowers', () => {
  it('change only what is asked and what comes out otherwise', () => {
    const drafts = new Map<string, number | 'keep'>([
      [main.id, 15],
      [fill.id, -6],
    ])
    const wishes = wishesOf(setup.lights, (one) => drafts.get(one.id) ?? 'keep')
    expect(wishes).toEqual([
      { lightId: id(1), fNumber: expect.closeTo(5.657, 3) },
      { lightId: id(2), againstMainStops: -2 },
    ])
    const changed = changedPowers(setup.lights, suggestPower(setup, wishes))
    expect(changed.map((one) => one.id)).not.toContain(second.id)
    expect(changed.every(({ power }) => power > 0 && power <= 1)).toBe(true)
    expect(changedPowers(setup.lights, suggestPower(setup, []))).toEqual([])
  })
})
