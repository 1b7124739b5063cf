import { describe, expect, it } from 'vitest'
import { ampsOf, circuitWatts, leastBreakerA, mainsLoadOf } from '#shared/domain/lighting/mains.ts'
import { lampUnit } from '#tests/support/lamp-sample.ts'
import { light, unit, whole } from '#tests/support/lighting-sample.ts'

describe('circuitWatts', () => {
  it.each([
    // NEC 210.20(A): three hours or more count at 125 %, so 80 % of the rating is planned on.
    [120, 20, 2400, 1920],
    [120, 15, 1800, 1440],
    // P = V·I; the local rule for long loads applies.
    [230, 16, 3680, 2944],
  ])('%d V and %d A are %d W, %d W for long', (volts, amps, watts, longWatts) => {
    expect(circuitWatts({ volts, amps }).watts).toBeCloseTo(watts, 6)
    expect(circuitWatts({ volts, amps }).longWatts).toBeCloseTo(longWatts, 6)
  })
})

describe('ampsOf', () => {
  it('is watts over volts', () => {
    // I = P/V.
    expect(ampsOf(1000, 120)).toBeCloseTo(8.333, 3)
    expect(ampsOf(2300, 230)).toBeCloseTo(10, 9)
  })
})

describe('leastBreakerA', () => {
  it('is 20 A for 16 A that run for long', () => {
    // NEC 210.20(A).
    expect(leastBreakerA(16, 0)).toBeCloseTo(20, 9)
    expect(leastBreakerA(0, 10)).toBe(10)
  })
})

describe('mainsLoadOf', () => {
  const at: [number, number, number] = [-1.2, 1.8, 1]
  const aim: [number, number, number] = [0, 1.5, 0]
  const watts = (value: number) => ({ watts: { value, from: 'assumed', source: 'sample' } })
  const lamp = light(1, { purpose: 'main', at, aim, unit: lampUnit(3000, watts(650)), power: 0.1, isOn: false })
  const mainsHead = unit(undefined, { mainsWatts: { value: 1000, from: 'assumed', source: 'sample' } })
  const head = light(2, { purpose: 'fill', at, aim, unit: mainsHead })

  it('sums lamps and heads on the mains, dimmed and off ones at full', () => {
    const setup = whole({ lights: [lamp, head, light(3, { purpose: 'rim', at, aim })] })
    expect(mainsLoadOf(setup)).toMatchObject({ watts: 1650, circuit: null, lights: [{ watts: 650 }, { watts: 1000 }] })
    setup.setup.circuit = { volts: 120, amps: 20 }
    expect(mainsLoadOf(setup)?.circuit).toMatchObject({ watts: 2400, longWatts: 1920, drawnA: 13.75 })
  })
  it('is nothing on batteries', () => {
    const onBattery = light(1, { purpose: 'main', at, aim, unit: lampUnit(3000, { onMains: false }) })
    expect(mainsLoadOf(whole({ lights: [onBattery] }))).toBeNull()
  })
})
