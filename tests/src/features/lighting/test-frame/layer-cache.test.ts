import { describe, expect, it } from 'vitest'
import { emptyLayers } from '#shared/domain/lighting/test-frame/render.ts'
import { sceneOf } from '#shared/domain/lighting/test-frame/scene-of.ts'
import type { FrameAsk } from '#src/features/lighting/test-frame/frame-messages.ts'
import { createLayerCache, frameText } from '#src/features/lighting/test-frame/layer-cache.ts'
import { OCTA, light, whole } from '#tests/support/lighting-sample.ts'

type More = { x?: number; power?: number; fNumber?: number; zM?: number }

function askOf({ x = -1, power = 0.25, fNumber = 8, zM = -2 }: More = {}): FrameAsk {
  const setup = whole({
    lights: [
      light(11, { purpose: 'main', at: [x, 2, 1.2], aim: [0, 1.5, 0], modifier: OCTA, power }),
      light(12, { purpose: 'rim', at: [1.6, 2, -1], aim: [0, 1.5, 0] }),
    ],
    camera: { fNumber },
    background: { zM },
  })
  return { scene: sceneOf(setup, 'upright', { garmentColour: () => null }), width: 2, height: 3, quality: 'fine' }
}

const BYTES = 2 * 3 * 3 * 4
const layersOf = ({ scene, width, height }: FrameAsk) => emptyLayers(scene, width, height)

describe('frameText', () => {
  it('tells pictures apart by what they show, not by power', () => {
    expect(frameText(askOf({ power: 1 }))).toBe(frameText(askOf({ power: 1 / 64 })))
    expect(frameText(askOf({ x: 1 }))).not.toBe(frameText(askOf({ x: -1 })))
    expect(frameText(askOf({ fNumber: 2 }))).not.toBe(frameText(askOf({ fNumber: 8 })))
    expect(frameText({ ...askOf(), quality: 'rough' })).not.toBe(frameText(askOf()))
  })
})

describe('createLayerCache', () => {
  it('finds a picture once all its layers are known', () => {
    const cache = createLayerCache()
    expect(cache.find(askOf())).toBeNull()
    const layers = layersOf(askOf())
    cache.put(askOf(), layers)
    expect(cache.find(askOf())).toEqual(layers)
    expect(cache.find(askOf())?.layers[0]).toBe(layers.layers[0])
  })

  it('knows the lights that stand where they stood, and none in another room', () => {
    const cache = createLayerCache()
    cache.put(askOf(), layersOf(askOf()))
    const moved = askOf({ x: 0.5 })
    expect(cache.find(moved)).toBeNull()
    expect([...cache.known(moved).keys()]).toEqual([moved.scene.emitters[1]?.id, 'ambient'])
    expect(cache.known(askOf({ zM: -3 })).size).toBe(0)
  })

  it('lets the least recently used go when its bytes are full', () => {
    const cache = createLayerCache(BYTES * 6)
    for (const zM of [-2, -3]) cache.put(askOf({ zM }), layersOf(askOf()))
    expect(cache.find(askOf({ zM: -2 }))).not.toBeNull()
    cache.put(askOf({ zM: -4 }), layersOf(askOf()))
    expect(cache.find(askOf({ zM: -3 }))).toBeNull()
    expect(cache.find(askOf({ zM: -2 }))).not.toBeNull()
    expect(cache.find(askOf({ zM: -4 }))).not.toBeNull()
  })
})
