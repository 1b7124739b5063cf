import { loadKgOf } from '#shared/domain/lighting/boom.ts'
import { kelvinLabel } from '#shared/domain/lighting/gel.ts'
import { sightsOf } from '#shared/domain/lighting/in-frame.ts'
import {
  counterweightWords,
  depthLabel,
  frameWords,
  popsWords,
  sightWords,
  sizeLabel,
  smallLabel,
  syncWords,
  underWords,
  whiteWords,
} from '#shared/domain/lighting/reading-words.ts'
import type { SetupReading } from '#shared/domain/lighting/readings.ts'
import type { SetupUse } from '#shared/domain/lighting/setup-use.ts'
import { shutterLabel } from '#shared/domain/lighting/stops.ts'
import { fNumberLabel, inSentence, stopsLabel } from '#shared/domain/lighting/words.ts'
import type { Glow, Patch } from '#shared/domain/lighting/wall.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { type LengthUnit, lengthLabel } from '#shared/units/length.ts'

export type SheetLine = { label: string; value: string; more: string }
/** Readings under one heading. */
export type SheetGroup = { title: string; lines: SheetLine[] }

export type SheetGroupsInput = {
  whole: WholeSetup
  /** Read for the same use and unit. */
  reading: SetupReading
  use: Pick<SetupUse, 'orientations' | 'frames'>
  unit: LengthUnit
  /** Names of the lights in their order. */
  names: readonly string[]
}

/** "Sitter", or "Sitter 2" where there are several: a recipe names nobody. */
export function sitterName(whole: WholeSetup, placeId: string): string {
  if (whole.places.length < 2) return 'Sitter'
  return `Sitter ${whole.places.findIndex((place) => place.id === placeId) + 1}`
}

const upper = (words: string) => `${words.charAt(0).toUpperCase()}${words.slice(1)}`

function ambientLines({ whole, reading }: SheetGroupsInput): SheetLine[] {
  const { ambient } = reading
  if (!ambient) return []
  const { shutterS } = whole.setup.camera
  return [
    {
      label: 'Ambient against flash',
      value: ambient.underFlashStops === null ? 'no flash' : stopsLabel(-ambient.underFlashStops),
      more:
        ambient.underFlashStops === null
          ? 'no flash reaches the sitter'
          : `${underWords(ambient.underFlashStops, 'the flash')} at ${shutterLabel(shutterS)}`,
    },
    {
      label: 'Colour of the ambient',
      value: kelvinLabel(ambient.kelvin),
      more: `${whiteWords(ambient.miredFromWhite)}${ambient.isKelvinAssumed ? ' (assumed)' : ''}`,
    },
  ]
}

function glowLines({ unit }: SheetGroupsInput, glow: Glow): SheetLine[] {
  const [x, y] = glow.point
  const length = (metres: number) => lengthLabel(metres, unit)
  const side = Math.abs(x) < 0.05 ? 'in the middle' : `${length(Math.abs(x))} ${x < 0 ? 'left' : 'right'}`
  const patch = (label: string, { widthM, heightM, bottomM, topM, isCut }: Patch): SheetLine => ({
    label,
    value: sizeLabel(widthM, heightM, unit),
    more: `${length(bottomM)} to ${length(topM)} up${isCut ? '; goes on past the picture or the wall' : ''}`,
  })
  return [
    {
      label: 'Its brightest point',
      value: glow.underMainStops === null ? fNumberLabel(glow.fNumber) : stopsLabel(-glow.underMainStops),
      more: `${length(y)} up, ${side}${glow.underMainStops === null ? '' : `; ${underWords(glow.underMainStops, 'the main')}`}`,
    },
    patch('Within one stop of it', glow.withinOneStop),
    patch('Within two stops of it', glow.withinTwoStops),
    ...(glow.shoulders
      ? [{ label: 'At the shoulders', value: length(glow.shoulders.heightOnWallM), more: glow.shoulders.words }]
      : []),
    {
      label: 'Its colour',
      value: glow.kelvin === null ? 'deep blue' : kelvinLabel(glow.kelvin),
      more: whiteWords(glow.miredFromWhite),
    },
  ]
}

function lensLines({ whole, reading, use, unit }: SheetGroupsInput): SheetLine[] {
  const { depth, framing, sync } = reading
  const exact = (metres: number) => lengthLabel(metres, unit, true)
  return [
    ...framing.map(({ orientation, widthM, heightM, words }) => ({
      label: frameWords(orientation),
      value: sizeLabel(widthM, heightM, unit),
      more: words,
    })),
    {
      label: 'In focus',
      value: depth.farM === null ? `${lengthLabel(depth.nearM, unit)} on` : depthLabel(depth.farM - depth.nearM, unit),
      more: `${
        depth.farM === null ? 'from there to infinity' : `${exact(depth.nearM)} to ${exact(depth.farM)} from the camera`
      }; circle of confusion 0.030 mm`,
    },
    ...framing.flatMap(({ orientation, sitters }) =>
      sitters.map(({ placeId, leftM, rightM, topM, words }) => ({
        label: `${sitterName(whole, placeId)}${framing.length > 1 ? `, ${orientation}` : ''}`,
        value: exact(Math.min(leftM, rightM, topM)).replace('-', '−'),
        more: words,
      })),
    ),
    ...sightsOf(whole, use.orientations).map(({ name, clearance }) => ({
      label: upper(name),
      value: exact(Math.abs(clearance.marginM)),
      more: sightWords(clearance),
    })),
    ...(sync
      ? [
          {
            label: 'Shutter against sync',
            value: shutterLabel(sync.shutterS),
            more: syncWords(sync),
          },
        ]
      : []),
  ]
}

function supplyLines({ whole, reading, use, names }: SheetGroupsInput): SheetLine[] {
  return reading.supplies.map(({ lightId, recycleS, pops, popsPerCharge, charges }) => ({
    label: names[whole.lights.findIndex((light) => light.id === lightId)] ?? 'Light',
    value: pops === null ? `${recycleS.toFixed(1)} s` : popsWords(pops, popsPerCharge),
    more:
      pops === null
        ? `until it is ready again; no shot uses this setup yet`
        : `full pops for ${use.frames} frames; ready again in ${recycleS.toFixed(1)} s${
            charges !== null && charges > 1 ? `; ${Math.ceil(charges)} charges or sets` : ''
          }`,
  }))
}

function carryLines({ whole, reading, unit, names }: SheetGroupsInput): SheetLine[] {
  const length = (metres: number) => lengthLabel(metres, unit)
  const carried = whole.lights.flatMap((light, index): SheetLine[] => {
    if (!light.support) return []
    const { name, numbers } = light.support
    const boom = reading.booms.find(({ lightId }) => lightId === light.id)
    return [
      {
        label: `${names[index] ?? 'Light'} on its ${inSentence(name)}`,
        value: `${loadKgOf(light).toFixed(1)} kg`,
        more: `of ${numbers.maxLoadKg.value} kg; ${length(light.at[1])} of ${length(numbers.maxHeightM.value)} up`,
      },
      ...(boom
        ? [
            {
              label: `Counterweight of the ${(names[index] ?? 'light').toLowerCase()}`,
              value: `${boom.counterweightKg.toFixed(1)} kg`,
              more: counterweightWords(boom),
            },
          ]
        : []),
    ]
  })
  const { mains } = reading
  if (!mains) return carried
  const { circuit } = mains
  return [
    ...carried,
    {
      label: 'On the mains',
      value: `${Math.round(mains.watts)} W`,
      more: circuit
        ? `${circuit.drawnA.toFixed(1)} A of ${circuit.amps} A; plan on ${Math.round(circuit.longWatts)} W for three hours or more`
        : 'circuit not known; all at full power, dimmed or not',
    },
  ]
}

/** Soft edge of a shadow thrown from five centimetres off the skin. */
export function shadowLine({ reading, unit }: Pick<SheetGroupsInput, 'reading' | 'unit'>): SheetLine[] {
  if (!reading.main) return []
  return [
    {
      label: 'Soft edge of a shadow',
      value: smallLabel(reading.main.penumbraM, unit),
      more: `thrown from ${smallLabel(0.05, unit)} off the skin`,
    },
  ]
}

/**
 * The readings that the screen keeps under titles, in words for paper: ambient, the glow on the wall, lens and frame,
 * pops and recycling, what carries the lights. Groups with nothing to say are left out.
 */
export function sheetGroups(input: SheetGroupsInput): SheetGroup[] {
  const { glow } = input.reading
  const groups: SheetGroup[] = [
    { title: 'Ambient', lines: ambientLines(input) },
    { title: 'Glow on the wall', lines: glow ? glowLines(input, glow) : [] },
    { title: 'Lens and frame', lines: lensLines(input) },
    { title: 'Pops and recycling', lines: supplyLines(input) },
    { title: 'Stands, booms and mains', lines: carryLines(input) },
  ]
  return groups.filter(({ lines }) => lines.length > 0)
}
