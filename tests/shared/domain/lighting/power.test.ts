import { describe, expect, it } from 'vitest'
import { counterweightKg, fullPopsFor, recycleS, suppliesOf } from '#shared/domain/lighting/power.ts'
import { lampUnit } from '#tests/support/lamp-sample.ts'
import { id, light, unit } from '#tests/support/lighting-sample.ts'

describe('counterweightKg', () => {
  it.each([
    // Law of the lever: 2.5 kg at 1.5 m, weight at 0.5 m, arm of 0 and 1 kg.
    [2.5, 1.5, 0.5, 0, 7.5],
    [2.5, 1.5, 0.5, 1, 8.5],
    // Published example: 5 lb at 4 ft needs 10 lb at 2 ft.
    [5, 4, 2, 0, 10],
    [1.8, 1.2, 0.6, 0, 3.6],
  ])('%d at %d m against %d m with an arm of %d is %d', (load, a, b, arm, weight) => {
    expect(counterweightKg(load, a, b, arm)).toBeCloseTo(weight, 9)
  })
})

describe('fullPopsFor', () => {
  it('is frames times power', () => {
    expect(fullPopsFor(40, 0.25)).toBe(10)
  })
})

describe('recycleS', () => {
  it('is the share of the full recycle', () => {
    expect(recycleS(3.6, 0.25)).toBeCloseTo(0.9, 9)
  })
})

describe('suppliesOf', () => {
  const head = (n: number, more: object = {}) => light(n, { purpose: 'main', at: [0, 2, 1], aim: [0, 1, 0], ...more })
  it('counts pops and charges of each flash that is on', () => {
    const supplies = suppliesOf([head(1, { power: 1 }), head(2), head(3, { isOn: false })], 300)
    expect(supplies.map(({ lightId, pops, charges, recycleS: seconds }) => [lightId, pops, charges, seconds])).toEqual([
      [id(1), 300, 2, 3.5],
      [id(2), 75, 0.5, 0.875],
    ])
  })
  it('knows no charge of a head on the mains', () => {
    const mainsWatts = { value: 1000, from: 'assumed', source: 'sample' }
    const [supply] = suppliesOf([head(1, { power: 1, unit: unit(undefined, { mainsWatts }) })], 300)
    expect(supply).toMatchObject({ pops: 300, popsPerCharge: null, charges: null })
  })
  it('says only how fast without a shot, and leaves lamps out', () => {
    expect(suppliesOf([head(1)], null)[0]).toMatchObject({ pops: null, charges: null, recycleS: 0.875 })
    expect(suppliesOf([head(1, { unit: lampUnit(4000) })], 300)).toEqual([])
  })
})
