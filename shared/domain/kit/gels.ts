/** One row of a maker's published gel data. Makers are named as the source of a number, never as a name on screen. */
export type GelRow = {
  name: string
  /** Shift computed with, mired; positive is warmer. */
  miredShift: number
  /** What the maker prints where it differs from the shift computed with. */
  printedMired: number | null
  transmission: number
  source: string
  transmissionSource: string
}

const NOMINAL = 'the maker prints the shift of its nominal conversion; this one is from its own spectrum on 5500 K'

function row(name: string, miredShift: number, transmission: number, maker: string): GelRow {
  const source = `${maker}, published data`
  return { name, miredShift, printedMired: null, transmission, source, transmissionSource: source }
}

function corrected(
  name: string,
  miredShift: number,
  printedMired: number,
  transmission: number,
  maker: string,
  of = 'luminous transmission in daylight',
): GelRow {
  return {
    name,
    miredShift,
    printedMired,
    transmission,
    source: `${maker}: ${NOMINAL}`,
    transmissionSource: `${maker}, published ${of}`,
  }
}

/** Warm and blue correction gels of the two common series. Names carry the shift, which tells the series apart. */
export const GEL_ROWS: readonly GelRow[] = [
  row('Full warm +167', 167, 0.47, 'Rosco Cinegel 3407'),
  row('Three-quarter warm +131', 131, 0.58, 'Rosco Cinegel 3401'),
  row('Half warm +81', 81, 0.73, 'Rosco Cinegel 3408'),
  row('Quarter warm +42', 42, 0.81, 'Rosco Cinegel 3409'),
  row('Eighth warm +20', 20, 0.92, 'Rosco Cinegel 3410'),
  row('Full blue −131', -131, 0.36, 'Rosco Cinegel 3202'),
  row('Half blue −68', -68, 0.52, 'Rosco Cinegel 3204'),
  row('Quarter blue −30', -30, 0.74, 'Rosco Cinegel 3208'),
  row('Eighth blue −12', -12, 0.81, 'Rosco Cinegel 3216'),
  row('Full warm +159', 159, 0.554, 'LEE 204'),
  corrected('Half warm +79', 79, 109, 0.71, 'LEE 205', 'absorption, 0.15'),
  corrected('Quarter warm +44', 44, 64, 0.791, 'LEE 206'),
  corrected('Eighth warm +24', 24, 26, 0.85, 'LEE 223', 'absorption, 0.07'),
  row('Full blue −137', -137, 0.34, 'LEE 201'),
  row('Half blue −78', -78, 0.549, 'LEE 202'),
  {
    name: 'Quarter blue −35',
    miredShift: -35,
    printedMired: null,
    transmission: 0.69,
    source: 'LEE 203, published conversion 3200 to 3600 K',
    transmissionSource: 'from memory; measure yours',
  },
  row('Eighth blue −18', -18, 0.813, 'LEE 218'),
]
