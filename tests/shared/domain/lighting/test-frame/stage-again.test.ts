import { describe, expect, it } from 'vitest'
import {
  AMBIENT,
  type Layers,
  emptyLayers,
  renderFrame,
  renderRows,
} from '#shared/domain/lighting/test-frame/render.ts'
import { sceneOf } from '#shared/domain/lighting/test-frame/scene-of.ts'
import { type StageStore, stageAgain } from '#shared/domain/lighting/test-frame/stage-again.ts'
import { ROUGH } from '#shared/domain/lighting/test-frame/stage.ts'
import { GRID, OCTA, light, whole } from '#tests/support/lighting-sample.ts'

const FACE: [number, number, number] = [0, 1.5, 0]
const WIDTH = 16
const HEIGHT = 24

function sceneWith(x: number) {
  const setup = whole({
    lights: [
      light(11, { purpose: 'main', at: [x, 2, 1.2], aim: FACE, modifier: OCTA }),
      light(12, { purpose: 'rim', at: [1.6, 2, -1], aim: FACE, modifier: GRID }),
    ],
    props: [{ kind: 'prop', shape: 'ball', at: [0.4, 1.1, 0.3], widthM: 0.3, heightM: 0.3 }],
  })
  return sceneOf(setup, 'upright', { garmentColour: () => '#2f4a6b' })
}

function renderedAgain(store: StageStore, scene: ReturnType<typeof sceneWith>): Layers {
  const into = emptyLayers(scene, WIDTH, HEIGHT)
  const rows = renderRows(scene, 'rough', into, 0, HEIGHT, stageAgain(scene, ROUGH, store))
  while (rows.next().done !== true);
  return into
}

describe('stageAgain', () => {
  it('gives the picture that a stage of its own gives, after a light was moved', () => {
    const store: StageStore = new Map()
    renderedAgain(store, sceneWith(-1.2))
    expect(renderedAgain(store, sceneWith(0.7))).toEqual(renderFrame(sceneWith(0.7), 'rough', WIDTH, HEIGHT))
  })

  it('does not take the bodies of somebody who looks otherwise', () => {
    const store: StageStore = new Map()
    const scene = sceneWith(-1.2)
    renderedAgain(store, scene)
    const turned = { ...scene, figures: scene.figures.map((figure) => ({ ...figure, headTurn: 0.6 })) }
    expect(renderedAgain(store, turned)).toEqual(renderFrame(turned, 'rough', WIDTH, HEIGHT))
  })

  it('keeps few', () => {
    const store: StageStore = new Map()
    const scene = { ...sceneWith(0), figures: [] }
    for (let seed = 0; seed < 9; seed++)
      stageAgain({ ...scene, props: scene.props.map((prop) => ({ ...prop, seed })) }, ROUGH, store)
    expect(store.size).toBeLessThan(6)
  })
})

describe('layers', () => {
  it('of a light are the same whichever other lights are computed with it', () => {
    const scene = sceneWith(-1.2)
    const all = renderFrame(scene, 'rough', WIDTH, HEIGHT)
    const one = renderFrame({ ...scene, emitters: scene.emitters.slice(1) }, 'rough', WIDTH, HEIGHT)
    for (const id of [...one.ids, AMBIENT])
      expect(one.layers[one.ids.indexOf(id)]).toEqual(all.layers[all.ids.indexOf(id)])
  })
})
