import type { Point } from '#shared/domain/lighting/schema.ts'
import type { Study, StudyLight } from './study.ts'

const UPRIGHT = [960, 1200] as const
const ACROSS = [1280, 960] as const
const SQUARE = [1000, 1000] as const

const PLASTER = { zM: -2.6, colour: '#a08468', surface: 'plaster' } as const
const DRUM = { zM: -2.8, colour: '#7c8288', surface: 'plaster' } as const
const PANELLED = { zM: -2.4, colour: '#4f5a55', surface: 'panelling' } as const

const soft = (at: Point, aim: Point, stops: number, size = 0.9): StudyLight => ({ at, aim, stops, face: [size, size] })
const strip = (at: Point, aim: Point, stops: number, colourK?: number): StudyLight => ({
  at,
  aim,
  stops,
  face: [0.3, 1.2],
  beamDeg: 100,
  ...(colourK === undefined ? {} : { colourK }),
})
const spot = (at: Point, aim: Point, stops: number, beamDeg: number, colourK?: number): StudyLight => ({
  at,
  aim,
  stops,
  face: [0.18, 0.18],
  beamDeg,
  ...(colourK === undefined ? {} : { colourK }),
})

const EYE = 1.55
const FACE: Point = [0, 1.5, 0]

/** The pictures on the demo's wall. Names are those of its frames. */
export const STUDIES: readonly Study[] = [
  {
    name: 'warm-cool',
    seed: 11,
    size: UPRIGHT,
    camera: { at: [0.1, 1.5, 3.4], aim: [0, 1.32, 0], focalMm: 105, fNumber: 5.6 },
    background: { ...DRUM, colour: '#5c6468' },
    people: [{ who: 'botanist', at: [0, EYE, 0], cut: 'coat', colour: '#7d8468', turnDeg: 22, headTurnDeg: -14 }],
    lights: [
      { ...soft([-1.3, 1.9, 0.9], FACE, 0.15, 0.6), colourK: 4300 },
      strip([1.4, 1.7, 0.1], FACE, -0.7, 9000),
      spot([0.6, 0.5, -1.3], [-0.3, 1.6, -2.8], -1.8, 60),
    ],
  },
  {
    name: 'undyed-brass',
    seed: 12,
    size: UPRIGHT,
    camera: { at: [-0.2, 1.45, 3.2], aim: [0.15, 1.3, 0], focalMm: 90, fNumber: 5.6 },
    background: PLASTER,
    people: [{ who: 'clockmaker', at: [0, EYE, 0], cut: 'shirt', colour: '#d9d4c8', turnDeg: 24, headTurnDeg: -10 }],
    props: [{ shape: 'globe', at: [0.55, 0.85, 0.05], widthM: 0.5, heightM: 1.4, colour: '#a9812f' }],
    lights: [soft([-1.4, 2.0, 1.3], FACE, 0.05), strip([1.6, 1.6, -0.9], FACE, -0.6), soft([0.8, 1.7, 3.2], FACE, -3)],
  },
  {
    name: 'one-light',
    seed: 13,
    size: UPRIGHT,
    camera: { at: [0, 1.5, 3.2], aim: [0, 1.42, 0], focalMm: 120, fNumber: 5.6 },
    background: DRUM,
    people: [{ who: 'astronomer', at: [0, EYE, 0], cut: 'jumper', colour: '#2c3a57', turnDeg: -16, headTurnDeg: 12 }],
    lights: [soft([-1.2, 2.0, 1.0], FACE, 0.35)],
  },
  {
    name: 'cold-light',
    seed: 14,
    size: UPRIGHT,
    camera: { at: [0, 1.45, 3.3], aim: [0, 1.3, 0], focalMm: 85, fNumber: 5.6 },
    background: { zM: -2.6, colour: '#7a828a', surface: 'brick' },
    people: [{ who: 'astronomer', at: [0, EYE, 0], cut: 'cape', colour: '#56606b', turnDeg: -20, headTurnDeg: 26 }],
    lights: [
      { ...soft([1.5, 2.1, 0.9], FACE, 0.15, 0.6), colourK: 7600 },
      spot([-1.4, 2, -0.8], FACE, -0.6, 30, 8000),
      spot([-0.9, 0.4, -1.5], [0.2, 1.7, -2.6], -1.6, 65, 9500),
    ],
  },
  {
    name: 'with-fill',
    seed: 13,
    size: UPRIGHT,
    camera: { at: [0, 1.5, 3.2], aim: [0, 1.42, 0], focalMm: 120, fNumber: 5.6 },
    background: DRUM,
    people: [{ who: 'astronomer', at: [0, EYE, 0], cut: 'jumper', colour: '#2c3a57', turnDeg: -16, headTurnDeg: 12 }],
    lights: [
      soft([-1.2, 2.0, 1.0], FACE, 0.35),
      soft([1.0, 1.6, 2.6], FACE, -2, 1.1),
      spot([1.0, 0.5, -1.3], [0.2, 1.6, -2.8], -1.2, 65),
    ],
  },
  {
    name: 'cool-shoulder',
    seed: 16,
    size: ACROSS,
    camera: { at: [0.35, 1.5, 2.5], aim: [0.08, 1.38, 0], focalMm: 105, fNumber: 4 },
    background: { ...PANELLED, colour: '#3d4a52' },
    people: [{ who: 'astronomer', at: [0, EYE, 0], cut: 'coat', colour: '#23304a', turnDeg: 48, headTurnDeg: -34 }],
    lights: [
      soft([1.5, 1.9, 1.2], FACE, 0.25, 0.9),
      strip([-1.2, 1.7, -0.7], [0, 1.35, 0], 0.1, 11000),
      spot([0.9, 0.6, -1.2], [0.7, 1.5, -2.4], -1.9, 60),
    ],
  },
  {
    name: 'two-heads',
    seed: 17,
    size: ACROSS,
    camera: { at: [0, 1.5, 3.0], aim: [0, 1.44, 0], focalMm: 105, fNumber: 5.6 },
    background: { ...PLASTER, colour: '#6d5a48' },
    people: [
      {
        who: 'astronomer',
        at: [-0.2, 1.57, 0],
        cut: 'coat',
        colour: '#23304a',
        turnDeg: 40,
        headTurnDeg: 14,
        headNodDeg: 6,
      },
      {
        who: 'clockmaker',
        at: [0.21, 1.5, 0.08],
        cut: 'shirt',
        colour: '#d9d4c8',
        turnDeg: -38,
        headTurnDeg: -10,
        headNodDeg: 8,
      },
    ],
    lights: [soft([-1.0, 2.2, 1.5], [0, 1.5, 0], 0.25, 1.2), strip([1.8, 1.7, -0.9], [0.1, 1.45, 0], -1)],
  },
  {
    name: 'collar-high',
    seed: 18,
    size: UPRIGHT,
    camera: { at: [-0.3, 1.48, 2.6], aim: [0, 1.42, 0], focalMm: 120, fNumber: 4 },
    background: { zM: -2.2, colour: '#39424c', surface: 'cloth' },
    people: [
      {
        who: 'astronomer',
        at: [0, EYE, 0],
        cut: 'jumper',
        colour: '#3b4454',
        turnDeg: 30,
        headTurnDeg: -8,
        headNodDeg: -4,
      },
    ],
    lights: [soft([-1.3, 1.8, 0.5], FACE, 0.25, 0.6), spot([1.1, 1.9, -1.0], FACE, -0.3, 20, 7000)],
  },
  {
    name: 'eyepiece',
    seed: 19,
    size: UPRIGHT,
    camera: { at: [0.25, 1.45, 3.3], aim: [0.16, 1.3, 0], focalMm: 85, fNumber: 5.6 },
    background: { ...DRUM, colour: '#59636e' },
    people: [{ who: 'astronomer', at: [-0.08, EYE, 0], cut: 'coat', colour: '#23304a', turnDeg: 34, headTurnDeg: 6 }],
    props: [{ shape: 'globe', at: [0.48, 0.9, 0.15], widthM: 0.46, heightM: 1.5, colour: '#a9812f' }],
    lights: [
      soft([1.5, 2.0, 1.1], FACE, 0.15, 0.6),
      spot([-1.2, 0.4, -1.4], [0.2, 1.6, -2.8], -0.9, 60, 12000),
      spot([-1.3, 2, -0.9], FACE, -0.7, 20),
    ],
  },
  {
    name: 'ochre-slate',
    seed: 20,
    size: UPRIGHT,
    camera: { at: [0.1, 1.15, 3.5], aim: [0, 0.92, 0], focalMm: 85, fNumber: 5.6 },
    background: { zM: -2.4, colour: '#4c5358', surface: 'plaster' },
    people: [
      {
        who: 'clockmaker',
        at: [0, 1.25, 0],
        cut: 'coat',
        colour: '#8e6a22',
        pose: 'seated',
        turnDeg: -22,
        headTurnDeg: 30,
      },
    ],
    lights: [
      soft([-1.4, 1.9, 1.3], [0, 1.15, 0], 0.25),
      strip([1.7, 1.5, -0.8], [0, 1.1, 0], -0.9),
      soft([0.6, 1.5, 3.4], [0, 1.1, 0], -2.8),
    ],
  },
  {
    name: 'ochre-head',
    seed: 21,
    size: UPRIGHT,
    camera: { at: [0.5, 1.55, 1.9], aim: [0, 1.5, 0], focalMm: 120, fNumber: 4 },
    background: { zM: -2.4, colour: '#4c5358', surface: 'plaster' },
    people: [
      {
        who: 'clockmaker',
        at: [0, EYE, 0],
        cut: 'coat',
        colour: '#8e6a22',
        turnDeg: 40,
        headTurnDeg: 18,
        headNodDeg: 4,
      },
    ],
    lights: [soft([1.3, 2.0, 0.9], FACE, 0.35), spot([-1.0, 1.9, -1.0], FACE, -0.2, 30)],
  },
  {
    name: 'undyed',
    seed: 22,
    size: UPRIGHT,
    camera: { at: [0, 1.4, 3.4], aim: [0, 1.22, 0], focalMm: 85, fNumber: 5.6 },
    background: { zM: -2.4, colour: '#9a958c', surface: 'paper' },
    people: [{ who: 'astronomer', at: [0, EYE, 0], cut: 'shirt', colour: '#d9d4c8', turnDeg: -30, headTurnDeg: 24 }],
    lights: [soft([-1.6, 1.9, 0.7], FACE, 0.05, 1.2), soft([1.4, 1.6, 1.6], FACE, -2.2, 1)],
  },
  {
    name: 'long-line',
    seed: 23,
    size: UPRIGHT,
    camera: { at: [0, 1.2, 4.6], aim: [0, 0.88, 0], focalMm: 78, fNumber: 5.6 },
    background: { ...DRUM, colour: '#767a78' },
    people: [{ who: 'botanist', at: [0, 1.56, 0], cut: 'dress', colour: '#1f5a42', turnDeg: -18, headTurnDeg: 34 }],
    lights: [
      soft([-1.9, 2.3, 1.6], [0, 1.2, 0], 0.35, 1.2),
      strip([1.7, 1.5, -1.0], [0, 1.1, 0], -0.6),
      spot([-0.9, 0.4, -1.4], [0.1, 1.4, -2.8], -1.4, 70),
    ],
  },
  {
    name: 'green-bust',
    seed: 24,
    size: ACROSS,
    camera: { at: [-0.5, 1.45, 2.4], aim: [0, 1.36, 0], focalMm: 95, fNumber: 4 },
    background: { zM: -2.2, colour: '#7b7d7e', surface: 'cloth' },
    people: [
      {
        who: 'botanist',
        at: [0, EYE, 0],
        cut: 'dress',
        colour: '#1f5a42',
        turnDeg: -40,
        headTurnDeg: 8,
        headNodDeg: 6,
      },
    ],
    lights: [soft([-1.3, 1.9, 1.1], FACE, 0.45, 0.9), strip([1.2, 1.7, -0.9], FACE, -0.2)],
  },
  {
    name: 'dusk-distance',
    seed: 25,
    size: ACROSS,
    camera: { at: [-0.6, 1.35, 5.2], aim: [0, 0.95, -0.2], focalMm: 50, fNumber: 5.6 },
    background: { zM: -3.2, colour: '#525a62', surface: 'panelling', widthM: 12 },
    people: [
      {
        who: 'clockmaker',
        at: [-0.5, 1.24, -0.2],
        cut: 'coat',
        colour: '#4d5a3a',
        pose: 'seated',
        turnDeg: 24,
        headTurnDeg: 10,
      },
    ],
    props: [
      { shape: 'table', at: [0.55, 0.36, 0], widthM: 0.9, heightM: 0.72, colour: '#5d3f23' },
      { shape: 'cup', at: [0.4, 0.76, 0.05], widthM: 0.1, heightM: 0.075, colour: '#b9b0a0' },
      { shape: 'cup', at: [0.66, 0.76, 0.12], widthM: 0.1, heightM: 0.075, colour: '#b9b0a0' },
      { shape: 'globe', at: [1.5, 0.85, -0.7], widthM: 0.6, heightM: 1.7, colour: '#a9812f' },
    ],
    lights: [
      soft([-1.9, 1.9, 1.2], [-0.4, 1.2, -0.2], -0.05, 0.9),
      spot([2.6, 2.0, -1.2], [0.8, 1.0, -0.4], -0.8, 60, 4200),
      spot([0.2, 0.4, -1.8], [0.6, 1.5, -3.2], -1.8, 70, 9000),
    ],
    ambientStops: -4.5,
  },
  {
    name: 'hem',
    seed: 26,
    size: ACROSS,
    camera: { at: [0.7, 0.75, 2.9], aim: [0, 0.32, 0], focalMm: 85, fNumber: 5.6 },
    background: { ...DRUM, colour: '#767a78' },
    people: [{ who: 'botanist', at: [0, 1.56, 0], cut: 'dress', colour: '#1f5a42', turnDeg: 10 }],
    lights: [soft([-1.8, 1.6, 1.0], [0, 0.4, 0], 0.35, 0.9), strip([1.6, 1.0, -0.9], [0, 0.4, 0], -0.3)],
  },
  {
    name: 'room-tone',
    seed: 27,
    size: UPRIGHT,
    camera: { at: [-0.4, 1.3, 4.2], aim: [0, 0.98, -0.8], focalMm: 50, fNumber: 8 },
    background: { zM: -2.8, colour: '#7c8078', surface: 'panelling' },
    props: [
      { shape: 'chair', at: [0.1, 0.5, -0.9], widthM: 0.44, heightM: 1.0, colour: '#4b3322', turnDeg: -24 },
      { shape: 'plant', at: [-0.85, 0.55, -1.7], widthM: 0.75, heightM: 1.1, colour: '#7a5a44' },
    ],
    lights: [soft([-2.4, 2.2, 1.0], [0, 0.8, -0.9], -0.05, 1.2), spot([2.2, 1.9, -0.4], [0.6, 1.6, -2.8], -1.4, 60)],
    ambientStops: -3.6,
  },
  {
    name: 'globe',
    seed: 28,
    size: SQUARE,
    camera: { at: [0.2, 1.25, 2.2], aim: [0, 1.02, 0], focalMm: 85, fNumber: 4 },
    background: { ...PLASTER, colour: '#5d4d40' },
    props: [
      { shape: 'globe', at: [0, 1.02, 0], widthM: 0.4, heightM: 0.62, colour: '#a9812f' },
      { shape: 'table', at: [0, 0.355, 0], widthM: 1.3, heightM: 0.71, colour: '#4a2f1c' },
      { shape: 'books', at: [-0.36, 0.77, 0.02], widthM: 0.26, heightM: 0.12, colour: '#5b1e2c' },
    ],
    lights: [soft([-1.0, 1.9, 0.7], [0, 1.0, 0], 0.45, 0.6), strip([1.1, 1.3, -0.5], [0, 1.0, 0], -0.4)],
  },
  {
    name: 'brass-edge',
    seed: 29,
    size: UPRIGHT,
    camera: { at: [0.1, 1.3, 1.5], aim: [0.03, 1.22, 0], focalMm: 95, fNumber: 4 },
    background: { zM: -2.6, colour: '#2c2b2a', surface: 'cloth' },
    props: [{ shape: 'globe', at: [0, 0.92, 0], widthM: 0.44, heightM: 0.85, colour: '#a9812f' }],
    lights: [strip([-0.9, 1.4, -0.5], [0, 1.2, 0], 0.5), strip([1.0, 1.5, 0.1], [0, 1.2, 0], -0.6, 8000)],
  },
  {
    name: 'knit',
    seed: 30,
    size: ACROSS,
    camera: { at: [-0.15, 1.3, 1.15], aim: [0.02, 1.18, 0.05], focalMm: 95, fNumber: 5.6 },
    background: { ...DRUM, colour: '#4c5358' },
    people: [{ who: 'clockmaker', at: [0, EYE, 0], cut: 'jumper', colour: '#a87a1e', turnDeg: -14 }],
    lights: [soft([-0.9, 1.5, 0.5], [0, 1.2, 0.05], 0.35, 0.6), soft([1.2, 1.3, 1.0], [0, 1.2, 0], -2.4, 0.9)],
  },
]
