import { useEffect, useState } from 'react'
import type { Orientation } from '#shared/domain/lighting/frame.ts'
import { LARGE_PIXELS, pictureSize } from '#shared/domain/lighting/test-frame/picture-size.ts'
import type { Layers } from '#shared/domain/lighting/test-frame/render.ts'
import type { Scene } from '#shared/domain/lighting/test-frame/scene.ts'
import type { FrameAsk } from './frame-messages.ts'
import { URGENCY } from './frame-renderer.ts'
import { useFrameRenderer } from './shared-renderer.ts'

export type Rows = readonly [from: number, to: number]

export type LargeFrame = {
  size: { width: number; height: number }
  /** Null before the first rows; then only `rows` of it are there. */
  layers: Layers | null
  rows: readonly Rows[]
  /** Computed so far, 0 … 1. */
  share: number
  isStopped: boolean
  failure: string | null
  stop: () => void
  goOn: () => void
}

/** Rows of a known picture that are drawn at a time. */
const DRAWN_ROWS = 24

type Progress = { ask: FrameAsk; layers: Layers | null; rows: readonly Rows[]; failure: string | null }

/** The picture at full size, row by row. */
export function useLargeFrame(scene: Scene, orientation: Orientation): LargeFrame {
  const renderer = useFrameRenderer()
  const [stopped, setStopped] = useState<Scene | null>(null)
  const [progress, setProgress] = useState<Progress | null>(null)
  const size = pictureSize(orientation, LARGE_PIXELS)
  const isStopped = stopped === scene
  const { width, height } = size
  useEffect(() => {
    if (isStopped) return undefined
    const ask: FrameAsk = { scene, quality: 'fine', width, height }
    const rows: Rows[] = []
    return renderer.ask(ask, URGENCY.large, {
      onBand(layers, from, to) {
        rows.push([from, to])
        setProgress({ ask, layers, rows: [...rows], failure: null })
      },
      // Known from before: no rows were computed.
      onDone(layers) {
        if (rows.length === 0) {
          for (let from = 0; from < height; from += DRAWN_ROWS) rows.push([from, Math.min(height, from + DRAWN_ROWS)])
        }
        setProgress({ ask, layers, rows: [...rows], failure: null })
      },
      onFail: (failure) => setProgress({ ask, layers: null, rows: [], failure }),
    })
  }, [renderer, scene, width, height, isStopped])
  const own = progress?.ask.scene === scene && progress.ask.width === width ? progress : null
  const rows = own?.rows ?? []
  return {
    size,
    layers: own?.layers ?? null,
    rows,
    share: rows.reduce((sum, [from, to]) => sum + to - from, 0) / height,
    isStopped,
    failure: own?.failure ?? null,
    stop: () => setStopped(scene),
    goOn: () => {
      renderer.tryAgain()
      setStopped(null)
    },
  }
}
