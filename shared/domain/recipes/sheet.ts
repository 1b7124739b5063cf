import { wallTargetOf } from '#shared/domain/lighting/at-sitter.ts'
import { type Caution, cautionsOf } from '#shared/domain/lighting/cautions.ts'
import { kelvinLabel } from '#shared/domain/lighting/gel.ts'
import { distanceBetween, facePoint, minus } from '#shared/domain/lighting/geometry.ts'
import { kitListOf } from '#shared/domain/lighting/kit-list.ts'
import { ratioLabel } from '#shared/domain/lighting/ratio.ts'
import { type LightReading, type SetupReading, readSetup } from '#shared/domain/lighting/readings.ts'
import type { Light, Point } from '#shared/domain/lighting/schema.ts'
import type { SetupUse } from '#shared/domain/lighting/setup-use.ts'
import { shutterLabel } from '#shared/domain/lighting/stops.ts'
import { fNumberLabel, inSentence, powerLabel, purposeWord, stopsLabel } from '#shared/domain/lighting/words.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { type LengthUnit, lengthLabel } from '#shared/units/length.ts'
import { type SheetGroup, type SheetLine, sheetGroups, shadowLine, sitterName } from './sheet-groups.ts'

/** A light as a row of the sheet, all in words. */
export type SheetLight = {
  id: string
  group: string | null
  /** "Main", and "Rim 2" where there are several. */
  name: string
  unit: string
  /** Modifier and gels, "bare" without any. */
  made: string
  support: string
  power: string
  zoom: string
  /** From the sitter's mark on the floor. */
  place: string
  height: string
  distance: string
  /** Round the sitter from the camera's axis, and above or below the eyes. */
  angle: string
  aim: string
  reads: string
  /** Stops against the main; empty without one. */
  againstMain: string
  note: string
}

/** What a recipe sheet says, in words; whoever prints it draws the plan and the side. */
export type Sheet = {
  lights: SheetLight[]
  panels: SheetLine[]
  readings: SheetLine[]
  /** What else there is to read, under headings. */
  groups: SheetGroup[]
  camera: SheetLine[]
  /** Counted: what to bring. */
  kit: { count: number; name: string }[]
  /** What cannot be worked out stands first, as what is to be put right. */
  cautions: Pick<Caution, 'key' | 'tone' | 'title' | 'words'>[]
}

/** Who decides, where a caution can only warn. */
export const SHEET_DEFERS =
  'These are reminders, not a check of safety. The makers’ limits of stands, booms and heads, the venue’s rules and local law on electricity, labour and children decide; what is rigged overhead or wired is for licensed riggers and electricians.'

/** Nearer than this to a point a light looks at it, metres. */
const AT_POINT_M = 0.15

/** "45° camera left", "straight behind", "overhead": round the sitter from the camera's axis, on the floor. */
export function axisAngleWords(at: Point, whole: WholeSetup): string {
  const face = facePoint(whole)
  const [x, , z] = minus(at, face)
  if (Math.hypot(x, z) < AT_POINT_M) return 'overhead'
  const [cameraX, , cameraZ] = minus(whole.setup.camera.at, face)
  const turn = ((Math.atan2(x, z) - Math.atan2(cameraX, cameraZ)) * 180) / Math.PI
  const deg = Math.round(turn - 360 * Math.round(turn / 360))
  if (deg === 0) return 'on the camera’s axis'
  if (Math.abs(deg) === 180) return 'straight behind'
  return `${Math.abs(deg)}° camera ${deg < 0 ? 'left' : 'right'}`
}

/** "1.2 m left, 1.0 m to the camera" of the sitter's mark. */
export function floorWords(at: Point, unit: LengthUnit): string {
  const [x, , z] = at
  const label = (metres: number) => lengthLabel(Math.abs(metres), unit, true)
  const parts: string[] = []
  if (Math.abs(x) >= 0.02) parts.push(`${label(x)} ${x < 0 ? 'left' : 'right'}`)
  if (Math.abs(z) >= 0.02) parts.push(`${label(z)} ${z > 0 ? 'to the camera' : 'behind'}`)
  return parts.length === 0 ? 'on the mark' : parts.join(', ')
}

function aimPlace(light: Light, whole: WholeSetup, unit: LengthUnit): string {
  const face = facePoint(whole)
  if (distanceBetween(light.aim, face) < AT_POINT_M) return 'at the eyes'
  const wall = wallTargetOf(light, whole.setup.background)
  if (!wall) return `${floorWords(light.aim, unit)}, ${lengthLabel(light.aim[1], unit, true)} up`
  const [x, y] = wall
  const side = Math.abs(x) < 0.02 ? '' : `, ${lengthLabel(Math.abs(x), unit, true)} ${x < 0 ? 'left' : 'right'}`
  return `on the wall, ${lengthLabel(y, unit, true)} up${side}`
}

/** Names of the lights in their order: their purpose, counted where several share it. */
export function lightNames(lights: readonly Light[]): string[] {
  const many = new Map<string, number>()
  for (const light of lights) many.set(light.purpose, (many.get(light.purpose) ?? 0) + 1)
  const seen = new Map<string, number>()
  return lights.map((light) => {
    const number = (seen.get(light.purpose) ?? 0) + 1
    seen.set(light.purpose, number)
    return (many.get(light.purpose) ?? 1) > 1 ? `${purposeWord(light.purpose)} ${number}` : purposeWord(light.purpose)
  })
}

function lightRow(light: Light, name: string, own: LightReading | undefined, whole: WholeSetup, unit: LengthUnit) {
  const face = facePoint(whole)
  const [dx, dy, dz] = minus(light.at, face)
  const rise = Math.round((Math.atan2(dy, Math.hypot(dx, dz)) * 180) / Math.PI)
  const tilt = rise === 0 ? 'level with the eyes' : `${Math.abs(rise)}° ${rise > 0 ? 'above' : 'below'} the eyes`
  const made = [light.modifier, ...light.gels].flatMap((part) => (part ? [inSentence(part.name)] : []))
  const row: SheetLight = {
    id: light.id,
    group: light.group,
    name,
    unit: light.unit.name,
    made: made.length === 0 ? 'bare' : made.join(', '),
    support: light.support?.name ?? 'no support named',
    power: light.isOn ? powerLabel(light.power) : 'off',
    zoom: light.zoomMm === null ? '' : `${light.zoomMm} mm zoom`,
    place: floorWords(light.at, unit),
    height: `${lengthLabel(light.at[1], unit, true)} up`,
    distance: own
      ? `${lengthLabel(own.distanceM, unit)} ${own.where === 'wall' ? 'to the wall' : 'to the eyes'}`
      : `${lengthLabel(distanceBetween(light.at, face), unit)} to the eyes`,
    angle: `${axisAngleWords(light.at, whole)}, ${tilt}`,
    aim: aimPlace(light, whole, unit),
    reads: own ? `${fNumberLabel(own.fNumber)}${own.where === 'wall' ? ' on the wall' : ''}` : '',
    againstMain: own && own.underMainStops !== null ? stopsLabel(-own.underMainStops) : '',
    note: light.note.trim(),
  }
  return row
}

function readingLines(whole: WholeSetup, reading: SetupReading, unit: LengthUnit): SheetLine[] {
  const { ratio, wall, main } = reading
  const lines: SheetLine[] = []
  const add = (label: string, value: string, more = '') => lines.push({ label, value, more })
  if (ratio)
    add(
      'Main + fill : fill',
      ratioLabel(ratio.value),
      `main : fill ${ratioLabel(ratio.mainToFill)}; panels and ambient count as fill`,
    )
  if (reading.totalFNumber > 0)
    add('At the face', fNumberLabel(reading.totalFNumber), `incident, ISO ${reading.iso}; a meter decides`)
  if (reading.mainFNumber !== null) add('Main alone', fNumberLabel(reading.mainFNumber))
  add(
    'Ambient',
    reading.ambientFNumber === null ? 'not measured' : fNumberLabel(reading.ambientFNumber),
    whole.setup.ambientLux === null ? 'left out of the numbers' : `${Math.round(whole.setup.ambientLux)} lux`,
  )
  if (wall.mainUnderStops !== null)
    add('Main on the wall', stopsLabel(-wall.mainUnderStops), 'stops against the main at the sitter')
  if (wall.lightUnderStops !== null)
    add('Background light on the wall', stopsLabel(-wall.lightUnderStops), 'stops against the main at the sitter')
  if (wall.colourK !== null || wall.beyondBlue)
    add(
      'Wall light',
      wall.colourK === null ? 'deep blue' : kelvinLabel(wall.colourK),
      `white balance ${whole.setup.camera.whiteBalanceK} K`,
    )
  if (main) {
    const deg = Math.round(main.elevationDeg)
    const rise = lengthLabel(Math.abs(main.aboveEyesM), unit, true)
    add(
      'Main and the eye line',
      `${Math.abs(deg)}° ${deg < 0 ? 'below' : 'above'}`,
      `its middle is ${rise} ${main.aboveEyesM < 0 ? 'lower' : 'higher'} than the eyes`,
    )
    add('Softness', `${Math.round(main.apparentSizeDeg)}°`, 'the main, seen from the skin')
  }
  return [...lines, ...shadowLine({ reading, unit })]
}

function cameraLines(whole: WholeSetup, reading: SetupReading, unit: LengthUnit): SheetLine[] {
  const { camera, background, walled, circuit } = whole.setup
  const length = (metres: number) => lengthLabel(metres, unit, true)
  const lines: SheetLine[] = [
    {
      label: 'Camera',
      value: `${camera.focalMm} mm · ${fNumberLabel(camera.fNumber)} · ${shutterLabel(camera.shutterS)} · ISO ${camera.iso} · ${camera.whiteBalanceK} K`,
      more: `${floorWords(camera.at, unit)}, ${length(camera.at[1])} up; ${length(reading.cameraToSitterM)} to the eyes`,
    },
    {
      label: 'Background',
      value: background.what === '' ? background.surface : background.what,
      more: `${length(background.widthM)} × ${length(background.heightM)}, ${background.colour}, ${length(-background.zM)} behind the sitter’s mark`,
    },
  ]
  whole.places.forEach((place) => {
    lines.push({
      label: sitterName(whole, place.id),
      value: place.pose,
      more: [
        floorWords([place.at[0], 0, place.at[1]], unit),
        `eyes ${length(place.eyeHeightM)} up`,
        ...(place.turnDeg === 0
          ? []
          : [`turned ${Math.round(Math.abs(place.turnDeg))}° to camera ${place.turnDeg < 0 ? 'left' : 'right'}`]),
      ].join(', '),
    })
  })
  for (const prop of whole.props) {
    lines.push({
      label: prop.name,
      value: prop.kind === 'prop' ? 'part of the set' : prop.kind,
      more: `${length(prop.widthM)} × ${length(prop.heightM)}; ${floorWords(prop.at, unit)}, middle ${length(prop.at[1])} up${prop.turnDeg === 0 ? '' : `, turned ${Math.round(prop.turnDeg)}°`}`,
    })
  }
  if (walled)
    lines.push({
      label: 'Room',
      value: `ceiling ${length(walled.ceilingM)}`,
      more: `walls ${length(walled.leftM)} left, ${length(walled.rightM)} right, ${length(walled.frontM)} to the camera’s side of the mark`,
    })
  if (circuit)
    lines.push({
      label: 'Mains circuit',
      value: `${circuit.volts} V, ${circuit.amps} A`,
      more: 'shared by what is plugged in',
    })
  return lines
}

/** The words of a setup's recipe sheet: the same numbers that the screen shows, lengths in the wanted unit. */
export function sheetOf(whole: WholeSetup, use: Pick<SetupUse, 'orientations' | 'frames'>, unit: LengthUnit): Sheet {
  const asked = { orientations: use.orientations, frames: use.frames, unit }
  const reading = readSetup(whole, asked)
  const names = lightNames(whole.lights)
  return {
    lights: whole.lights.map((light, index) =>
      lightRow(
        light,
        names[index] ?? '',
        reading.lights.find((own) => own.lightId === light.id),
        whole,
        unit,
      ),
    ),
    panels: reading.panels
      .filter((panel) => panel.fNumber > 0)
      .map((panel) => ({
        label: panel.name,
        value: fNumberLabel(panel.fNumber),
        more: [
          `${lengthLabel(panel.distanceM, unit)} to the eyes`,
          ...(panel.underMainStops === null ? [] : [`${stopsLabel(-panel.underMainStops)} stops against the main`]),
        ].join(', '),
      })),
    readings: readingLines(whole, reading, unit),
    groups: sheetGroups({ whole, reading, use, unit, names }),
    camera: cameraLines(whole, reading, unit),
    kit: kitListOf([whole]).map(({ count, name }) => ({ count, name })),
    cautions: [
      ...reading.problems.map((problem) => ({
        key: `${problem.lightId}:${problem.key}`,
        tone: 'red' as const,
        title: names[whole.lights.findIndex((light) => light.id === problem.lightId)] ?? 'Light',
        words: problem.words,
      })),
      ...cautionsOf(whole, asked, reading).map(({ key, tone, title, words }) => ({ key, tone, title, words })),
    ],
  }
}
