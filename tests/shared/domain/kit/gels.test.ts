import { describe, expect, it } from 'vitest'
import { GEL_ROWS } from '#shared/domain/kit/gels.ts'

describe('GEL_ROWS', () => {
  it.each([
    // Rosco Cinegel 3407–3410 and 3202–3216, LEE 201, 204: makers' published data.
    ['Full warm +167', 167, 0.47],
    ['Half warm +81', 81, 0.73],
    ['Quarter warm +42', 42, 0.81],
    ['Eighth warm +20', 20, 0.92],
    ['Full blue −131', -131, 0.36],
    ['Half blue −68', -68, 0.52],
    ['Quarter blue −30', -30, 0.74],
    ['Eighth blue −12', -12, 0.81],
    ['Full warm +159', 159, 0.554],
    ['Full blue −137', -137, 0.34],
  ])('%s shifts %d mired and passes %d', (name, miredShift, transmission) => {
    expect(GEL_ROWS.find((row) => row.name === name)).toMatchObject({ miredShift, transmission })
  })

  it('computes three gels with their own spectrum and keeps the printed shift beside', () => {
    // LEE 205, 206, 223 print +109, +64, +26: the arithmetic of their nominal conversions, not of 5500 K.
    const corrected = GEL_ROWS.filter((row) => row.printedMired !== null)
    expect(corrected.map((row) => [row.miredShift, row.printedMired])).toEqual([
      [79, 109],
      [44, 64],
      [24, 26],
    ])
  })
})
