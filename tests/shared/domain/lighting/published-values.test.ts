import { describe, expect, it } from 'vitest'
import { GEL_ROWS } from '#shared/domain/kit/gels.ts'
import { cosineExponent, cosinePower, gaussianProfile } from '#shared/domain/lighting/beam.ts'
import { combineFNumbers, fNumberAt, meteredLuminance } from '#shared/domain/lighting/exposure.ts'
import { shiftBetween, shifted } from '#shared/domain/lighting/gel.ts'
import { angleOfViewDeg, depthOfField, fieldM } from '#shared/domain/lighting/lens.ts'
import { arrivalAt, emissionOf, exposureOnWall, incidenceShare } from '#shared/domain/lighting/light-output.ts'
import type { Point } from '#shared/domain/lighting/schema.ts'
import { elevationDeg, penumbraM } from '#shared/domain/lighting/softness.ts'
import { exposureValue, fNumberOfThirds, stopsBetween, stopsOfTransmission } from '#shared/domain/lighting/stops.ts'
import { fNumberLabel } from '#shared/domain/lighting/words.ts'
import { lampUnit } from '#tests/support/lamp-sample.ts'
import { light, modifier } from '#tests/support/lighting-sample.ts'

// Published figures that ask more than one function, and longer tables. What one function alone answers is beside it.

const RAD = Math.PI / 180

describe('guide numbers', () => {
  it('reaches 12.5 m at f/4 with 50', () => {
    // metzflash.ca, guide number page.
    expect(fNumberAt(50, 12.5)).toBeCloseTo(4, 9)
  })
  it('adds two heads of 125 to 177, and f/5.6 twice to f/8', () => {
    // dpreview.com/forums/post/64109612; speedlighter.ca/2014/06/08/math/ (nominal figures).
    expect(Math.abs(combineFNumbers([125, 125]) - 177)).toBeLessThan(0.5)
    expect(Math.abs(combineFNumbers([5.6, 5.6]) - 8)).toBeLessThan(0.1)
  })
})

describe('exposure values', () => {
  it.each([
    // Nominal tables: EV definition (en.wikipedia, Exposure value); optyczne.pl.
    [1, 1, 0, 0.2],
    [11, 1 / 30, 12, 0.2],
    // Frostbite, "Moving to PBR" course notes: f/16, 1/125 s.
    [16, 1 / 125, 14.97, 0.005],
  ])('f/%d at %d s is EV %d', (fNumber, shutterS, ev, within) => {
    expect(Math.abs(exposureValue(fNumber, shutterS) - ev)).toBeLessThan(within)
  })
  it.each([
    // colour-hdri exposure module and ISO 2720, K = 12.5.
    [8, 1, 100, 8],
    [1, 1, 100, 0.125],
    // L = 2^(EV − 3), google/filament Exposure.cpp: EV 8 and EV 12.
    [16, 1, 100, 32],
    [16, 1 / 16, 100, 512],
  ])('f/%d, %d s, ISO %d is %d cd/m²', (fNumber, shutterS, iso, luminance) => {
    expect(meteredLuminance(fNumber, shutterS, iso)).toBeCloseTo(luminance, 9)
  })
})

describe('f-numbers', () => {
  it.each([
    // Nominal third stops (kameraarkasi.org and camera manuals); exact 2^(i/6).
    [0, '1', 1],
    [2, '1.2', 1.2599],
    [4, '1.6', 1.5874],
    [6, '2', 2],
    [8, '2.5', 2.5198],
    [10, '3.2', 3.1748],
    [12, '4', 4],
    [14, '5', 5.0397],
    [16, '6.3', 6.3496],
    [18, '8', 8],
    [20, '10', 10.0794],
    [22, '13', 12.6992],
    [24, '16', 16],
    [26, '20', 20.1587],
  ])('third %d is printed %s and is %d', (index, nominal, exact) => {
    expect(fNumberOfThirds(index)).toBeCloseTo(exact, 4)
    expect(fNumberLabel(fNumberOfThirds(index))).toBe(`f/${nominal}`)
  })
  it.each([
    // Nominal half stops (kameraarkasi.org); exact 2^(i/4).
    [0, 1],
    [2, 1.4142],
    [4, 2],
    [6, 2.8284],
    [8, 4],
    [10, 5.6569],
    [12, 8],
    [14, 11.3137],
    [16, 16],
    [18, 22.6274],
  ])('half stop %d is %d', (index, exact) => {
    expect(Math.abs(fNumberOfThirds(index * 1.5) - exact)).toBeLessThan(1e-4)
    expect(stopsBetween(exact, 1)).toBeCloseTo(index / 2, 3)
  })
})

describe('gels', () => {
  it.each([
    // LEE Filters, published Y of daylight and of 3200 K with the stops computed from it: 201, 202, 218, 283, 285, 206, 286.
    [34, 1.56],
    [35, 1.51],
    [54.9, 0.87],
    [53.2, 0.91],
    [81.3, 0.3],
    [80.2, 0.32],
    [24.4, 2.04],
    [21.2, 2.24],
    [61.3, 0.71],
    [67.1, 0.58],
    [79.1, 0.34],
    [82.6, 0.28],
    [48.2, 1.05],
    [54.3, 0.88],
    // 441, 443, 298, 210, 299, 245, 278, 248, 279, 208.
    [57.3, 0.8],
    [79.8, 0.33],
    [69.3, 0.53],
    [23.5, 2.09],
    [6.6, 3.92],
    [81.7, 0.29],
    [87.8, 0.19],
    [72, 0.47],
    [86.5, 0.21],
    [15.6, 2.68],
    // Rosco Cinegel 3202, 3204, 3208, 3216, 3220, 3401, 3407, 3408, 3409, 3410.
    [36, 1.47],
    [52, 0.94],
    [74, 0.43],
    [81, 0.3],
    [10, 3.32],
    [58, 0.79],
    [47, 1.09],
    [73, 0.45],
    [81, 0.3],
    [92, 0.12],
    // 3304, 3316, 3308, 3313, 3318, 3403.
    [76, 0.4],
    [92, 0.12],
    [55, 0.86],
    [71, 0.49],
    [89, 0.17],
    [25, 2],
    // LEE 205, 223, 202, 218 as optical density 0.15, 0.07, 0.26, 0.09.
    [100 * 10 ** -0.15, 0.5],
    [100 * 10 ** -0.07, 0.23],
    [100 * 10 ** -0.26, 0.86],
    [100 * 10 ** -0.09, 0.3],
  ])('%d %% through costs %d stops', (percent, stops) => {
    expect(Math.abs(stopsOfTransmission(percent / 100) - stops)).toBeLessThan(0.01)
  })
  it.each([
    // Sekonic C-800 manual, table of light-balancing filters; the conversions they are named for are from memory.
    ['81', 3300, 3200, 9],
    ['81A', 3400, 3200, 18],
    ['81B', 3500, 3200, 27],
    ['81D', 3700, 3200, 42],
    ['85', 5500, 3400, 112],
    ['85C', 5500, 3800, 81],
    ['85B', 5500, 3200, 131],
    ['82A', 3000, 3200, -21],
    ['82C', 2800, 3200, -45],
    ['80C', 3800, 5500, -81],
    ['80A', 3200, 5500, -131],
  ])('%s turns %d K into %d K by %d mired', (_, from, to, shift) => {
    expect(Math.abs(shiftBetween(from, to) - shift)).toBeLessThan(0.6)
  })
  it('is 3439 K for 5500 K with the printed +109, which is not what the filter does', () => {
    // Mired arithmetic with LEE's printed figure for 205.
    expect(Math.abs((shifted(5500, 109) ?? 0) - 3438.6)).toBeLessThan(1)
  })
  it.each([
    // Shifts worked out from LEE's transmission spectra with CIE colour-matching functions, ±3: 206, 201, 202, 218.
    ['LEE 206', 43, 45],
    ['LEE 201', -137, -137],
    ['LEE 202', -75, -75],
    ['LEE 218', -20, -20],
  ])('computes with the shift that %s really has', (maker, low, high) => {
    const shifts = GEL_ROWS.filter((row) => row.source.startsWith(maker)).map((row) => row.miredShift)
    expect(shifts).toHaveLength(1)
    expect(shifts[0]).toBeGreaterThanOrEqual(low - 3)
    expect(shifts[0]).toBeLessThanOrEqual(high + 3)
  })
})

describe('lenses', () => {
  it.each([
    // leica-users.org/leica-users/v10/msg04586.html, angle table for 36 × 24 mm.
    [17, 93.273, 70.435, 103.678],
    [21, 81.203, 59.49, 91.702],
    [75, 26.991, 18.181, 32.18],
    // 2·atan(d/2f).
    [40, 48.455, 33.398, 56.812],
    [70, 28.842, 19.455, 34.347],
  ])('%d mm sees %d × %d, diagonal %d degrees', (focal, across, upright, diagonal) => {
    expect(Math.abs(angleOfViewDeg(36, focal) - across)).toBeLessThan(0.001)
    expect(Math.abs(angleOfViewDeg(24, focal) - upright)).toBeLessThan(0.001)
    expect(Math.abs(angleOfViewDeg(Math.hypot(36, 24), focal) - diagonal)).toBeLessThan(0.001)
  })
  it('covers about 40° across with a head zoomed to 50 mm', () => {
    // Canon professional info page on speedlite zoom.
    expect(Math.abs(angleOfViewDeg(36, 50) - 40)).toBeLessThan(1)
  })
  it.each([
    // Leica M rangefinder manuals, c = 1/30 mm: 4.6–5.5 m; 4–8 m (coarse scale).
    [50, 1.4, 5, 1 / 30, 4.6, 5.5, 0.06],
    [50, 4, 5, 1 / 30, 4, 8, 1.3],
    // Formula, c = 0.030 mm; far is rounded as steeply as it runs to infinity.
    [50, 16, 5, 0.03, 2.564, 100.806, 0.1],
  ])('%d mm f/%d at %d m, c = %d: %d to %d m', (focal, n, focus, circle, near, far, within) => {
    const depth = depthOfField(focal, n, focus, circle)
    expect(Math.abs(depth.nearM - near)).toBeLessThan(within)
    expect(Math.abs((depth.farM ?? 0) - far)).toBeLessThan(within)
  })
  it('is sharp from about 2.7 m to infinity at f/16, 50 mm and 5 m', () => {
    // Yashica FX-70 manual; coarse.
    const depth = depthOfField(50, 16, 5, 1 / 30)
    expect(Math.abs(depth.nearM - 2.7)).toBeLessThan(0.35)
    expect(depth.farM).toBeNull()
  })
  it('covers what was published: 2 m with 300 mm at 16.7 m, 295 × 195 mm with 135 mm at 1.1 m', () => {
    // A worked answer for 300 mm by the far formula; a lens review (close focus, coarse: 15 %).
    expect(fieldM(300, 36, 16.7)).toBeCloseTo(2, 2)
    expect(Math.abs(fieldM(135, 36, 1.1) / 0.295 - 1)).toBeLessThan(0.15)
    expect(Math.abs(fieldM(135, 24, 1.1) / 0.195 - 1)).toBeLessThan(0.15)
  })
})

describe('light on a surface', () => {
  it.each([
    // E = I·cos θ/d² (IES 9.1.2).
    [1000, 2, 30, 216.5064],
    [1000, 2, 60, 125],
    [90, 2.129, 25, 17.9956],
  ])('%d cd from %d m at %d° is %d lx', (candela, distanceM, deg, lux) => {
    const at: Point = [distanceM * Math.sin(deg * RAD), 0, distanceM * Math.cos(deg * RAD)]
    const lamp = light(1, { purpose: 'main', unit: lampUnit(candela), power: 1, at, aim: [0, 0, 0] })
    const { exposureLxS, discShare } = arrivalAt(lamp, [0, 0, 0], 100, 1)
    const onSurface = (exposureLxS / discShare) * incidenceShare(lamp, [0, 0, 0], [0, 0, 1])
    expect(onSurface / lux).toBeCloseTo(1, 4)
  })
  it.each([
    // Cosine laws (IES): a matte face parallel to the wall falls off by cos⁴, an even point source by cos³.
    [10, 0.9406, 0.9551],
    [20, 0.7797, 0.8298],
    [30, 0.5625, 0.6495],
    [45, 0.25, 0.3536],
  ])('at %d° a wall gets %d of the middle from a matte face, %d from an even point', (deg, cos4, cos3) => {
    const matte = modifier(990, 'Small matte window', {
      widthM: 0.01,
      heightM: 0.01,
      beamDeg: { value: 120, from: 'assumed', source: 'sample' },
    })
    const share = (more: object) => {
      const emission = emissionOf(light(1, { purpose: 'background', at: [0, 0, 2], aim: [0, 0, 0], power: 1, ...more }))
      return exposureOnWall(emission, 2 * Math.tan(deg * RAD), 0, 0) / exposureOnWall(emission, 0, 0, 0)
    }
    expect(Math.abs(share({ modifier: matte }) - cos4)).toBeLessThan(1e-4)
    // The bare window is 6 cm wide, so a little of the disc's law is in it.
    expect(Math.abs(share({}) - cos3)).toBeLessThan(4e-4)
  })
  it.each([
    // n = ln 0.5/ln cos(half); field from 10 %; flux by integration; the Gaussian's field is √log₂10 of its beam.
    [10, 18.199, 0.03437, 18.226, 0.03445],
    [30, 53.946, 0.29929, 54.678, 0.30557],
    [60, 103.349, 1.0798, 109.357, 1.16239],
    [120, 168.522, Math.PI, 218.714, 3.36113],
  ])(
    'a beam of %d° has the field %d and flux %d as cosⁿ, %d and %d as a Gaussian',
    (beam, field, flux, gField, gFlux) => {
      const cosine = (deg: number, beamDeg: number) => cosinePower(deg, cosineExponent(beamDeg))
      expect(cosine(field / 2, beam)).toBeCloseTo(0.1, 4)
      expect((2 * Math.acos(0.1 ** (1 / cosineExponent(beam)))) / RAD).toBeCloseTo(field, 2)
      expect(gaussianProfile(gField / 2, beam)).toBeCloseTo(0.1, 4)
      const integrated = (profile: (deg: number, beamDeg: number) => number) => {
        const steps = 20_000
        let sum = 0
        for (let i = 0; i < steps; i++) {
          const deg = ((i + 0.5) * 90) / steps
          sum += 2 * Math.PI * profile(deg, beam) * Math.sin(deg * RAD) * ((90 * RAD) / steps)
        }
        return sum
      }
      expect(integrated(cosine) / flux).toBeCloseTo(1, 3)
      expect(integrated(gaussianProfile) / gFlux).toBeCloseTo(1, 3)
    },
  )
})

describe('shadows and height', () => {
  it('has a sun of 1923″ whose penumbra is 1/107.3 of the distance', () => {
    // Sundial mailing list, mean solar diameter.
    const penumbra = penumbraM(2 * Math.tan(((1923 / 3600) * RAD) / 2), 1, 1)
    expect(Math.abs(1 / penumbra - 107.3)).toBeLessThan(0.2)
  })
  it('is 30° where the four feet of the manuals are along the beam', () => {
    // NAVEDTRA 14209 ch. 7: about 4 ft from the subject, 2 ft above the eyes.
    expect(elevationDeg(2, Math.sqrt(4 ** 2 - 2 ** 2))).toBeCloseTo(30, 9)
  })
})
