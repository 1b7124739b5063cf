import { describe, expect, it } from 'vitest'
import { kitListOf, missingFrom } from '#shared/domain/lighting/kit-list.ts'
import { FLASH_KIT, FULL_WARM, OCTA, STAND, light, whole } from '#tests/support/lighting-sample.ts'

const AT = { at: [-1, 2, 1] as [number, number, number], aim: [0, 1.5, 0] as [number, number, number] }
const one = whole({ n: 1, lights: [light(1, { ...AT, purpose: 'main', modifier: OCTA })], props: [{}] })
const two = whole({
  n: 2,
  lights: [
    light(2, { ...AT, purpose: 'main', gels: [FULL_WARM, FULL_WARM] }),
    light(3, { ...AT, purpose: 'rim', support: null }),
  ],
})
two.setup.name = 'Other'

describe('kitListOf', () => {
  it('counts what one setup needs at a time, over setups the most of them', () => {
    const list = kitListOf([one, two])
    const count = (name: string) => list.find((item) => item.name === name)?.count
    expect(count('Small flash')).toBe(2)
    expect(count('90 cm octa')).toBe(1)
    expect(count('Full warm +167')).toBe(2)
    expect(count('2.4 m stand')).toBe(1)
    expect(count('White panel')).toBe(1)
    expect(count('Camera with 85 mm')).toBe(1)
  })

  it('says what each thing is for, camera first and the set last', () => {
    const list = kitListOf([one, two])
    expect(list.find((item) => item.name === 'Small flash')?.setups).toEqual(['Sample', 'Other'])
    expect(list.find((item) => item.name === '90 cm octa')?.setups).toEqual(['Sample'])
    expect([list[0]?.kind, list.at(-1)?.kind]).toEqual(['camera', 'set'])
  })

  it('is empty without setups', () => {
    expect(kitListOf([])).toEqual([])
  })
})

describe('missingFrom', () => {
  it('names what the studio has too few of, and leaves out what its kit does not know', () => {
    expect(missingFrom([two], new Map([[String(FLASH_KIT), 1]]))).toEqual([
      { name: 'Small flash', needed: 2, owned: 1 },
    ])
    expect(
      missingFrom(
        [two],
        new Map([
          [String(FLASH_KIT), 2],
          [STAND.kitId, 4],
        ]),
      ),
    ).toEqual([])
    expect(missingFrom([two], new Map())).toEqual([])
  })
})
