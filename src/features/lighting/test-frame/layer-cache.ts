import { AMBIENT, type Layers } from '#shared/domain/lighting/test-frame/render.ts'
import type { Emitter } from '#shared/domain/lighting/test-frame/scene.ts'
import type { FrameAsk } from './frame-messages.ts'

/**
 * Layers that were computed, one by one: what a light gives depends on where everything stands and on that light alone,
 * so a setup of which one light was moved needs only that one anew. The least recently used go first.
 */
export type LayerCache = {
  /** The layers of a picture that are known, by id. */
  known: (ask: FrameAsk) => Map<string, Float32Array>
  /** The whole picture, if all of it is known. */
  find: (ask: FrameAsk) => Layers | null
  put: (ask: FrameAsk, layers: Layers) => void
}

/** About 27 pictures of the strip with four lights. */
export const CACHE_BYTES = 120_000_000

/** What all layers of a picture depend on. */
export function standingText({ scene, width, height, quality }: FrameAsk): string {
  const { emitters: _, ...standing } = scene
  return JSON.stringify([width, height, quality, standing])
}

/** What tells a picture from another. */
export const frameText = (ask: FrameAsk): string => `${standingText(ask)}${JSON.stringify(ask.scene.emitters)}`

export function createLayerCache(mostBytes = CACHE_BYTES): LayerCache {
  const kept = new Map<string, Float32Array>()
  let bytes = 0

  function drop(key: string) {
    bytes -= kept.get(key)?.byteLength ?? 0
    kept.delete(key)
  }
  function keep(key: string, layer: Float32Array) {
    drop(key)
    kept.set(key, layer)
    bytes += layer.byteLength
  }
  const keyOf = (standing: string, emitter: Emitter | undefined) =>
    `${emitter ? JSON.stringify(emitter) : AMBIENT}${standing}`

  function known(ask: FrameAsk): Map<string, Float32Array> {
    const standing = standingText(ask)
    const found = new Map<string, Float32Array>()
    for (const emitter of [...ask.scene.emitters, undefined]) {
      const key = keyOf(standing, emitter)
      const layer = kept.get(key)
      if (!layer) continue
      keep(key, layer)
      found.set(emitter?.id ?? AMBIENT, layer)
    }
    return found
  }
  return {
    known,
    find(ask) {
      const found = known(ask)
      const ids = [...ask.scene.emitters.map((emitter) => emitter.id), AMBIENT]
      const layers = ids.flatMap((id) => found.get(id) ?? [])
      return layers.length === ids.length ? { width: ask.width, height: ask.height, ids, layers } : null
    },
    put(ask, layers) {
      const standing = standingText(ask)
      for (const emitter of [...ask.scene.emitters, undefined]) {
        const layer = layers.layers[layers.ids.indexOf(emitter?.id ?? AMBIENT)]
        if (layer) keep(keyOf(standing, emitter), layer)
      }
      for (const oldest of kept.keys()) {
        if (bytes <= mostBytes) break
        drop(oldest)
      }
    },
  }
}
