import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { ambientExposure, combineFNumbers, fNumberOfExposure } from './exposure.ts'
import { shifted, stackGels } from './gel.ts'
import { distanceBetween, facePoint, floorDistance, mainPlace } from './geometry.ts'
import { type Depth, depthOfField } from './lens.ts'
import { type Arrival, arrivalAt, axisOnWall, faceOf, incidenceShare } from './light-output.ts'
import { ownColourK } from './light-source.ts'
import { panelReading } from './panel.ts'
import { mainToFill, ratioOfStops } from './ratio.ts'
import { apparentSizeDeg, elevationDeg, penumbraM } from './softness.ts'
import type { Light, LightPurpose, Point } from './schema.ts'
import { stopsBetween } from './stops.ts'

export type LightReading = Arrival & {
  lightId: string
  purpose: LightPurpose
  /** Where it is read: at the sitter's eyes, or on the wall where a background light's axis meets it. */
  where: 'sitter' | 'wall'
  /** Stops under all mains together at the sitter; negative is over. Null without a main. */
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

export type MainReading = {
  elevationDeg: number
  apparentSizeDeg: number
  /** Soft edge of a shadow thrown from five centimetres, metres. */
  penumbraM: number
}

export type WallReading = {
  point: Point
  /** Stops of the mains' spill behind the sitter under the mains at the sitter; null without spill. */
  mainUnderStops: number | null
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
  ratio: Ratio | null
  /** Main, fill, panels and ambient together: what a meter at the face shows towards the camera. */
  totalFNumber: number
  main: MainReading | null
  wall: WallReading
  cameraToSitterM: number
  sitterToWallM: number
  depth: Depth
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
  const { iso } = whole.setup.camera
  const spill = whole.lights
    .filter((light) => light.purpose === 'main')
    .map((light) => arrivalAt(light, point, iso).exposureLxS * incidenceShare(light, point, [0, 0, 1]))
    .reduce((sum, exposure) => sum + exposure, 0)
  const spillFNumber = fNumberOfExposure(spill, iso)
  const onWall = read.filter((reading) => reading.where === 'wall')
  const brightest = onWall.reduce<LightReading | null>(
    (best, next) => (best && best.fNumber >= next.fNumber ? best : next),
    null,
  )
  return {
    point,
    mainUnderStops: mainFNumber === null || spillFNumber < 1e-3 ? null : stopsBetween(mainFNumber, spillFNumber),
    lightUnderStops:
      mainFNumber === null || !brightest || brightest.fNumber <= 0
        ? null
        : stopsBetween(mainFNumber, brightest.fNumber),
    colourK: brightest?.colourK ?? null,
    beyondBlue: brightest !== null && brightest.colourK === null,
  }
}

/** A background light is read on the wall where its axis meets it, with the cosine; everything else at the face. */
function readLight(light: Light, whole: WholeSetup, face: Point): Omit<LightReading, 'underMainStops'> {
  const { iso } = whole.setup.camera
  const target = light.purpose === 'background' ? axisOnWall(light, whole.setup.background.zM) : null
  const arrival = arrivalAt(light, target ?? face, iso)
  const share = target ? incidenceShare(light, target, [0, 0, 1]) : 1
  const exposureLxS = arrival.exposureLxS * share
  return {
    ...arrival,
    exposureLxS,
    fNumber: fNumberOfExposure(exposureLxS, iso),
    lightId: light.id,
    purpose: light.purpose,
    where: target ? 'wall' : 'sitter',
    colourK: shifted(ownColourK(light.unit.numbers), stackGels(light.gels.map((gel) => gel.numbers)).miredShift),
  }
}

function readMain(whole: WholeSetup, face: Point): MainReading | null {
  const main = whole.lights.find((light) => light.purpose === 'main')
  if (!main) return null
  const { widthM, heightM } = faceOf(main)
  const distanceM = Math.max(0.05, distanceBetween(main.at, face))
  return {
    elevationDeg: elevationDeg(main.at[1] - face[1], floorDistance(main.at, face)),
    apparentSizeDeg: apparentSizeDeg(Math.max(widthM, heightM), distanceM),
    penumbraM: penumbraM(Math.max(widthM, heightM), distanceM, 0.05),
  }
}

/**
 * Everything the numbers of a setup say, at the eyes of the sitter on the origin: readings as f-numbers at the
 * camera's ISO (incident, C = 250), metered towards each light; ratio; what the main spills on the wall; height and
 * softness of the main; depth of field. Lights add linearly. Ambient and panels count as fill. Losses, beams and guide
 * numbers are as good as their sources in the kit.
 */
export function readSetup(whole: WholeSetup): SetupReading {
  const { camera, background, ambientLux } = whole.setup
  const face = facePoint(whole)
  const raw = whole.lights.map((light) => readLight(light, whole, face))
  const of = (purpose: LightPurpose) =>
    raw.filter((reading) => reading.purpose === purpose && reading.where === 'sitter').map((reading) => reading.fNumber)
  const mains = of('main')
  const mainFNumber = mains.length === 0 ? null : combineFNumbers(mains)
  const under = (fNumber: number) =>
    mainFNumber === null || fNumber <= 0 || mainFNumber <= 0 ? null : stopsBetween(mainFNumber, fNumber)
  const lights = raw.map((reading) => ({ ...reading, underMainStops: under(reading.fNumber) }))
  const panels = whole.props
    .filter((prop) => prop.kind === 'panel')
    .map((prop) => {
      const fNumber = panelReading(prop, whole.lights, face, camera.iso)
      return {
        propId: prop.id,
        name: prop.name,
        distanceM: distanceBetween(prop.at, face),
        fNumber,
        underMainStops: under(fNumber),
      }
    })
  const ambientFNumber =
    ambientLux === null ? null : fNumberOfExposure(ambientExposure(ambientLux, camera.shutterS), camera.iso)
  const fillFNumber = combineFNumbers([...of('fill'), ...panels.map((panel) => panel.fNumber), ambientFNumber ?? 0])
  const ratioStops =
    mainFNumber === null || fillFNumber <= 0 || mainFNumber <= 0 ? null : stopsBetween(mainFNumber, fillFNumber)
  const cameraToSitterM = distanceBetween(camera.at, face)
  return {
    iso: camera.iso,
    face,
    lights,
    panels,
    mainFNumber,
    ambientFNumber,
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
  }
}
