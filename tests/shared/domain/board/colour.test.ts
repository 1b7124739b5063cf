import { describe, expect, it } from 'vitest'
import { deltaE2000, deltaEWords, labOf, nearestIn, type Lab } from '#shared/domain/board/colour.ts'

/**
 * Pairs and differences of Sharma, Wu, Dalal, "The CIEDE2000 color-difference formula: implementation notes,
 * supplementary test data, and mathematical observations", Color Research and Application 30 (2005), table 1;
 * doi:10.1002/col.20070. Printed to four decimals, hence the tolerance of 1e-4.
 */
const PAIRS: readonly (readonly [number[], number[], number])[] = [
  [[50, 2.6772, -79.7751], [50, 0, -82.7485], 2.0425],
  [[50, 3.1571, -77.2803], [50, 0, -82.7485], 2.8615],
  [[50, 2.8361, -74.02], [50, 0, -82.7485], 3.4412],
  [[50, -1.3802, -84.2814], [50, 0, -82.7485], 1],
  [[50, -1.1848, -84.8006], [50, 0, -82.7485], 1],
  [[50, -0.9009, -85.5211], [50, 0, -82.7485], 1],
  [[50, 0, 0], [50, -1, 2], 2.3669],
  [[50, -1, 2], [50, 0, 0], 2.3669],
  [[50, 2.49, -0.001], [50, -2.49, 0.0009], 7.1792],
  [[50, 2.49, -0.001], [50, -2.49, 0.001], 7.1792],
  [[50, 2.49, -0.001], [50, -2.49, 0.0011], 7.2195],
  [[50, 2.49, -0.001], [50, -2.49, 0.0012], 7.2195],
  [[50, -0.001, 2.49], [50, 0.0009, -2.49], 4.8045],
  [[50, -0.001, 2.49], [50, 0.001, -2.49], 4.8045],
  [[50, -0.001, 2.49], [50, 0.0011, -2.49], 4.7461],
  [[50, 2.5, 0], [50, 0, -2.5], 4.3065],
  [[50, 2.5, 0], [73, 25, -18], 27.1492],
  [[50, 2.5, 0], [61, -5, 29], 22.8977],
  [[50, 2.5, 0], [56, -27, -3], 31.903],
  [[50, 2.5, 0], [58, 24, 15], 19.4535],
  [[50, 2.5, 0], [50, 3.1736, 0.5854], 1],
  [[50, 2.5, 0], [50, 3.2972, 0], 1],
  [[50, 2.5, 0], [50, 1.8634, 0.5757], 1],
  [[50, 2.5, 0], [50, 3.2592, 0.335], 1],
  [[60.2574, -34.0099, 36.2677], [60.4626, -34.1751, 39.4387], 1.2644],
  [[63.0109, -31.0961, -5.8663], [62.8187, -29.7946, -4.0864], 1.263],
  [[61.2901, 3.7196, -5.3901], [61.4292, 2.248, -4.962], 1.8731],
  [[35.0831, -44.1164, 3.7933], [35.0232, -40.0716, 1.5901], 1.8645],
  [[22.7233, 20.0904, -46.694], [23.0331, 14.973, -42.5619], 2.0373],
  [[36.4612, 47.858, 18.3852], [36.2715, 50.5065, 21.2231], 1.4146],
  [[90.8027, -2.0831, 1.441], [91.1528, -1.6435, 0.0447], 1.4441],
  [[90.9257, -0.5406, -0.9208], [88.6381, -0.8985, -0.7239], 1.5381],
  [[6.7747, -0.2908, -2.4247], [5.8714, -0.0985, -2.2286], 0.6377],
  [[2.0776, 0.0795, -1.135], [0.9033, -0.0636, -0.5514], 0.9082],
]

const lab = (values: readonly number[]): Lab => ({ l: values[0] ?? NaN, a: values[1] ?? NaN, b: values[2] ?? NaN })

describe('deltaE2000', () => {
  it('agrees with every published pair within 1e-4, in both directions', () => {
    expect(PAIRS.length).toBe(34)
    for (const [one, other, expected] of PAIRS) {
      expect(Math.abs(deltaE2000(lab(one), lab(other)) - expected), `${one} / ${other}`).toBeLessThanOrEqual(1e-4)
      expect(Math.abs(deltaE2000(lab(other), lab(one)) - expected), `${other} / ${one}`).toBeLessThanOrEqual(1e-4)
    }
  })
})

describe('labOf', () => {
  it('is L 100 for white and L 0 for black, both without colour', () => {
    // CIELAB's own definition: the white point is L* 100, a* = b* = 0; 0.01 for the rounding of the sRGB matrix.
    const white = labOf('#ffffff')
    const black = labOf('#000000')
    expect(white?.l).toBeCloseTo(100, 2)
    expect(white?.a).toBeCloseTo(0, 2)
    expect(white?.b).toBeCloseTo(0, 2)
    expect(black?.l).toBeCloseTo(0, 6)
  })

  it('is null for what is no colour', () => {
    expect(labOf('blue')).toBeNull()
    expect(labOf('#12345')).toBeNull()
  })
})

describe('nearestIn', () => {
  it('finds the nearest colour of a palette and is 0 for a colour that is in it', () => {
    expect(nearestIn(['#23304a', '#8e6a22'], '#8E6A22')).toEqual({ hex: '#8e6a22', deltaE: 0 })
    expect(nearestIn(['#23304a', '#8e6a22'], '#25324c')?.hex).toBe('#23304a')
  })

  it('is null without a palette or a colour', () => {
    expect(nearestIn([], '#23304a')).toBeNull()
    expect(nearestIn(['#23304a'], '')).toBeNull()
  })
})

describe('deltaEWords', () => {
  it('goes from not told apart to another colour', () => {
    expect([0.4, 1.5, 4, 8, 30].map(deltaEWords)).toEqual([
      'cannot be told apart',
      'told apart only side by side',
      'close',
      'related',
      'another colour',
    ])
  })
})
