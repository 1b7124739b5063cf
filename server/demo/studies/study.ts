import { viewAlong } from '#shared/domain/lighting/frame.ts'
import { reflectedRgb, skinRgb } from '#shared/domain/lighting/appearance.ts'
import type { Appearance, Background, Point, Prop } from '#shared/domain/lighting/schema.ts'
import { lightColour } from '#shared/domain/lighting/test-frame/light-colour.ts'
import { AMBIENT } from '#shared/domain/lighting/test-frame/render.ts'
import type { Emitter, Figure, Rgb, Scene } from '#shared/domain/lighting/test-frame/scene.ts'
import type { Weights } from '#shared/domain/lighting/test-frame/develop.ts'

/** A light of a study, by what it is to do: stops against a correct exposure where it looks. */
export type StudyLight = {
  at: Point
  aim: Point
  stops: number
  /** Face, metres; a circle when both are the same. */
  face?: readonly [widthM: number, heightM: number]
  beamDeg?: number
  /** Colour of its light against a camera at 5500 K, kelvin. */
  colourK?: number
}

export type StudyPerson = {
  who: 'astronomer' | 'clockmaker' | 'botanist'
  at: readonly [xM: number, eyesM: number, zM: number]
  cut: Appearance['cut']
  colour: string
  pose?: Figure['pose']
  turnDeg?: number
  headTurnDeg?: number
  headNodDeg?: number
}

/** A picture for the demo's wall: everything about it, so that it can be made again. */
export type Study = {
  name: string
  seed: number
  size: readonly [widthPx: number, heightPx: number]
  /** Lens on 36 × 24 mm. */
  camera: { at: Point; aim: Point; focalMm: number; fNumber: number }
  background: Pick<Background, 'zM' | 'colour' | 'surface'> & { widthM?: number }
  people?: readonly StudyPerson[]
  props?: readonly (Pick<Prop, 'shape' | 'at' | 'widthM' | 'heightM' | 'colour'> & { turnDeg?: number })[]
  panels?: readonly { at: Point; turnDeg: number; widthM: number; heightM: number }[]
  lights: readonly StudyLight[]
  /** Light that is there anyway, stops against a correct exposure. */
  ambientStops?: number
}

/** How the three sitters look; the demo's setups show the same. */
export const STUDY_LOOKS: Readonly<
  Record<StudyPerson['who'], Omit<Appearance, 'cut' | 'garmentColour' | 'face'> & { face: number }>
> = {
  astronomer: { skinItaDeg: 50, hair: 'long', hairColour: '#6a4024', face: 41 },
  clockmaker: { skinItaDeg: 8, hair: 'knot', hairColour: '#1a120d', face: 7 },
  botanist: { skinItaDeg: -40, hair: 'cropped', hairColour: '#120d0b', face: 23 },
}

const RAD = Math.PI / 180
const CAMERA_K = 5500
const FLOOR = '#5a4636'
/** A little daylight is left in most rooms, stops against a correct exposure. */
const AMBIENT_STOPS = -4.3

function viewOf({ camera, size }: Study): Scene['view'] {
  const [x, y, z] = camera.aim.map((value, axis) => value - (camera.at[axis] ?? 0))
  const length = Math.hypot(x ?? 0, y ?? 0, z ?? 0)
  const forward: Point = [(x ?? 0) / length, (y ?? 0) / length, (z ?? 0) / length]
  const [width, height] = size
  // The long side of the frame along the long side of the picture.
  const half = 18 / camera.focalMm
  const most = Math.max(width, height)
  return viewAlong(camera.at, forward, (half * width) / most, (half * height) / most)
}

function emitterOf(light: StudyLight, index: number): Emitter {
  const [widthM, heightM] = light.face ?? [0.06, 0.06]
  return {
    id: `light ${index + 1}`,
    at: light.at,
    aim: light.aim,
    shape: widthM === heightM ? 'disc' : 'rectangle',
    widthM,
    heightM,
    axisIntensity: 1,
    beam: { beamDeg: light.beamDeg ?? (widthM > 0.3 ? 105 : 60), zoomMm: null, bare: false },
  }
}

/** Exposure that one unit of intensity gives where a light looks, metered towards it: 1/(d² + r²). */
function exposureAtAim(emitter: Emitter): number {
  const d2 = emitter.aim.reduce((sum, value, axis) => sum + (value - (emitter.at[axis] ?? 0)) ** 2, 0)
  const area = emitter.widthM * emitter.heightM * (emitter.shape === 'rectangle' ? 1 : Math.PI / 4)
  return 1 / (d2 + area / Math.PI)
}

function scaled([r, g, b]: Rgb, by: number): Rgb {
  return [r * by, g * by, b * by]
}

/** The scene of a study and what its layers weigh. */
export function sceneOfStudy(study: Study): { scene: Scene; weights: Weights } {
  const emitters = study.lights.map(emitterOf)
  const focus = Math.hypot(...study.camera.aim.map((value, axis) => value - (study.camera.at[axis] ?? 0)))
  const scene: Scene = {
    view: viewOf(study),
    lens: { openingM: study.camera.focalMm / study.camera.fNumber / 1000, focusM: focus },
    background: {
      ...study.background,
      widthM: study.background.widthM ?? 9,
      heightM: 4.5,
      colour: reflectedRgb(study.background.colour),
    },
    floor: reflectedRgb(FLOOR),
    figures: (study.people ?? []).map((person) => {
      const look = STUDY_LOOKS[person.who]
      return {
        eyes: person.at,
        pose: person.pose ?? 'standing',
        turn: (person.turnDeg ?? 0) * RAD,
        headTurn: (person.headTurnDeg ?? 0) * RAD,
        headNod: (person.headNodDeg ?? 0) * RAD,
        skin: skinRgb(look.skinItaDeg),
        hair: look.hair,
        hairColour: reflectedRgb(look.hairColour),
        cut: person.cut,
        garment: reflectedRgb(person.colour),
        seed: look.face,
      }
    }),
    props: (study.props ?? []).map((prop, index) => ({
      ...prop,
      turn: (prop.turnDeg ?? 0) * RAD,
      colour: reflectedRgb(prop.colour),
      seed: study.seed + index,
    })),
    sheets: (study.panels ?? []).map((panel) => ({ ...panel, turn: panel.turnDeg * RAD, colour: [0.85, 0.85, 0.85] })),
    emitters,
    room: { areaM2: 126, reflectance: 0.3 },
    seed: study.seed,
  }
  const weights = new Map<string, Rgb>(
    study.lights.map((light, index) => {
      const emitter = emitters[index]
      const unit = emitter ? exposureAtAim(emitter) : 1
      const colour = lightColour(1e6 / (light.colourK ?? CAMERA_K), CAMERA_K)
      return [`light ${index + 1}`, scaled(colour, 2 ** light.stops / unit)]
    }),
  )
  const there = 2 ** (study.ambientStops ?? AMBIENT_STOPS)
  weights.set(AMBIENT, [there, there, there])
  return { scene, weights }
}
