import { describe, expect, it } from 'vitest'
import { readSetup } from '#shared/domain/lighting/readings.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { type SheetGroup, shadowLine, sheetGroups, sitterName } from '#shared/domain/recipes/sheet-groups.ts'
import { lightNames } from '#shared/domain/recipes/sheet.ts'
import type { LengthUnit } from '#shared/units/length.ts'
import { BOOM, GRID, OCTA, id, light, unit, whole } from '#tests/support/lighting-sample.ts'

const face: [number, number, number] = [0, 1.5, 0]
const main = light(1, { purpose: 'main', at: [-1, 2.5, 1], aim: face, modifier: OCTA, power: 1 / 4 })
const setup = whole({
  lights: [
    main,
    light(2, { purpose: 'background', at: [0.5, 0.6, -1], aim: [0.5, 1.2, -2], modifier: GRID }),
    light(3, { purpose: 'rim', at: [2, 2, -1], aim: face, support: BOOM }),
  ],
  ambientLux: 250,
})

function groupsOf(one: WholeSetup, frames: number | null = 40, as: LengthUnit = 'm'): SheetGroup[] {
  const use = { orientations: ['upright' as const], frames }
  const reading = readSetup(one, { ...use, unit: as })
  return sheetGroups({ whole: one, reading, use, unit: as, names: lightNames(one.lights) })
}
const linesOf = (groups: readonly SheetGroup[], title: string) => groups.find((group) => group.title === title)?.lines
const lineOf = (groups: readonly SheetGroup[], title: string, label: string) =>
  linesOf(groups, title)?.find((line) => line.label === label)

describe('sheetGroups', () => {
  const groups = groupsOf(setup)

  it('has everything that is read beside the table of lights', () => {
    expect(groups.map(({ title }) => title)).toEqual([
      'Ambient',
      'Glow on the wall',
      'Lens and frame',
      'Pops and recycling',
      'Stands, booms and mains',
    ])
  })

  it('says the light there is, against the flash and the white balance', () => {
    // √(250 lx × 1/160 s × 100 / 250) is f/0.79 (incident, C = 250: ISO 2720).
    const { shutterS } = setup.setup.camera
    expect(Math.sqrt((250 * shutterS * 100) / 250)).toBeCloseTo(0.79, 2)
    expect(lineOf(groups, 'Ambient', 'Ambient against flash')).toMatchObject({
      value: expect.stringMatching(/^−\d+/),
      more: expect.stringContaining('stops under the flash at 1/160'),
    })
    expect(lineOf(groups, 'Ambient', 'Colour of the ambient')?.more).toBe('as white as the camera is set (assumed)')
  })

  it('says where the glow is and how wide', () => {
    const { glow } = readSetup(setup)
    expect(glow).not.toBeNull()
    expect(lineOf(groups, 'Glow on the wall', 'Its brightest point')?.more).toMatch(/^1\.2 m up, 0\.5 m right; /)
    const wide = glow?.withinOneStop.widthM ?? NaN
    expect(lineOf(groups, 'Glow on the wall', 'Within one stop of it')?.value).toContain(wide.toFixed(1))
  })

  it('counts pops of the frames: 40 frames at a quarter are 10 full ones, ready after a quarter of 3.5 s', () => {
    expect(lineOf(groups, 'Pops and recycling', 'Main')).toEqual({
      label: 'Main',
      value: '10 of 150',
      more: 'full pops for 40 frames; ready again in 0.9 s',
    })
    expect(lineOf(groupsOf(setup, null), 'Pops and recycling', 'Main')).toMatchObject({ value: '0.9 s' })
  })

  it('says what each stand carries, and what balances a boom', () => {
    const carried = linesOf(groups, 'Stands, booms and mains') ?? []
    // Head 0.5 kg and octa 1 kg.
    expect(carried[0]).toEqual({
      label: 'Main on its 2.4 m stand',
      value: '1.5 kg',
      more: 'of 3 kg; 2.5 m of 2.4 m up',
    })
    expect(carried.map(({ label }) => label)).toContain('Counterweight of the rim')
  })

  it('sums the mains: 1000 W at 230 V draw 4.3 A', () => {
    const mains = unit(id(77), { mainsWatts: { value: 1000, from: 'assumed', source: '' } })
    const one = whole({ lights: [light(1, { purpose: 'main', at: [-1, 2, 1], aim: face, unit: mains })] })
    expect(lineOf(groupsOf(one), 'Stands, booms and mains', 'On the mains')).toMatchObject({ value: '1000 W' })
    one.setup.circuit = { volts: 230, amps: 16 }
    expect(lineOf(groupsOf(one), 'Stands, booms and mains', 'On the mains')?.more).toContain('4.3 A of 16 A')
  })

  it('is in feet where that is wanted', () => {
    const words = groupsOf(setup, 40, 'ft').flatMap(({ lines }) => lines.map(({ value, more }) => `${value} ${more}`))
    for (const line of words) expect(line).not.toMatch(/\d m\b/)
    expect(words.join()).toMatch(/\d′ \d+/)
  })

  it('leaves out what a setup without lights has nothing to say of', () => {
    expect(groupsOf(whole({})).map(({ title }) => title)).toEqual(['Lens and frame'])
  })
})

describe('shadowLine', () => {
  it('is D · b / a: 0.9 m over the distance, from five centimetres', () => {
    const one = whole({ lights: [main] })
    const distance = Math.hypot(1, 1, 1)
    expect(shadowLine({ reading: readSetup(one), unit: 'm' })).toEqual([
      {
        label: 'Soft edge of a shadow',
        value: `${Math.round(((0.9 * 0.05) / distance) * 1000)} mm`,
        more: 'thrown from 50 mm off the skin',
      },
    ])
    expect(shadowLine({ reading: readSetup(whole({})), unit: 'm' })).toEqual([])
  })
})

describe('sitterName', () => {
  it('names nobody, and counts where there are several', () => {
    const [place] = setup.places
    if (!place) throw new Error('the sample has a sitter')
    expect(sitterName(setup, place.id)).toBe('Sitter')
    const second = { ...place, id: `${place.id.slice(0, -1)}9` as typeof place.id }
    expect(sitterName({ ...setup, places: [place, second] }, second.id)).toBe('Sitter 2')
  })
})
