import { describe, expect, it } from 'vitest'
import { KIT_KINDS, SUPPORT_KINDS, kitInputSchema } from '#shared/domain/kit/schema.ts'
import { STARTER_KIT } from '#shared/domain/kit/starter.ts'

describe('STARTER_KIT', () => {
  it('fits the schema of the kit room, item by item', () => {
    for (const item of STARTER_KIT) expect(kitInputSchema.parse(item)).toEqual(item)
  })

  it('has something of every kind and no name twice', () => {
    expect(new Set(STARTER_KIT.map((item) => item.body.kind))).toEqual(new Set(KIT_KINDS))
    expect(new Set(STARTER_KIT.map((item) => item.name)).size).toBe(STARTER_KIT.length)
  })

  it('has every kind of support, and a boom with the numbers that its balance needs', () => {
    const supports = STARTER_KIT.flatMap(({ body }) => (body.kind === 'support' ? [body.numbers] : []))
    expect(new Set(supports.map(({ kind }) => kind))).toEqual(new Set(SUPPORT_KINDS))
    const boom = supports.find(({ kind }) => kind === 'boom')
    expect([boom?.reachM?.value, boom?.counterReachM?.value, boom?.armMassKg?.value]).toEqual([1.5, 0.5, 1])
  })

  it('says in words how every unit keeps time with the shutter and what sets it off', () => {
    for (const { body, name } of STARTER_KIT) {
      if (body.kind === 'unit') expect([body.numbers.sync, body.numbers.triggers], name).not.toContain('')
    }
  })

  it('says of every number where it comes from', () => {
    for (const item of STARTER_KIT) {
      for (const value of Object.values(item.body.numbers)) {
        if (typeof value === 'object' && value !== null && 'from' in value) expect(value.source, item.name).not.toBe('')
      }
    }
  })

  it('gives a zoom head’s own guide number at its longest zoom', () => {
    for (const item of STARTER_KIT) {
      if (item.body.kind !== 'unit' || item.body.numbers.zoom.length === 0) continue
      expect(item.body.numbers.zoom.at(-1)?.guideNumberM).toBe(item.body.numbers.guideNumberM.value)
    }
  })
})
