import { describe, expect, it } from 'vitest'
import { isLamp, lightSchema, setupSchema } from '#shared/domain/lighting/schema.ts'
import { lampUnit } from '#tests/support/lamp-sample.ts'
import { light, unit, whole } from '#tests/support/lighting-sample.ts'

const made = (more: object) => light(1, { purpose: 'main', at: [0, 2, 1], aim: [0, 1, 0], ...more })

describe('isLamp', () => {
  it('tells lamps from flash heads by what they have', () => {
    expect(isLamp(made({ unit: lampUnit(4000) }).unit.numbers)).toBe(true)
    expect(isLamp(made({ unit: unit() }).unit.numbers)).toBe(false)
  })
})

describe('lightSchema', () => {
  it('reads a light from before lamps and switches: on, nothing measured', () => {
    const { isOn: _isOn, ...older } = made({})
    expect(lightSchema.parse(older).isOn).toBe(true)
    expect(made({}).unit.numbers).toMatchObject({ metered: [], mainsWatts: null })
  })
  it('takes no power of 0 or below, or above full', () => {
    for (const power of [0, -0.5, 1.01]) expect(lightSchema.safeParse({ ...made({}), power }).success).toBe(false)
  })
})

describe('setupSchema', () => {
  it('reads a setup from before rooms, circuits and aims', () => {
    const { walled: _walled, circuit: _circuit, ambientK: _ambientK, ...older } = whole({}).setup
    const { syncS: _syncS, aim: _aim, ...camera } = older.camera
    expect(setupSchema.parse({ ...older, camera })).toEqual(whole({}).setup)
  })
})
