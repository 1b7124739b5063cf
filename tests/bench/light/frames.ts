import { inBuildOrder } from '#shared/domain/lighting/frame-stages.ts'
import { weightsOf } from '#shared/domain/lighting/test-frame/develop.ts'
import { developStages } from '#shared/domain/lighting/test-frame/develop-stages.ts'
import {
  LARGE_PIXELS,
  ROUGH_PIXELS,
  STRIP_PIXELS,
  pictureSize,
} from '#shared/domain/lighting/test-frame/picture-size.ts'
import { type Layers, type Quality, emptyLayers, renderRows } from '#shared/domain/lighting/test-frame/render.ts'
import { FINE, ROUGH } from '#shared/domain/lighting/test-frame/stage.ts'
import { type StageStore, stageAgain } from '#shared/domain/lighting/test-frame/stage-again.ts'
import { frameScene, frameSetup } from './frame-setup.ts'
import type { Clock } from './readings.ts'

/** Milliseconds of issue 4: a strip of four lights, a change of power, the large view. */
export const FRAME_TARGETS_MS = { rough: 250, fine: 3000, power: 30, large: 45_000 } as const

const RUNS = 5

function rendered(shift: number, quality: Quality, pixels: number, store: StageStore): Layers {
  const scene = frameScene(shift)
  const { width, height } = pictureSize('upright', pixels)
  const into = emptyLayers(scene, width, height)
  const rows = renderRows(scene, quality, into, 0, height, stageAgain(scene, quality === 'rough' ? ROUGH : FINE, store))
  while (rows.next().done !== true);
  return into
}

const middleOf = (times: readonly number[]) => [...times].sort((a, b) => a - b)[times.length >> 1] ?? 0

function timed(nowMs: Clock, runs: number, work: (run: number) => unknown): number {
  return middleOf(
    Array.from({ length: runs }, (_, run) => {
      const startedMs = nowMs()
      work(run)
      return nowMs() - startedMs
    }),
  )
}

function line(what: string, ms: number, targetMs: number | null): object {
  const medianMs = Number(ms.toFixed(1))
  return {
    what,
    where: 'node, one thread',
    medianMs,
    ...(targetMs === null ? {} : { targetMs, met: medianMs <= targetMs }),
  }
}

/** The test frames of four lights in one thread of Node: rough, fine, a change of power, large. Medians. */
export function* benchFrames(nowMs: Clock): Iterable<object> {
  rendered(0, 'rough', ROUGH_PIXELS, new Map())
  const rough = timed(nowMs, RUNS, () => rendered(0, 'rough', ROUGH_PIXELS, new Map()))
  yield line('rough strip, new sitter', rough, FRAME_TARGETS_MS.rough)
  const store: StageStore = new Map()
  rendered(0, 'rough', ROUGH_PIXELS, store)
  const dragged = timed(nowMs, RUNS, (run) => rendered((run + 1) / 50, 'rough', ROUGH_PIXELS, store))
  yield line('rough strip, lights moved', dragged, FRAME_TARGETS_MS.rough)
  const fine = timed(nowMs, 3, () => rendered(0, 'fine', STRIP_PIXELS, new Map()))
  yield line('fine strip', fine, FRAME_TARGETS_MS.fine)
  const layers = rendered(0, 'rough', STRIP_PIXELS, store)
  const { setup, lights } = frameSetup()
  const order = inBuildOrder(lights).map((light) => light.id)
  const develop = (run: number) => {
    const changed = lights.map((light) => ({ ...light, power: light.power / (1 + (run % 4)) }))
    return developStages(layers, weightsOf(setup, changed), order)
  }
  timed(nowMs, 10, develop)
  yield line('change of power, all four pictures', timed(nowMs, 20, develop), FRAME_TARGETS_MS.power)
  const large = timed(nowMs, 1, () => rendered(0, 'fine', LARGE_PIXELS, store))
  yield line('large view', large, FRAME_TARGETS_MS.large)
}
