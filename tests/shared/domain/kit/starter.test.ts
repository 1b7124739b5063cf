import { describe, expect, it } from 'vitest'
import { KIT_KINDS, kitInputSchema } from '#shared/domain/kit/schema.ts'
import { STARTER_KIT } from '#shared/domain/kit/starter.ts'

describe('STARTER_KIT', () => {
  it('fits the schema of the kit room, item by item', () => {
    for (const item of STARTER_KIT) expect(kitInputSchema.parse(item)).toEqual(item)
  })

  it('has something of every kind and no name twice', () => {
    expect(new Set(STARTER_KIT.map((item) => item.body.kind))).toEqual(new Set(KIT_KINDS))
    expect(new Set(STARTER_KIT.map((item) => item.name)).size).toBe(STARTER_KIT.length)
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
