import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import type { LengthUnit } from '#shared/units/length.ts'
import { type ReadArrival, isBehindBackground, mainFNumberOf, readArrivalOf } from './at-sitter.ts'
import { type BoomBalance, boomBalanceOf } from './boom.ts'
import { ambientExposure, combineFNumbers, fNumberOfExposure } from './exposure.ts'
import type { Orientation } from './frame.ts'
import { type Framing, framingOf } from './framing.ts'
import { miredOf, shifted, stackGels } from './gel.ts'
import { distanceBetween, facePoint, floorDistance, mainPlace } from './geometry.ts'
import { type Depth, depthOfField } from './lens.ts'
import { NEAREST_M, arrivalAt, faceOf, incidenceShare } from './light-output.ts'
import { ownColourK } from './light-source.ts'
import { type MainsLoad, mainsLoadOf } from './mains.ts'
import { panelReading } from './panel.ts'
import { type Supply, suppliesOf } from './power.ts'
import { type Problem, problemsOf } from './problems.ts'
import { mainToFill, ratioOfStops } from './ratio.ts'
import { apparentSizeDeg, elevationDeg, penumbraM } from './softness.ts'
import { type Light, type LightPurpose, type Point, isLamp } from './schema.ts'
import { stopsBetween } from './stops.ts'
import { type Sync, syncOf } from './sync.ts'
import { type Glow, glowOf } from './wall.ts'

export type LightReading = ReadArrival & {
  lightId: string
  purpose: LightPurpose
  /** Off: it reads 0. */
  isOn: boolean
  isLamp: boolean
  /** Stops under all mains together at the sitter; negative is over. Null without a main, or when it gives nothing. */
  underMainStops: number | null
  /** Colour of its light behind its gels, kelvin; null when it is bluer than any colour temperature. */
  colourK: number | null
}

export type PanelReading = {
  propId: string
  name: string
  distanceM: number
  fNumber: number
  underMainStops: number | null
}

export type Ratio = {
  /** Stops of the mains over all fill. */
  stops: number
  /** (main + fill) : fill. */
  value: number
  /** main : fill. */
  mainToFill: number
  fillFNumber: number
}

export type AmbientReading = {
  fNumber: number
  /** Stops under all flash at the sitter (mains, fills, panels); negative is over. Null without flash there. */
  underFlashStops: number | null
  kelvin: number
  /** Its colour is not known: the camera's white balance is taken. */
  isKelvinAssumed: boolean
  /** Against the camera's white balance: positive is warmer. */
  miredFromWhite: number
}

export type MainReading = {
  lightId: string
  /** Of the middle of its face above the eyes, metres. */
  aboveEyesM: number
  elevationDeg: number
  apparentSizeDeg: number
  /** Soft edge of a shadow thrown from five centimetres, metres. */
  penumbraM: number
}

export type WallReading = {
  point: Point
  /** Stops of the mains' spill behind the sitter under the mains at the sitter; null without spill. */
  mainUnderStops: number | null
  /** The main that spills most on that point: its angle off axis, and the cosine at which it meets the wall. */
  main: { lightId: string; offAxisDeg: number; cosine: number; distanceM: number } | null
  /** Brightest background light on the wall, stops under the mains; null without one. */
  lightUnderStops: number | null
  /** Colour of that light, kelvin; null without one, or where there is no colour temperature. */
  colourK: number | null
  beyondBlue: boolean
}

export type SetupReading = {
  iso: number
  face: Point
  lights: LightReading[]
  panels: PanelReading[]
  /** All mains together at the sitter; null without a main. */
  mainFNumber: number | null
  ambientFNumber: number | null
  ambient: AmbientReading | null
  ratio: Ratio | null
  /** Main, fill, panels and ambient together: what a meter at the face shows towards the camera. */
  totalFNumber: number
  main: MainReading | null
  wall: WallReading
  cameraToSitterM: number
  sitterToWallM: number
  depth: Depth
  /** Null: the camera sees no lit wall. */
  glow: Glow | null
  /** One for each orientation asked for. */
  framing: Framing[]
  /** Of each flash that is on. */
  supplies: Supply[]
  sync: Sync | null
  booms: (BoomBalance & { lightId: string })[]
  mains: MainsLoad | null
  problems: Problem[]
}

export type ReadingOptions = {
  /** Orientations of the shots that use the setup; the first one frames the glow. */
  orientations: readonly Orientation[]
  /** Frames of all shots that use the setup; null: no shot. */
  frames: number | null
  /** What the words of glow, framing and problems say lengths in. */
  unit: LengthUnit
}

/** What stands behind the sitter's head on the camera's line: where the wall is read. */
function wallPoint(whole: WholeSetup, face: Point): Point {
  const { camera, background } = whole.setup
  const run = camera.at[2] - face[2]
  if (Math.abs(run) < 1e-6) return [face[0], face[1], background.zM]
  const share = (camera.at[2] - background.zM) / run
  return [
    camera.at[0] + (face[0] - camera.at[0]) * share,
    camera.at[1] + (face[1] - camera.at[1]) * share,
    background.zM,
  ]
}

function readWall(
  whole: WholeSetup,
  face: Point,
  mainFNumber: number | null,
  read: readonly LightReading[],
): WallReading {
  const point = wallPoint(whole, face)
  const { iso, shutterS } = whole.setup.camera
  const spills = whole.lights
    .filter((light) => light.purpose === 'main')
    .map((light) => {
      const { exposureLxS, offAxisDeg, distanceM } = arrivalAt(light, point, iso, shutterS)
      const cosine = incidenceShare(light, point, [0, 0, 1])
      return { lightId: light.id, offAxisDeg, cosine, distanceM, exposureLxS: exposureLxS * cosine }
    })
    .sort((a, b) => b.exposureLxS - a.exposureLxS)
  const spillFNumber = fNumberOfExposure(
    spills.reduce((sum, spill) => sum + spill.exposureLxS, 0),
    iso,
  )
  const [most] = spills
  const onWall = read.filter((reading) => reading.where === 'wall')
  const brightest = onWall.reduce<LightReading | null>(
    (best, next) => (best && best.fNumber >= next.fNumber ? best : next),
    null,
  )
  return {
    point,
    mainUnderStops: mainFNumber === null || spillFNumber < 1e-3 ? null : stopsBetween(mainFNumber, spillFNumber),
    main:
      most && most.exposureLxS > 0
        ? { lightId: most.lightId, offAxisDeg: most.offAxisDeg, cosine: most.cosine, distanceM: most.distanceM }
        : null,
    lightUnderStops:
      mainFNumber === null || !brightest || brightest.fNumber <= 0
        ? null
        : stopsBetween(mainFNumber, brightest.fNumber),
    colourK: brightest?.colourK ?? null,
    beyondBlue: brightest !== null && brightest.colourK === null,
  }
}

function readLight(light: Light, whole: WholeSetup): Omit<LightReading, 'underMainStops'> {
  return {
    ...readArrivalOf(light, whole),
    lightId: light.id,
    purpose: light.purpose,
    isOn: light.isOn,
    isLamp: isLamp(light.unit.numbers),
    colourK: shifted(ownColourK(light.unit.numbers), stackGels(light.gels.map((gel) => gel.numbers)).miredShift),
  }
}

/** The first main that is on; when all are off, the first. */
function firstMain(whole: WholeSetup): Light | undefined {
  const mains = whole.lights.filter((light) => light.purpose === 'main')
  return mains.find((light) => light.isOn) ?? mains[0]
}

function readMain(whole: WholeSetup, face: Point): MainReading | null {
  const main = firstMain(whole)
  if (!main) return null
  const { widthM, heightM } = faceOf(main)
  const distanceM = Math.max(NEAREST_M, distanceBetween(main.at, face))
  return {
    lightId: main.id,
    aboveEyesM: main.at[1] - face[1],
    elevationDeg: elevationDeg(main.at[1] - face[1], floorDistance(main.at, face)),
    apparentSizeDeg: apparentSizeDeg(Math.max(widthM, heightM), distanceM),
    penumbraM: penumbraM(Math.max(widthM, heightM), distanceM, 0.05),
  }
}

function readAmbient(whole: WholeSetup, flashFNumber: number): AmbientReading | null {
  const { camera, ambientLux, ambientK } = whole.setup
  if (ambientLux === null) return null
  const fNumber = fNumberOfExposure(ambientExposure(ambientLux, camera.shutterS), camera.iso)
  const kelvin = ambientK ?? camera.whiteBalanceK
  return {
    fNumber,
    underFlashStops: flashFNumber > 0 && fNumber > 0 ? stopsBetween(flashFNumber, fNumber) : null,
    kelvin,
    isKelvinAssumed: ambientK === null,
    miredFromWhite: miredOf(kelvin) - miredOf(camera.whiteBalanceK),
  }
}

/** All flash at the eyes, mains and fills with what panels give back of it; lamps are left out. */
function flashFNumberOf(whole: WholeSetup, read: readonly Omit<LightReading, 'underMainStops'>[]): number {
  const { camera, background } = whole.setup
  const face = facePoint(whole)
  const isFlash = (reading: (typeof read)[number]) =>
    !reading.isLamp && reading.where === 'sitter' && (reading.purpose === 'main' || reading.purpose === 'fill')
  const flashes = whole.lights.filter((light) => !isLamp(light.unit.numbers))
  const panels = whole.props.filter((prop) => prop.kind === 'panel')
  return combineFNumbers([
    ...read.filter(isFlash).map((reading) => reading.fNumber),
    ...panels.map((panel) => {
      const lit = flashes.filter((light) => !isBehindBackground(light, panel.at, background))
      return panelReading(panel, lit, face, camera)
    }),
  ])
}

const DEFAULTS: ReadingOptions = { orientations: ['upright'], frames: null, unit: 'm' }

/**
 * Everything the numbers of a setup say, at the eyes of the sitter on the origin: readings as f-numbers at the
 * camera's ISO (incident, C = 250), metered towards each light; ratio; ambient against flash; what the main spills on the
 * wall and the glow there; height and softness of the main; depth of field, framing; power, sync, booms, mains. Lights
 * add linearly, those that are off give nothing. Ambient and panels count as fill. What flags, bodies and props keep off
 * is left out: test frames show it. Losses, beams and guide numbers are as
 * good as their sources in the kit. What cannot be worked out is in `problems`, and reads 0.
 */
export function readSetup(whole: WholeSetup, options: Partial<ReadingOptions> = {}): SetupReading {
  const { orientations, frames, unit } = { ...DEFAULTS, ...options }
  const framed = orientations.length > 0 ? orientations : DEFAULTS.orientations
  const { camera, background } = whole.setup
  const face = facePoint(whole)
  const raw = whole.lights.map((light) => readLight(light, whole))
  const of = (purpose: LightPurpose) =>
    raw.filter((reading) => reading.purpose === purpose && reading.where === 'sitter').map((reading) => reading.fNumber)
  const mainFNumber = mainFNumberOf(whole)
  const under = (fNumber: number) => (mainFNumber === null || fNumber <= 0 ? null : stopsBetween(mainFNumber, fNumber))
  const lights = raw.map((reading) => ({ ...reading, underMainStops: under(reading.fNumber) }))
  const panels = whole.props
    .filter((prop) => prop.kind === 'panel')
    .map((prop) => {
      const lit = whole.lights.filter((light) => !isBehindBackground(light, prop.at, background))
      const fNumber = panelReading(prop, lit, face, camera)
      return {
        propId: prop.id,
        name: prop.name,
        distanceM: distanceBetween(prop.at, face),
        fNumber,
        underMainStops: under(fNumber),
      }
    })
  const ambient = readAmbient(whole, flashFNumberOf(whole, raw))
  const ambientFNumber = ambient?.fNumber ?? null
  const fillFNumber = combineFNumbers([...of('fill'), ...panels.map((panel) => panel.fNumber), ambientFNumber ?? 0])
  const ratioStops = mainFNumber === null || fillFNumber <= 0 ? null : stopsBetween(mainFNumber, fillFNumber)
  const cameraToSitterM = distanceBetween(camera.at, face)
  return {
    iso: camera.iso,
    face,
    lights,
    panels,
    mainFNumber,
    ambientFNumber,
    ambient,
    ratio:
      ratioStops === null
        ? null
        : { stops: ratioStops, value: ratioOfStops(ratioStops), mainToFill: mainToFill(ratioStops), fillFNumber },
    totalFNumber: combineFNumbers([mainFNumber ?? 0, fillFNumber]),
    main: readMain(whole, face),
    wall: readWall(whole, face, mainFNumber, lights),
    cameraToSitterM,
    sitterToWallM: (mainPlace(whole.places)?.at[1] ?? 0) - background.zM,
    depth: depthOfField(camera.focalMm, camera.fNumber, Math.max(0.1, cameraToSitterM)),
    glow: glowOf(whole, framed[0], mainFNumber, unit),
    framing: framed.map((orientation) => framingOf(whole, orientation, unit)),
    supplies: suppliesOf(whole.lights, frames),
    sync: syncOf(whole),
    booms: whole.lights.flatMap((light) => {
      const balance = boomBalanceOf(light)
      return balance ? [{ lightId: light.id, ...balance }] : []
    }),
    mains: mainsLoadOf(whole),
    problems: problemsOf(whole, unit),
  }
}
