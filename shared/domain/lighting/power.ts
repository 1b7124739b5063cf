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
