import type { FaceForm } from '#shared/domain/kit/face-form.ts'
import type { PROP_SHAPES, BACKGROUND_SURFACES } from '../schema.ts'
import type { Beam } from '../beam.ts'
import type { View } from '../frame.ts'
import type { Cut, Pose } from './body.ts'
import type { HairStyle } from './head.ts'

/**
 * What a test frame is computed from: plain data, so that it can be sent to a worker and be told from another by its
 * text. Powers, gels, switches, ISO, aperture and white balance are not in it: they only weigh the layers of light.
 * Colours are linear sRGB reflectances.
 */
export type Rgb = readonly [number, number, number]
/** A place, metres. */
type Place = readonly [number, number, number]

export type Figure = {
  /** Point between the eyes, metres. */
  eyes: Place
  pose: Pose
  /** Turns of body and, on top of it, head about the upright axis, and the nod, radians. */
  turn: number
  headTurn: number
  headNod: number
  skin: Rgb
  hair: HairStyle
  hairColour: Rgb
  cut: Cut
  garment: Rgb
  seed: number
}

export type SceneProp = {
  shape: (typeof PROP_SHAPES)[number]
  at: Place
  turn: number
  widthM: number
  heightM: number
  colour: Rgb
  seed: number
}

/** A flat thing that stands by itself: gives back `colour` of what falls on it, and keeps light off what is behind. */
export type SceneSheet = { at: Place; turn: number; widthM: number; heightM: number; colour: Rgb }

export type Emitter = {
  /** Id of its light: the name of its layer. */
  id: string
  at: Place
  aim: Place
  shape: FaceForm
  widthM: number
  heightM: number
  /** Intensity on its axis at full power without gels: lx·s·m² for a flash, cd for a lamp. */
  axisIntensity: number
  beam: Beam
}

export type Scene = {
  view: View
  /** Diameter of the lens opening and the distance it is focused on, metres. */
  lens: { openingM: number; focusM: number }
  background: {
    zM: number
    widthM: number
    heightM: number
    colour: Rgb
    surface: (typeof BACKGROUND_SURFACES)[number]
  }
  floor: Rgb
  figures: readonly Figure[]
  props: readonly SceneProp[]
  sheets: readonly SceneSheet[]
  emitters: readonly Emitter[]
  /** What the room gives back: its whole surface and mean reflectance. 0: a black room. */
  room: { areaM2: number; reflectance: number }
  seed: number
}
