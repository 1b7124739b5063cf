import type { Emitter, Figure, Scene } from '#shared/domain/lighting/test-frame/scene.ts'

/** A small bare light that gives the same everywhere before it. */
export function emitter(more: Partial<Emitter> = {}): Emitter {
  return {
    id: 'a',
    at: [0, 1.5, 0],
    aim: [0, 1.5, -2],
    shape: 'disc',
    widthM: 0.02,
    heightM: 0.02,
    axisIntensity: 1000,
    beam: { beamDeg: null, zoomMm: null, bare: true },
    ...more,
  }
}

export function figure(more: Partial<Figure> = {}): Figure {
  return {
    eyes: [0, 1.55, 0],
    pose: 'standing',
    turn: 0,
    headTurn: 0,
    headNod: 0,
    skin: [0.45, 0.3, 0.23],
    hair: 'short',
    hairColour: [0.05, 0.03, 0.02],
    cut: 'jumper',
    garment: [0.1, 0.2, 0.4],
    seed: 7,
    ...more,
  }
}

/** A beam of this angle. */
export function beam(beamDeg: number) {
  return { beamDeg, zoomMm: null, bare: false }
}

/** A wide grey paper two metres behind the mark, the lens three metres before it, no room about them. */
export function scene(more: Partial<Scene> = {}): Scene {
  return {
    view: { at: [0, 1.5, 3], forward: [0, 0, -1], right: [1, 0, 0], up: [0, 1, 0], tanAcross: 0.2, tanUp: 0.25 },
    lens: { openingM: 0.01, focusM: 3 },
    background: { zM: -2, widthM: 12, heightM: 6, colour: [0.5, 0.5, 0.5], surface: 'paper' },
    floor: [0.2, 0.2, 0.2],
    figures: [],
    props: [],
    sheets: [],
    emitters: [emitter()],
    room: { areaM2: 126, reflectance: 0 },
    seed: 1,
    ...more,
  }
}
