import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { type Light, isLamp } from './schema.ts'

/** Share of a circuit to plan on when it is loaded for three hours or more: NEC 210.20(A). A caution, never a permit. */
export const LONG_LOAD_SHARE = 0.8

/** What a circuit carries at its rating, W = V·A, and what to plan on for three hours or more (80 %, NEC 210.20(A)). */
export function circuitWatts({ volts, amps }: { volts: number; amps: number }): { watts: number; longWatts: number } {
  return { watts: volts * amps, longWatts: volts * amps * LONG_LOAD_SHARE }
}

/** Current that a load draws, A: W/V. */
export function ampsOf(watts: number, volts: number): number {
  return watts / volts
}

/** Least rating of a breaker, A: 125 % of what runs for three hours or more, and the rest (NEC 210.20(A)). */
export function leastBreakerA(longA: number, shortA: number): number {
  return longA / LONG_LOAD_SHARE + shortA
}

export type MainsLoad = {
  /** All lights on the mains at full power, on or off, W. */
  watts: number
  lights: { lightId: string; watts: number }[]
  /** Null: the circuit is not known. */
  circuit: { volts: number; amps: number; watts: number; longWatts: number; drawnA: number } | null
}

function mainsWattsOf(light: Light): number {
  const { numbers } = light.unit
  if (isLamp(numbers)) return numbers.onMains ? numbers.watts.value : 0
  return numbers.mainsWatts?.value ?? 0
}

/**
 * What the lights of a setup draw from the mains, all of them at full power, against the circuit they share; null when
 * none is on the mains. Nameplate watts: flash heads draw more for moments. A licensed electrician decides.
 */
export function mainsLoadOf(whole: WholeSetup): MainsLoad | null {
  const lights = whole.lights
    .map((light) => ({ lightId: light.id, watts: mainsWattsOf(light) }))
    .filter(({ watts }) => Number.isFinite(watts) && watts > 0)
  if (lights.length === 0) return null
  const watts = lights.reduce((sum, light) => sum + light.watts, 0)
  const { circuit } = whole.setup
  return {
    watts,
    lights,
    circuit: circuit && { ...circuit, ...circuitWatts(circuit), drawnA: ampsOf(watts, circuit.volts) },
  }
}
