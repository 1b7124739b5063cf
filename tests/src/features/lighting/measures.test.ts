import { describe, expect, it } from 'vitest'
import { axisWords, eyeLineWords, measureLines, measuresOf, pointAt } from '#src/features/lighting/measures.ts'
import { whole } from '#tests/support/lighting-sample.ts'

const setup = whole({})

describe('measuresOf', () => {
  it('is the start of the manuals: 4 ft away, 2 ft above the eyes, 45° to the side, 26.6° up', () => {
    // NAVEDTRA 14209; US Army subcourse SS0510. 4 ft is on the floor there, eyes at 1.5 m here.
    const floorM = 4 * 0.3048
    const measures = measuresOf([-floorM * Math.SQRT1_2, 1.5 + 2 * 0.3048, floorM * Math.SQRT1_2], setup)
    expect(measures.elevationDeg).toBeCloseTo(26.565, 3)
    expect(measures.fromAxisDeg).toBeCloseTo(-45, 9)
    expect(measures.toEyesM).toBeCloseTo(Math.hypot(4, 2) * 0.3048, 9)
    expect(measures.toWallM).toBeCloseTo(2 + floorM * Math.SQRT1_2, 9)
  })
  it('counts from the camera, wherever that stands', () => {
    const aside = whole({ camera: { at: [3, 1.4, 0] } })
    expect(measuresOf([2, 1.5, 0], aside).fromAxisDeg).toBeCloseTo(0, 9)
    expect(measuresOf([0, 1.5, 2], aside).fromAxisDeg).toBeCloseTo(-90, 9)
    expect(measuresOf([0, 1.5, -2], aside).fromAxisDeg).toBeCloseTo(90, 9)
    expect(measuresOf([0, 3, 0], aside).fromAxisDeg).toBe(0)
  })
})

describe('pointAt', () => {
  it('is the place with these measures, round about and at every height', () => {
    for (const camera of [
      [0, 1.4, 3],
      [1.3, 1.6, 2.1],
    ] as const) {
      const own = whole({ camera: { at: [...camera] } })
      for (let deg = -179; deg <= 180; deg += 13) {
        for (const heightM of [0.4, 1.5, 2.3]) {
          const at = pointAt({ toEyesM: 1.7, fromAxisDeg: deg }, heightM, own)
          const measures = measuresOf(at, own)
          expect(at[1]).toBe(heightM)
          expect(measures.toEyesM).toBeCloseTo(1.7, 9)
          expect(measures.fromAxisDeg).toBeCloseTo(deg, 6)
        }
      }
    }
  })
  it('hangs right above where the distance is too short for the height', () => {
    expect(pointAt({ toEyesM: 0.5, fromAxisDeg: 30 }, 3, setup)).toEqual([0, 3, 0])
  })
})

describe('what is said of them', () => {
  it('is in plain words and in the unit of the device', () => {
    expect([axisWords(-45.2), axisWords(0.3), axisWords(-180), axisWords(90)]).toEqual([
      '45° to the left',
      'on the camera’s axis',
      'straight behind',
      '90° to the right',
    ])
    expect([eyeLineWords(24.4), eyeLineWords(-3), eyeLineWords(0.2)]).toEqual([
      '24° above the eye line',
      '3° below the eye line',
      'on the eye line',
    ])
    expect(measureLines('light', [-1, 1.5, 0], setup, 'm')).toEqual([
      ['To the eyes', '1.0 m'],
      ['From the camera', '90° to the left'],
      ['Height', '1.5 m, on the eye line'],
      ['To the wall', '2.0 m'],
    ])
    expect(measureLines('light', [-1, 1.5, -2.5], setup, 'ft').map(([, value]) => value)).toEqual([
      '8′ 10″',
      '158° to the left',
      '4′ 11″, on the eye line',
      'behind it',
    ])
    expect(measureLines('camera', [0, 1.5, 3], setup, 'm').map(([name]) => name)).not.toContain('From the camera')
    expect(measureLines('place', [0, 1.4, 1], setup, 'm')[0]).toEqual(['To the camera', '2.0 m'])
  })
})
