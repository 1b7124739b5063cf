import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { Light } from '#shared/domain/lighting/schema.ts'
import { glowOf, wallMap } from '#shared/domain/lighting/wall.ts'
import { drawnSetup } from '#tests/support/drawn-setup.ts'
import { FULL_WARM, GRID, HALF_BLUE, light, modifier, unit, whole } from '#tests/support/lighting-sample.ts'

const FACE: [number, number, number] = [0, 1.5, 0]
const main = light(1, { purpose: 'main', at: [0, 1.5, 2], aim: FACE, power: 1 })
const stated = (value: number) => ({ value, from: 'assumed' as const, source: 'sample' })
const SMALL = { widthM: 0.001, heightM: 0.001 }
const MATTE = modifier(990, 'Small matte window', { ...SMALL, beamDeg: stated(120) })
const NARROW = modifier(991, 'Small 10° grid', { ...SMALL, shape: 'grid', beamDeg: stated(10) })
/** A wide lens, so that the camera sees all of a wall of 6 × 3 m. */
const WIDE = { focalMm: 12, at: [0, 1.5, 3] as [number, number, number], aim: [0, 1.5, 0] as [number, number, number] }
const setupOf = (lights: Light[], more: Partial<Parameters<typeof whole>[0]> = {}) =>
  whole({ lights, camera: WIDE, ...more })

describe('wallMap', () => {
  it('has the stops of the closed form at every point of the wall', () => {
    // A matte window 1 m before the wall, straight at it: E = I·cos⁴θ/d² (IES); main GN 40 at 2 m, bare.
    const window = light(2, {
      purpose: 'background',
      at: [0.5, 1.5, -1],
      aim: [0.5, 1.5, -2],
      modifier: MATTE,
      power: 1 / 4,
    })
    const mainOff = {
      ...main,
      at: [0, 1.5, 2] as [number, number, number],
      aim: [0, 1.5, 5] as [number, number, number],
    }
    const map = wallMap(setupOf([main, window]), { columns: 12, rows: 8 })
    // The main's spill is 4 m off: the same bare head, even to all sides (beam not known), cos³ over d².
    const disc = 0.03 ** 2
    const expected = (x: number, y: number) => {
      const near = (x - 0.5) ** 2 + (y - 1.5) ** 2
      const own = 2.5 * 40 ** 2 * 0.25 * (1 / (1 + near)) ** 2
      const far = 16 + x ** 2 + (y - 1.5) ** 2
      const spill = (2.5 * 40 ** 2 * (4 / Math.sqrt(far))) / (far + disc)
      return Math.log2((2.5 * 40 ** 2) / (4 + disc) / (own + spill))
    }
    expect(map?.yM).toHaveLength(8)
    map?.underMainStops.forEach((row, r) =>
      row.forEach((stops, c) => expect(stops).toBeCloseTo(expected(map.xM[c] ?? 0, map.yM[r] ?? 0), 5)),
    )
    // Without a main at the eyes there is nothing to compare with.
    expect(wallMap(setupOf([mainOff, window]), { columns: 2, rows: 2 })).toBeNull()
  })

  it('covers what the camera sees, from the top left, and no more than the background', () => {
    // 85 mm upright, 5 m off, level: 24/85 × 5 m across; the wall is centred on x = 0.
    const level = { at: [0, 1.5, 3] as [number, number, number], aim: FACE, focalMm: 85 }
    const map = wallMap(setupOf([main], { camera: level }), { columns: 100, rows: 100 })
    const width = (24 / 85) * 5
    expect(map?.xM[0]).toBeCloseTo(-width / 2 + width / 200, 9)
    expect(map?.yM[0]).toBeCloseTo(1.5 + ((36 / 85) * 5 * 0.99) / 2, 9)
    expect(map?.underMainStops.flat()).not.toContain(null)
    const small = wallMap(setupOf([main], { background: { widthM: 1, heightM: 2 } }), { columns: 10, rows: 10 })
    expect(Math.max(...(small?.xM ?? []))).toBeCloseTo(0.45, 9)
    expect(Math.max(...(small?.yM ?? []))).toBeCloseTo(1.9, 9)
  })

  it('leaves out the corners that a tilted camera does not see, and the wall behind its back', () => {
    const tilted = {
      at: [0, 0.3, 1] as [number, number, number],
      aim: [0, 2, -2] as [number, number, number],
      focalMm: 20,
    }
    const map = wallMap(setupOf([main], { camera: tilted, background: { widthM: 20, heightM: 10 } }), {
      columns: 30,
      rows: 30,
    })
    expect(map?.underMainStops.flat()).toContain(null)
    const away = { at: [0, 1.5, 3] as [number, number, number], aim: [0, 1.5, 9] as [number, number, number] }
    expect(wallMap(setupOf([main], { camera: away }), { columns: 3, rows: 3 })).toBeNull()
  })

  it('is dark where no light reaches, and twice the distance is two stops', () => {
    const dark = light(1, { purpose: 'main', at: [0, 1.5, -1], aim: [0, 1.5, 5], power: 1 })
    expect(
      wallMap(setupOf([dark]), { columns: 3, rows: 3 })
        ?.underMainStops.flat()
        .every((stops) => stops === Infinity),
    ).toBe(true)
    const middle = (zM: number) =>
      wallMap(setupOf([main], { background: { zM } }), { columns: 1, rows: 1 })?.underMainStops[0]?.[0] ?? NaN
    // One point: the middle of the wall at 1.5 m, on the main's axis; 4 m and 8 m from it.
    expect(middle(-6) - middle(-2)).toBeCloseTo(2, 2)
  })
})

describe('glowOf', () => {
  const window = (more: object = {}) =>
    light(2, { purpose: 'background', at: [0.4, 1.3, -1], aim: [0.4, 1.3, -2], modifier: MATTE, power: 1 / 4, ...more })

  it('finds the peak on the axis and the size of the parts within one and two stops', () => {
    // cos⁴θ = ½ and ¼ at 1 m: tan θ = √(√2 − 1) = .6436 and tan 45° = 1.
    const glow = glowOf(setupOf([window()]))
    expect(glow?.point[0]).toBeCloseTo(0.4, 2)
    expect(glow?.point[1]).toBeCloseTo(1.3, 2)
    expect(Math.abs((glow?.withinOneStop.widthM ?? 0) - 2 * 0.6436)).toBeLessThan(0.01)
    expect(Math.abs((glow?.withinTwoStops.widthM ?? 0) - 2)).toBeLessThan(0.01)
    expect(Math.abs((glow?.withinOneStop.heightM ?? 0) - 2 * 0.6436)).toBeLessThan(0.01)
    expect(glow?.withinTwoStops).toMatchObject({ isCut: false })
    // GN 40 at 1/4 and 1 m: f/20.
    expect(glow?.fNumber).toBeCloseTo(20, 2)
    expect(glow?.underMainStops).toBeNull()
  })

  it('is found where it is small, and is round for a grid straight on', () => {
    // Gaussian of 10° with cos³: at half the beam, 5°, the beam alone is half.
    const spot = window({ at: [-1.3, 2.2, -1], aim: [-1.3, 2.2, -2], modifier: NARROW })
    const glow = glowOf(setupOf([spot]))
    expect(glow?.point[0]).toBeCloseTo(-1.3, 2)
    expect(Math.abs((glow?.withinOneStop.widthM ?? 0) - 2 * Math.tan((5 * Math.PI) / 180))).toBeLessThan(0.005)
    expect(glow?.withinOneStop.heightM).toBeCloseTo(glow?.withinOneStop.widthM ?? 0, 2)
  })

  it('says when the floor or the picture cuts it', () => {
    expect(glowOf(setupOf([window({ at: [0.4, 0.3, -1], aim: [0.4, 0.3, -2] })]))?.withinOneStop.isCut).toBe(true)
    // Straight at the floor line: brightest at the floor, no point of it is under it.
    expect(glowOf(setupOf([window({ at: [0, 0.1, -1], aim: [0, -0.5, -2] })]))?.point[1]).toBeGreaterThanOrEqual(0)
  })

  it('compares its colour with the white balance', () => {
    // 10⁶/(10⁶/5500 + 167) = 2867 K (Rosco Cinegel 3407 on 5500 K).
    const warm = glowOf(setupOf([window({ gels: [FULL_WARM] })]))
    expect(warm?.kelvin).toBeCloseTo(2867, 0)
    expect(warm?.miredFromWhite).toBeCloseTo(167, 6)
    // Two equal lights on one spot, +167 and −68: half way.
    const both = glowOf(
      setupOf([
        window({ gels: [{ ...FULL_WARM, numbers: { ...FULL_WARM.numbers, transmission: stated(0.5) } }] }),
        {
          ...window({ gels: [{ ...HALF_BLUE, numbers: { ...HALF_BLUE.numbers, transmission: stated(0.5) } }] }),
          id: main.id,
        },
      ]),
    )
    expect(both?.miredFromWhite).toBeCloseTo((167 - 68) / 2, 6)
    expect(both?.shares.map((share) => share.share)).toEqual([0.5, 0.5])
    const beyond = glowOf(
      setupOf([window({ unit: unit(undefined, { flashColourK: stated(20000) }), gels: [HALF_BLUE] })]),
    )
    expect(beyond?.kelvin).toBeNull()
  })

  it('says how it meets the shoulders as the camera sees them', () => {
    // Camera at 1.5 m, 3 m off; shoulders at 1.28 m; wall 5 m off: 1.5 − .22 · 5/3.
    const at = (y: number) => glowOf(setupOf([window({ at: [0, y, -1], aim: [0, y, -2], modifier: NARROW })]))
    expect(at(1.5)?.shoulders?.heightOnWallM).toBeCloseTo(1.5 - (0.22 * 5) / 3, 9)
    expect(at(2)?.shoulders?.words).toBe('The part within a stop of its peak stays 0.8 m above the shoulders.')
    expect(at(0.5)?.shoulders?.words).toMatch(/^The part within a stop of its peak lies behind the body, 0\.5 m under/)
    expect(at(1.5 - (0.22 * 5) / 3)?.shoulders?.words).toMatch(
      /meets the shoulders: 50 % of its height shows above them\.$/,
    )
    const high = setupOf([window({ at: [0, 2, -1], aim: [0, 2, -2], modifier: NARROW })])
    // 0.8 m is 31 inches and a half.
    expect(glowOf(high, 'upright', null, 'ft')?.shoulders?.words).toMatch(/stays 2′ \d″ above the shoulders\.$/)
    const nobody = setupOf([window()])
    expect(glowOf({ ...nobody, places: [] })?.shoulders).toBeNull()
  })

  it('is nothing on a wall that is not lit or not seen', () => {
    expect(glowOf(setupOf([window({ isOn: false })]))).toBeNull()
    expect(glowOf(setupOf([window({ at: [0, 1, -3], aim: [0, 1, -2] })]))).toBeNull()
    expect(glowOf(setupOf([]))).toBeNull()
  })

  it('is nowhere less bright than the map of the same wall', () => {
    fc.assert(
      fc.property(drawnSetup(), (setup) => {
        const glow = glowOf(setup)
        const map = wallMap(setup, { columns: 15, rows: 15 })
        if (!map || !glow || glow.underMainStops === null) return
        const brightest = Math.min(...map.underMainStops.flat().flatMap((stops) => stops ?? []))
        expect(glow.underMainStops).toBeLessThan(brightest + 0.1)
        for (const patch of [glow.withinOneStop, glow.withinTwoStops]) {
          expect(patch.widthM).toBeGreaterThanOrEqual(0)
          expect(patch.bottomM).toBeLessThanOrEqual(glow.point[1])
          expect(patch.topM).toBeGreaterThanOrEqual(glow.point[1])
        }
        expect(glow.withinTwoStops.widthM).toBeGreaterThanOrEqual(glow.withinOneStop.widthM - 0.005)
      }),
      { numRuns: 60 },
    )
  })
  it('takes a grid across the wall for what it is', () => {
    const across = light(3, { purpose: 'background', at: [-1.5, 1.5, -1.5], aim: [0.5, 1.5, -2], modifier: GRID })
    const glow = glowOf(setupOf([across]))
    expect(glow?.withinOneStop.widthM).toBeGreaterThan(glow?.withinOneStop.heightM ?? Infinity)
  })
})
