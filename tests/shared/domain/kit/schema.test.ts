import { describe, expect, it } from 'vitest'
import { kitItemSchema, kitUpdateSchema } from '#shared/api/kit.ts'
import { kitFieldsSchema, kitInputSchema, refuseFaults } from '#shared/domain/kit/schema.ts'
import { lightUnitSchema } from '#shared/domain/lighting/schema.ts'
import { STARTER_KIT } from '#shared/domain/kit/starter.ts'
import { unit } from '#tests/support/lighting-sample.ts'

const item = STARTER_KIT[0]
const none = { value: 0, from: 'assumed', source: '' }
const without = { ...item, body: { kind: 'unit', numbers: { ...item?.body.numbers, guideNumberM: none } } }

describe('refuseFaults', () => {
  it('stands at the number, in what is added and in what is changed', () => {
    for (const schema of [kitInputSchema, kitUpdateSchema, kitFieldsSchema.superRefine(refuseFaults)]) {
      const parsed = schema.safeParse({ ...without, version: 1 })
      expect(parsed.error?.issues).toMatchObject([
        { path: ['body', 'numbers', 'guideNumberM', 'value'], message: expect.stringContaining('measure it') },
      ])
    }
  })

  it('leaves older items and copies in lights readable', () => {
    const read = { ...without, id: '00000000-0000-4000-8000-000000000001', version: 1 }
    expect(kitItemSchema.safeParse(read).success).toBe(true)
    expect(lightUnitSchema.safeParse(unit(undefined, { guideNumberM: none })).success).toBe(true)
  })
})

describe('kitInputSchema', () => {
  it('speaks in sentences about shapes too', () => {
    const zoom = [{ focalMm: 5, guideNumberM: 20 }]
    const parsed = kitInputSchema.safeParse({
      ...item,
      body: { kind: 'unit', numbers: { ...item?.body.numbers, zoom, minPowerDenominator: 0 } },
    })
    expect(parsed.error?.issues.map(({ message }) => message)).toEqual([
      'A zoom setting lies between 10 and 400 mm.',
      'The smallest power is 1/1 to 1/1024.',
    ])
  })
})
