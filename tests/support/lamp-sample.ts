import type { z } from 'zod'
import type { lightUnitSchema } from '#shared/domain/lighting/schema.ts'
import { id } from './lighting-sample.ts'

/** A bare lamp of so many lux at a metre on its axis (as many candela). */
export function lampUnit(luxAtMetre: number, more: Record<string, unknown> = {}): z.input<typeof lightUnitSchema> {
  const stated = (value: number) => ({ value, from: 'assumed' as const, source: 'sample' })
  return {
    kitId: id(903),
    version: 1,
    name: 'Lamp',
    numbers: {
      luxAtMetre: stated(luxAtMetre),
      watts: stated(150),
      colourK: stated(5600),
      minPowerDenominator: 100,
      massKg: stated(1.5),
      ...more,
    },
  }
}
