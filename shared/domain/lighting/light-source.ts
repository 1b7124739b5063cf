import type { LampNumbers, UnitNumbers } from '#shared/domain/kit/schema.ts'
import { isLamp } from './schema.ts'

/** Colour temperature of a head or lamp without gels, kelvin. */
export function ownColourK(numbers: UnitNumbers | LampNumbers): number {
  return (isLamp(numbers) ? numbers.colourK : numbers.flashColourK).value
}

/** Zoom settings of a head with their guide numbers; a lamp has none. */
export function zoomTableOf(numbers: UnitNumbers | LampNumbers): UnitNumbers['zoom'] {
  return isLamp(numbers) ? [] : numbers.zoom
}
