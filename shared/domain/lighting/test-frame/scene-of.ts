import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { guessedAppearance, reflectedRgb, seedOf, skinRgb } from '../appearance.ts'
import { type Orientation, viewOf } from '../frame.ts'
import { distanceBetween, facePoint } from '../geometry.ts'
import { arrivalAt, faceOf } from '../light-output.ts'
import { zoomTableOf } from '../light-source.ts'
import type { Appearance, Light, Point, SitterPlace } from '../schema.ts'
import type { Emitter, Figure, Scene } from './scene.ts'

/** What a setup alone does not know of its sitters. */
export type Wearing = {
  /** Colour of the first garment of the look somebody wears at a place, `#rrggbb`; null: no look, no colour. */
  garmentColour: (place: SitterPlace) => string | null
}

const RAD = Math.PI / 180
/** Worn by somebody of whom no garment is known. */
const PLAIN_GARMENT = '#5b6470'
/** Boards of an old house (invented); a room of 6 × 5 × 3 m whose mean reflectance is 0.3 (assumption). */
const FLOOR_COLOUR = '#5a4636'
const ROOM_M = { width: 6, depth: 5, ceiling: 3 }
const ROOM_REFLECTANCE = 0.3
/** Far enough that a face counts as a point: where its intensity is read, metres. */
const FAR_M = 40

function emitterOf(light: Light): Emitter {
  const { widthM, heightM } = faceOf(light)
  const shape = light.modifier?.numbers.shape
  const length = Math.max(0.01, distanceBetween(light.at, light.aim))
  const along = (axis: 0 | 1 | 2) => light.at[axis] + ((light.aim[axis] - light.at[axis]) * FAR_M) / length
  const far: Point = [along(0), along(1), along(2)]
  // At full power without gels: power and gels only weigh the layer. One second of a lamp.
  const arrival = arrivalAt({ ...light, power: 1, gels: [], isOn: true }, far, 100)
  return {
    id: light.id,
    at: light.at,
    aim: light.aim,
    shape: shape === 'lantern' ? 'ball' : shape === 'softbox' || shape === 'strip' ? 'rectangle' : 'disc',
    widthM,
    heightM,
    axisIntensity: (arrival.exposureLxS * FAR_M ** 2) / Math.max(1e-9, arrival.beamShare * arrival.discShare),
    beamDeg: light.modifier?.numbers.beamDeg?.value ?? null,
    zoomMm: zoomTableOf(light.unit.numbers).length > 0 ? light.zoomMm : null,
    isBare: light.modifier === null,
  }
}

function figureOf(place: SitterPlace, wearing: Wearing): Figure {
  const look: Appearance = place.appearance ?? guessedAppearance(place)
  return {
    eyes: [place.at[0], place.eyeHeightM, place.at[1]],
    pose: place.pose,
    turn: place.turnDeg * RAD,
    headTurn: place.headTurnDeg * RAD,
    headNod: place.headNodDeg * RAD,
    skin: skinRgb(look.skinItaDeg),
    hair: look.hair,
    hairColour: reflectedRgb(look.hairColour),
    cut: look.cut,
    garment: reflectedRgb(look.garmentColour ?? wearing.garmentColour(place) ?? PLAIN_GARMENT),
    seed: look.face ?? seedOf(place.sitterId ?? place.id),
  }
}

/** The scene of a setup's test frame, framed as its shots are. */
export function sceneOf(whole: WholeSetup, orientation: Orientation, wearing: Wearing): Scene {
  const { setup, places, props } = whole
  const { camera, background, walled } = setup
  const room = walled
    ? { width: walled.leftM + walled.rightM, depth: walled.frontM - background.zM, ceiling: walled.ceilingM }
    : ROOM_M
  return {
    view: viewOf(whole, orientation),
    lens: {
      openingM: camera.focalMm / camera.fNumber / 1000,
      focusM: Math.max(0.2, distanceBetween(camera.at, facePoint(whole))),
    },
    background: {
      zM: background.zM,
      widthM: background.widthM,
      heightM: background.heightM,
      colour: reflectedRgb(background.colour),
      surface: background.surface,
    },
    floor: reflectedRgb(FLOOR_COLOUR),
    figures: places.map((place) => figureOf(place, wearing)),
    props: props
      .filter((prop) => prop.kind === 'prop')
      .map((prop) => ({
        shape: prop.shape,
        at: prop.at,
        turn: prop.turnDeg * RAD,
        widthM: prop.widthM,
        heightM: prop.heightM,
        colour: reflectedRgb(prop.colour),
        seed: seedOf(prop.id),
      })),
    sheets: props
      .filter((prop) => prop.kind !== 'prop')
      .map((prop) => ({
        at: prop.at,
        turn: prop.turnDeg * RAD,
        widthM: prop.widthM,
        heightM: prop.heightM,
        colour: reflectedRgb(prop.kind === 'flag' ? '#1a1918' : prop.colour),
      })),
    emitters: whole.lights.map(emitterOf),
    room: {
      areaM2: Math.max(20, 2 * (room.width * room.depth + room.width * room.ceiling + room.depth * room.ceiling)),
      reflectance: ROOM_REFLECTANCE,
    },
    seed: seedOf(setup.id),
  }
}
