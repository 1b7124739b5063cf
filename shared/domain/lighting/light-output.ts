import { discRadiusM } from '#shared/domain/kit/face-form.ts'
import { findMetered } from '#shared/domain/kit/meter-reading.ts'
import { type Beam, type BeamKind, type Profile, profileOf } from './beam.ts'
import {
  METER_CONSTANT_C,
  discFactor,
  fNumberOfExposure,
  guideNumberAfterLoss,
  guideNumberAtPower,
  guideNumberAtZoom,
  luminousExposure,
} from './exposure.ts'
import { stackGels } from './gel.ts'
import { angleBetweenDeg, distanceBetween, dot, lengthOf, minus } from './geometry.ts'
import { zoomTableOf } from './light-source.ts'
import { type Light, type Point, isLamp } from './schema.ts'

/**
 * The chain from a head's guide number to what it gives on axis, step by step, for showing how a figure came about. A
 * lamp has the guide number of a flash that gives as much while the shutter is open.
 */
export type Output = {
  /** Full power at this zoom: bare, or with the modifier where that was measured. */
  fullGuideNumberM: number
  /** 0 where head and modifier were measured together. */
  modifierLossStops: number
  gelLossStops: number
  /** After power, modifier and gels. 0: it gives nothing. */
  guideNumberM: number
  /** The meter reading, in words, that takes the place of guide number and loss; null: nobody has measured it. */
  measured: string | null
  /** Of a lamp: illuminance on axis at a metre after power, modifier and gels; null: a flash. */
  luxAtMetre: number | null
}

/** More than this no number about light is (a guard, no source): beyond it squares would run out of numbers. */
const MOST = 1e9

/** Whether a number can be worked with as an amount of light: above 0 and of this world. */
export function isAmount(value: number): boolean {
  return value > 0 && value <= MOST
}

/** Whether a loss in stops can be worked with: a modifier neither takes nor gives more (a guard, no source). */
export function isLoss(stops: number): boolean {
  return Math.abs(stops) <= 30
}

/** Share of its light that a light's gels let through together; 0 where one of them lets nothing through. */
export function gelShareOf(light: Light): number {
  const gels = light.gels.map((gel) => gel.numbers)
  return gels.every((gel) => isAmount(gel.transmission.value)) ? 2 ** -stackGels(gels).lossStops : 0
}

const amount = (value: number) => (isAmount(value) ? value : 0)

/** Zoom setting of a light whose head zooms, mm; null when it does not. */
export function zoomOf(light: Light): number | null {
  return zoomTableOf(light.unit.numbers).length > 0 ? light.zoomMm : null
}

/** Guide number of a flash that gives as much as this illuminance at a metre in this time: √(E·t·100/C). */
function guideNumberOfLux(luxAtMetre: number, shutterS: number): number {
  return Math.sqrt((luxAtMetre * shutterS * 100) / METER_CONSTANT_C)
}

/**
 * What a light gives on its axis when it is on. Guide numbers in metres at ISO 100; lamps at this shutter time, seconds.
 * Numbers that cannot be worked with (no guide number, no power, a gel that lets nothing through) give 0.
 */
export function outputOf(light: Light, shutterS = 1): Output {
  const { numbers } = light.unit
  const metered = isLamp(numbers) ? undefined : findMetered(numbers, light.modifier?.kitId ?? null, zoomOf(light))
  const bare = isLamp(numbers)
    ? guideNumberOfLux(amount(numbers.luxAtMetre.value), shutterS)
    : guideNumberAtZoom(numbers, zoomOf(light))
  const fullGuideNumberM = amount(metered?.guideNumberM ?? bare)
  const loss = metered ? 0 : (light.modifier?.numbers.lossStops.value ?? 0)
  const modifierLossStops = isLoss(loss) ? loss : 0
  const gelShare = gelShareOf(light)
  const gelLossStops = gelShare > 0 ? -Math.log2(gelShare) : 0
  const power = gelShare > 0 ? amount(light.power) : 0
  const guideNumberM = guideNumberAfterLoss(
    guideNumberAtPower(fullGuideNumberM, power),
    modifierLossStops + gelLossStops,
  )
  return {
    fullGuideNumberM,
    modifierLossStops,
    gelLossStops,
    guideNumberM,
    measured: metered ? metered.source || 'measured' : null,
    luxAtMetre: isLamp(numbers) ? luminousExposure(guideNumberM, 1) / shutterS : null,
  }
}

/** Width of a bare head's window, metres (assumption). */
const BARE_HEAD_M = 0.06

/** Width and height of the emitting face, metres; a bare head's is small. */
export function faceOf(light: Light): { widthM: number; heightM: number } {
  const numbers = light.modifier?.numbers
  if (!numbers || numbers.widthM === 0 || numbers.heightM === 0) return { widthM: BARE_HEAD_M, heightM: BARE_HEAD_M }
  return { widthM: numbers.widthM, heightM: numbers.heightM }
}

/** Radius of the disc that the emitting face counts as, metres; 0 for a ball. */
export function faceRadiusM(light: Light): number {
  return discRadiusM({ shape: light.modifier?.numbers.shape ?? 'bare', ...faceOf(light) })
}

/** Nearer than this the distance counts as this, metres. */
export const NEAREST_M = 0.05

/** What arrives at a point, with every factor on the way. */
export type Arrival = Output & {
  distanceM: number
  offAxisDeg: number
  beamShare: number
  beamKind: BeamKind
  discShare: number
  /** Towards the light, lx·s; 0 when it is off. */
  exposureLxS: number
  fNumber: number
}

/** Whether a light shines to all sides: a lantern, or a bare lamp with a beam of more than 180°, such as a bulb. */
export function isAllRound({ modifier, unit }: Light): boolean {
  if (modifier) return modifier.numbers.shape === 'lantern'
  return isLamp(unit.numbers) && (unit.numbers.beamDeg?.value ?? 0) > 180
}

/** What is known of a light's beam: the modifier's angle, a bare lamp's own, or the zoom of a bare head. */
export function beamOf(light: Light): Beam {
  const { numbers } = light.unit
  const own = light.modifier ? light.modifier.numbers.beamDeg : isLamp(numbers) ? numbers.beamDeg : null
  return { beamDeg: own?.value ?? null, zoomMm: zoomOf(light), bare: light.modifier === null && !isAllRound(light) }
}

/** A light made ready to be read at many points. */
export type Emission = {
  light: Light
  output: Output
  /** Unit vector along its axis; no length where it looks at its own place. */
  axis: Point
  profile: Profile
  radiusM: number
  /** Farthest angle off its axis at which it gives light, degrees. */
  reachDeg: number
  /** Luminous exposure on axis at a metre from a point source, lx·s; 0 when it is off. */
  axisLxS: number
}

/** A light's numbers that hold at every point, lamps at this shutter time in seconds. */
export function emissionOf(light: Light, shutterS = 1): Emission {
  const output = outputOf(light, shutterS)
  const [x, y, z] = minus(light.aim, light.at)
  const length = lengthOf([x, y, z]) || 1
  return {
    light,
    output,
    axis: [x / length, y / length, z / length],
    profile: profileOf(beamOf(light)),
    radiusM: faceRadiusM(light),
    reachDeg: isAllRound(light) ? 180 : 90,
    axisLxS: light.isOn ? luminousExposure(output.guideNumberM, 1) : 0,
  }
}

const DEG_PER_RAD = 180 / Math.PI

function shareOff({ profile, reachDeg }: Emission, offAxisDeg: number): number {
  return offAxisDeg > reachDeg ? 0 : profile.shareAt(offAxisDeg)
}

/** Towards the light at a point, lx·s. `upright`: on the plane z = `z` instead, seen from greater z. Called very often. */
function strengthAt(emission: Emission, x: number, y: number, z: number, upright: boolean): number {
  const { at } = emission.light
  const dx = x - at[0]
  const dy = y - at[1]
  const dz = z - at[2]
  if (upright && dz >= 0) return 0
  const distanceM = Math.sqrt(dx * dx + dy * dy + dz * dz)
  const counted = Math.max(NEAREST_M, distanceM)
  const [ax, ay, az] = emission.axis
  const cosine = ax === 0 && ay === 0 && az === 0 ? 1 : (ax * dx + ay * dy + az * dz) / (distanceM || 1)
  const offAxisDeg = distanceM === 0 ? 0 : Math.acos(Math.min(1, Math.max(-1, cosine))) * DEG_PER_RAD
  // discFactor over the square of the distance.
  const near = counted * counted + emission.radiusM * emission.radiusM
  const strength = (emission.axisLxS * shareOff(emission, offAxisDeg)) / near
  if (!upright) return strength
  return distanceM === 0 ? 0 : (strength * -dz) / distanceM
}

/**
 * A light at a point, metered towards it, at a sensitivity: H = 2.5·GN²/d² on axis, times the beam's share off axis
 * (nothing behind the face, save of what shines to all sides), times d²/(d² + r²) for a face that counts as a disc of radius r. That is
 * exact on a disc's axis; close to a large face and far off its axis, as behind one that is turned away, more arrives.
 */
export function arrivalOf(emission: Emission, point: Point, iso: number): Arrival {
  const { light, output } = emission
  const distanceM = Math.max(NEAREST_M, distanceBetween(light.at, point))
  const offAxisDeg = angleBetweenDeg(emission.axis, minus(point, light.at))
  const exposureLxS = strengthAt(emission, point[0], point[1], point[2], false)
  return {
    ...output,
    distanceM,
    offAxisDeg,
    beamShare: shareOff(emission, offAxisDeg),
    beamKind: emission.profile.kind,
    discShare: discFactor(distanceM, emission.radiusM),
    exposureLxS,
    fNumber: fNumberOfExposure(exposureLxS, iso),
  }
}

/** `arrivalOf` for one point. A lamp counts for `shutterS` seconds. */
export function arrivalAt(light: Light, point: Point, iso: number, shutterS = 1): Arrival {
  return arrivalOf(emissionOf(light, shutterS), point, iso)
}

/** What a light gives to the upright plane z = `zM` at a point of it, lx·s: with the cosine, nothing from behind. */
export function exposureOnWall(emission: Emission, x: number, y: number, zM: number): number {
  return strengthAt(emission, x, y, zM, true)
}

/** Cosine of the angle at which a light meets a surface with this unit normal; 0 from behind. */
export function incidenceShare(light: Light, point: Point, normal: Point): number {
  const toLight = minus(light.at, point)
  const length = lengthOf(toLight)
  return length === 0 ? 0 : Math.max(0, dot(toLight, normal) / length)
}

/** Where a light's axis meets the upright plane z = `zM`; null when it does not. */
export function axisOnWall(light: Light, zM: number): Point | null {
  const direction = minus(light.aim, light.at)
  if (direction[2] >= -1e-6 || light.at[2] <= zM) return null
  const share = (zM - light.at[2]) / direction[2]
  return [light.at[0] + direction[0] * share, light.at[1] + direction[1] * share, zM]
}
