import { faceFormOf } from '#shared/domain/kit/face-form.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { guessedAppearance, reflectedRgb, seedOf, skinRgb } from '../appearance.ts'
import { type Orientation, viewOf } from '../frame.ts'
import { distanceBetween, facePoint } from '../geometry.ts'
import { beamOf, emissionOf, faceOf, isAllRound } from '../light-output.ts'
import type { Appearance, Light, SitterPlace } from '../schema.ts'
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

function emitterOf(light: Light): Emitter {
  const { widthM, heightM } = faceOf(light)
  return {
    id: light.id,
    at: light.at,
    aim: light.aim,
    shape: isAllRound(light) ? 'ball' : faceFormOf(light.modifier?.numbers.shape ?? 'bare'),
    widthM,
    heightM,
    // Power, gels and the switch only weigh the layer; a lamp burns for a second.
    axisIntensity: emissionOf({ ...light, power: 1, gels: [], isOn: true }).axisLxS,
    beam: beamOf(light),
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

/** More of anything than a shoot has is left out: a picture has to come to an end, whatever a document holds. */
const MOST = { figures: 16, props: 40, sheets: 20, emitters: 32 }

/** The scene of a setup's test frame, framed as its shots are. */
export function sceneOf(whole: WholeSetup, orientation: Orientation, wearing: Wearing): Scene {
  const { setup, places, props } = whole
  const { camera, background, walled } = setup
  const room = walled
    ? { width: walled.leftM + walled.rightM, depth: walled.frontM - background.zM, ceiling: walled.ceilingM }
    : ROOM_M
  const set = props.filter((prop) => prop.kind === 'prop')
  const upright = props.filter((prop) => prop.kind !== 'prop')
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
    figures: places.slice(0, MOST.figures).map((place) => figureOf(place, wearing)),
    props: set.slice(0, MOST.props).map((prop) => ({
      shape: prop.shape,
      at: prop.at,
      turn: prop.turnDeg * RAD,
      widthM: prop.widthM,
      heightM: prop.heightM,
      colour: reflectedRgb(prop.colour),
      seed: seedOf(prop.id),
    })),
    sheets: upright.slice(0, MOST.sheets).map((prop) => ({
      at: prop.at,
      turn: prop.turnDeg * RAD,
      widthM: prop.widthM,
      heightM: prop.heightM,
      colour: reflectedRgb(prop.kind === 'flag' ? '#1a1918' : prop.colour),
    })),
    emitters: whole.lights.slice(0, MOST.emitters).map(emitterOf),
    room: {
      areaM2: Math.max(20, 2 * (room.width * room.depth + room.width * room.ceiling + room.depth * room.ceiling)),
      reflectance: ROOM_REFLECTANCE,
    },
    seed: seedOf(setup.id),
  }
}
