import { type Profile, profileOf } from '../beam.ts'
import { axesOf } from '../geometry.ts'
import { makeBody } from './body.ts'
import { clamp } from './field.ts'
import { makeHead, type HeadShape } from './head.ts'
import { makeProp } from './prop-shape.ts'
import type { Emitter, Scene, SceneSheet } from './scene.ts'
import { makeSolid, type Solid } from './solid.ts'

/** A scene made ready for tracing. */
export type Stage = {
  scene: Scene
  solids: readonly Solid[]
  heads: readonly HeadShape[]
  sheets: readonly StagedSheet[]
  emitters: readonly StagedEmitter[]
}

export type StagedSheet = SceneSheet & {
  normal: readonly [number, number, number]
  /** Unit vector along its width. */
  along: readonly [number, number, number]
}

export type StagedEmitter = Emitter & {
  axis: readonly [number, number, number]
  side: readonly [number, number, number]
  up: readonly [number, number, number]
  areaM2: number
  profile: Profile
  /** All the light it gives, axisIntensity × sr. */
  flux: number
  /** Points on its face for shading, as x and y in half sides, spread evenly; more the larger it looks. */
  points: readonly (readonly [number, number])[]
}

/** How finely distances are kept, metres. */
export type Fineness = { headM: number; bodyM: number; propM: number }
export const ROUGH: Fineness = { headM: 0.016, bodyM: 0.04, propM: 0.04 }
export const FINE: Fineness = { headM: 0.0045, bodyM: 0.013, propM: 0.012 }

type Rows = Solid['rows']

/** Rows of the turn that takes the world into a body turned about the upright axis and nodded about its own x. */
function rowsOf(turn: number, nod: number): Rows {
  const c = Math.cos(turn)
  const s = Math.sin(turn)
  const cn = Math.cos(nod)
  const sn = Math.sin(nod)
  // Own axes in the world: x to the left hand is (c, 0, −s); forward is (s, 0, c); then the nod.
  return [c, 0, -s, sn * s, cn, sn * c, cn * s, -sn, cn * c]
}

/** Gap that is left round a body so that its grid ends outside it, metres. */
const ROOM = 0.02

export function stageOf(scene: Scene, fineness: Fineness): Stage {
  const heads: HeadShape[] = []
  const solids: Solid[] = []
  scene.figures.forEach((figure, index) => {
    const head = makeHead(figure.seed, figure.hair)
    heads.push(head)
    solids.push(
      makeSolid({
        of: { kind: 'head', index },
        parts: [
          { field: head.skin, stuff: 'skin' },
          { field: head.eyes, stuff: 'eye' },
          { field: head.hair, stuff: 'hair' },
        ],
        rows: rowsOf(figure.turn + figure.headTurn, figure.headNod),
        at: figure.eyes,
        low: [-0.165, -0.29, -0.165],
        high: [0.165, 0.2, 0.145],
        cellM: fineness.headM,
      }),
    )
    const body = makeBody(figure.seed, figure.cut, figure.pose, figure.eyes[1])
    const seated = figure.pose === 'seated'
    const k = seated ? 1 : clamp(figure.eyes[1] / 1.55, 0.55, 1.2)
    const wide = figure.cut === 'dress' || figure.cut === 'cape' ? 0.48 : 0.33
    solids.push(
      makeSolid({
        of: { kind: 'body', index },
        parts: [
          { field: body.cloth, stuff: 'cloth' },
          { field: body.skin, stuff: 'skin' },
          { field: body.under, stuff: 'trousers' },
          { field: body.linen, stuff: 'linen' },
          { field: body.metal, stuff: 'metal' },
        ],
        rows: rowsOf(figure.turn, 0),
        at: figure.eyes,
        low: [-wide * k, -figure.eyes[1] - ROOM, (seated ? -0.3 : -0.26 - (wide - 0.33)) * k],
        high: [wide * k, -0.1 * k, (seated ? 0.62 : 0.24 + (wide - 0.33)) * k],
        cellM: fineness.bodyM,
      }),
    )
  })
  scene.props.forEach((prop, index) => {
    const shape = makeProp(prop.shape, prop.widthM, prop.heightM, prop.seed)
    const w = prop.widthM * (prop.shape === 'cup' ? 0.95 : 0.55) + ROOM
    const h = prop.heightM * 0.52 + ROOM
    solids.push(
      makeSolid({
        of: { kind: 'prop', index },
        parts: [
          { field: shape.own, stuff: prop.shape === 'globe' ? 'metal' : prop.shape === 'cup' ? 'paint' : 'wood' },
          { field: shape.wood, stuff: prop.shape === 'books' ? 'paint' : 'wood' },
          { field: shape.leaf, stuff: 'leaf' },
        ],
        rows: rowsOf(prop.turn, 0),
        at: prop.at,
        low: [-w, -h, -w],
        high: [w, h, w],
        cellM: Math.min(fineness.propM, Math.max(0.002, Math.min(prop.widthM, prop.heightM) / 14)),
      }),
    )
  })
  return {
    scene,
    solids,
    heads,
    sheets: scene.sheets.map((sheet) => ({
      ...sheet,
      normal: [Math.sin(sheet.turn), 0, Math.cos(sheet.turn)],
      along: [Math.cos(sheet.turn), 0, -Math.sin(sheet.turn)],
    })),
    emitters: scene.emitters.map(stageEmitter),
  }
}

function fluxOf(emitter: Emitter, profile: Profile): number {
  const most = emitter.shape === 'ball' ? 180 : 90
  let sum = 0
  for (let deg = 0.5; deg < most; deg++) {
    sum += profile.shareAt(deg) * Math.sin((deg * Math.PI) / 180) * (Math.PI / 180)
  }
  return emitter.axisIntensity * 2 * Math.PI * sum
}

/** Points on a face, spread evenly: a sunflower on a disc, a grid of cell middles on a rectangle. */
function facePoints(emitter: Emitter, distanceM: number): (readonly [number, number])[] {
  const size = Math.max(emitter.widthM, emitter.heightM)
  const looks = size / Math.max(0.2, distanceM)
  const many = looks < 0.08 ? 1 : looks < 0.25 ? 4 : looks < 0.6 ? 9 : 16
  if (many === 1) return [[0, 0]]
  if (emitter.shape === 'rectangle') {
    const long = Math.max(1, Math.min(many, Math.round(Math.sqrt((many * emitter.widthM) / emitter.heightM))))
    const high = Math.max(1, Math.round(many / long))
    return Array.from({ length: long * high }, (_, i): [number, number] => [
      (((i % long) + 0.5) / long) * 2 - 1,
      ((Math.floor(i / long) + 0.5) / high) * 2 - 1,
    ])
  }
  return Array.from({ length: many }, (_, i): [number, number] => {
    const r = Math.sqrt((i + 0.5) / many)
    const turn = i * 2.399963229728653
    return [r * Math.cos(turn), r * Math.sin(turn)]
  })
}

function stageEmitter(emitter: Emitter): StagedEmitter {
  const { look: axis, side, up } = axesOf(emitter.at, emitter.aim, [0, 0, -1])
  const length = Math.hypot(...emitter.aim.map((value, index) => value - (emitter.at[index] ?? 0)))
  const profile = profileOf(emitter.beam)
  const area = emitter.shape === 'rectangle' ? 1 : Math.PI / 4
  return {
    ...emitter,
    axis,
    side,
    up,
    areaM2: emitter.widthM * emitter.heightM * area,
    profile,
    flux: fluxOf(emitter, profile),
    points: facePoints(emitter, length),
  }
}
