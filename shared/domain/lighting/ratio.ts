/**
 * Lighting ratio. The convention here is (main + fill) : fill with R = 2^s + 1, s being the stops that the main alone
 * reads over the fill alone (US Army subcourse SS0510 p. 1-17 ff.); main : fill, 2^s, is shown beside it.
 */

/** (main + fill) : fill for `stops` of main over fill. Fill equal to main is 2. */
export function ratioOfStops(stops: number): number {
  return 2 ** stops + 1
}

/** Stops of main over fill for a ratio (main + fill) : fill above 1. */
export function stopsOfRatio(ratio: number): number {
  return Math.log2(ratio - 1)
}

/** main : fill for `stops` of main over fill. */
export function mainToFill(stops: number): number {
  return 2 ** stops
}

/** "5 : 1", with one decimal below ten where it is not whole: "4.9 : 1". */
export function ratioLabel(ratio: number): string {
  const rounded = ratio < 10 ? Math.round(ratio * 10) / 10 : Math.round(ratio)
  return `${rounded} : 1`
}
