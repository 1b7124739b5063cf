import { describe, expect, it } from 'vitest'
import { axisAngleWords, floorWords, lightNames, sheetOf } from '#shared/domain/recipes/sheet.ts'
import { GRID, HALF_BLUE, OCTA, light, unit, whole } from '#tests/support/lighting-sample.ts'

const face: [number, number, number] = [0, 1.5, 0]
const main = light(1, { purpose: 'main', group: 'A', at: [-1, 2.5, 1], aim: face, modifier: OCTA, zoomMm: 50 })
const setup = whole({
  lights: [
    main,
    light(2, { purpose: 'rim', at: [1, 1.5, -1], aim: [1, 0.5, 0.5], gels: [HALF_BLUE] }),
    light(3, { purpose: 'rim', at: [2, 1.5, 0], aim: face, isOn: false, support: null }),
    light(4, { purpose: 'background', at: [0.5, 0.6, -1], aim: [0.5, 1.2, -2], modifier: GRID }),
  ],
})

describe('axisAngleWords', () => {
  it('goes round the sitter from the camera’s axis, sides as the camera sees them', () => {
    expect(axisAngleWords([-1, 2, 1], setup)).toBe('45° camera left')
    expect(axisAngleWords([1, 2, -1], setup)).toBe('135° camera right')
    expect(axisAngleWords([0, 2, 2], setup)).toBe('on the camera’s axis')
    expect(axisAngleWords([0, 2.6, 0.05], setup)).toBe('overhead')
    expect(axisAngleWords([0, 2, -2], setup)).toBe('straight behind')
  })

  it('follows the camera when it stands aside', () => {
    // The camera at 45° to the right: what stands at 45° to the left is a right angle away.
    const aside = whole({ camera: { at: [2, 1.5, 2] } })
    expect(axisAngleWords([-1, 2, 1], aside)).toBe('90° camera left')
  })
})

describe('floorWords', () => {
  it('counts from the sitter’s mark', () => {
    expect(floorWords([-1.2, 0, 0.85], 'm')).toBe('1.2 m left, 0.85 m to the camera')
    expect(floorWords([0, 0, -1], 'ft')).toBe('3′ 3½″ behind')
    expect(floorWords([0, 3, 0], 'm')).toBe('on the mark')
  })
})

describe('lightNames', () => {
  it('counts those that share a purpose', () => {
    expect(lightNames(setup.lights)).toEqual(['Main', 'Rim 1', 'Rim 2', 'Background light'])
  })
})

describe('sheetOf', () => {
  const sheet = sheetOf(setup, { orientations: ['upright'], frames: 40 }, 'm')

  it('says of each light what is needed to put it back', () => {
    expect(sheet.lights[0]).toMatchObject({
      group: 'A',
      name: 'Main',
      unit: 'Small flash',
      made: '90 cm octa',
      support: '2.4 m stand',
      power: '1/4',
      zoom: '50 mm zoom',
      place: '1.0 m left, 1.0 m to the camera',
      height: '2.5 m up',
      // √(1² + 1² + 1²) = 1.73 m; atan(1 / √2) = 35.3°.
      distance: '1.7 m to the eyes',
      angle: '45° camera left, 35° above the eyes',
      aim: 'at the eyes',
      againstMain: '0',
    })
    expect(sheet.lights[1]).toMatchObject({
      made: 'half blue −68',
      angle: '135° camera right, level with the eyes',
      aim: '1.0 m right, 0.5 m to the camera, 0.5 m up',
    })
    expect(sheet.lights[2]).toMatchObject({ power: 'off', support: 'no support named', made: 'bare' })
    expect(sheet.lights[3]).toMatchObject({ distance: '1.2 m to the wall', aim: 'on the wall, 1.2 m up, 0.5 m right' })
  })

  it('counts the kit', () => {
    expect(sheet.kit).toEqual([
      { count: 1, name: 'Camera with 85 mm' },
      { count: 4, name: 'Small flash' },
      { count: 1, name: '90 cm octa' },
      { count: 1, name: '10° grid' },
      { count: 1, name: 'Half blue −68' },
      { count: 3, name: '2.4 m stand' },
      { count: 1, name: 'grey wall' },
    ])
  })

  it('says the room and the circuit where they are known', () => {
    const known = {
      ...setup,
      setup: {
        ...setup.setup,
        walled: { leftM: 2, rightM: 3, frontM: 5, ceilingM: 2.6 },
        circuit: { volts: 230, amps: 16 },
      },
    }
    const { camera } = sheetOf(known, { orientations: [], frames: null }, 'm')
    expect(camera.map(({ label, value }) => `${label}: ${value}`)).toEqual(
      expect.arrayContaining(['Room: ceiling 2.6 m', 'Mains circuit: 230 V, 16 A']),
    )
  })

  it('puts what cannot be worked out before the cautions, by the name of its light', () => {
    const blank = unit(undefined, { guideNumberM: { value: 0, from: 'assumed', source: 'sample' } })
    const rims = [
      light(2, { purpose: 'rim', at: [1, 1.5, -1], aim: face }),
      light(3, { purpose: 'rim', at: [2, 1.5, 0], aim: face, unit: blank }),
    ]
    const [first] = sheetOf(
      whole({ lights: [main, ...rims] }),
      { orientations: ['upright'], frames: null },
      'm',
    ).cautions
    expect(first).toMatchObject({ tone: 'red', title: 'Rim 2' })
    expect(first?.words).toMatch(/^The rim’s unit, small flash, has no guide number/)
  })

  it('is there for a setup with nothing in it', () => {
    const empty = sheetOf({ ...whole({}), places: [] }, { orientations: [], frames: null }, 'm')
    expect(empty.lights).toEqual([])
    expect(empty.readings.map(({ label }) => label)).toEqual(['Ambient'])
  })
})
