import { type Light, isLamp } from './schema.ts'

/** Full pops that frames at a power cost: frames × power fraction. */
export function fullPopsFor(frames: number, power: number): number {
  return frames * power
}

/** Seconds until a head is ready again at a power: full recycle × fraction (assumption; cells slow down as they age). */
export function recycleS(fullRecycleS: number, power: number): number {
  return fullRecycleS * power
}

/**
 * Counterweight of a boom, kg: W = (w·a + m(a − b)/2)/b for a load w at arm a, a weight at arm b (metres) and an even
 * arm of mass m and length a + b. The law of the lever; the boom maker's limits decide.
 */
export function counterweightKg(loadKg: number, loadArmM: number, weightArmM: number, armMassKg = 0): number {
  return (loadKg * loadArmM + (armMassKg * (loadArmM - weightArmM)) / 2) / weightArmM
}

export type Supply = {
  lightId: string
  power: number
  /** Seconds until it is ready again at its power. */
  recycleS: number
  /** Full pops in one charge or set of cells; null: it runs on the mains. */
  popsPerCharge: number | null
  /** Full pops that all frames cost; null when no shot uses the setup. */
  pops: number | null
  /** Charges or sets of cells that takes, unrounded; null likewise, and on the mains. */
  charges: number | null
}

/**
 * What each flash that is on costs for so many frames (null: no shot), and how soon it is ready again. Lamps have no
 * pops and are left out. As good as the makers' figures, with fresh cells.
 */
export function suppliesOf(lights: readonly Light[], frames: number | null): Supply[] {
  return lights.flatMap((light): Supply[] => {
    const { numbers } = light.unit
    if (isLamp(numbers) || !light.isOn) return []
    const power = Math.max(0, light.power)
    const pops = frames === null ? null : fullPopsFor(frames, power)
    const popsPerCharge = numbers.mainsWatts === null ? numbers.fullPops.value : null
    const charges = pops === null || popsPerCharge === null || !(popsPerCharge > 0) ? null : pops / popsPerCharge
    return [
      { lightId: light.id, power, recycleS: recycleS(numbers.fullRecycleS.value, power), popsPerCharge, pops, charges },
    ]
  })
}
