import type { LampNumbers, UnitNumbers } from '#shared/domain/kit/schema.ts'
import { isLamp } from './schema.ts'

/** Taken where a unit's own colour is no colour temperature, kelvin (assumption). */
export const ASSUMED_COLOUR_K = 5500

function statedColourK(numbers: UnitNumbers | LampNumbers): number {
  return (isLamp(numbers) ? numbers.colourK : numbers.flashColourK).value
}

/** Whether a head's or lamp's number is a colour temperature at all: 100 K to a million (a guard, no source). */
export function hasColour(numbers: UnitNumbers | LampNumbers): boolean {
  const kelvin = statedColourK(numbers)
  return kelvin >= 100 && kelvin <= 1e6
}

/** Colour temperature of a head or lamp without gels, kelvin; 5500 where its number is none. */
export function ownColourK(numbers: UnitNumbers | LampNumbers): number {
  return hasColour(numbers) ? statedColourK(numbers) : ASSUMED_COLOUR_K
}

/** Zoom settings of a head with their guide numbers; a lamp has none. */
export function zoomTableOf(numbers: UnitNumbers | LampNumbers): UnitNumbers['zoom'] {
  return isLamp(numbers) ? [] : numbers.zoom
}
