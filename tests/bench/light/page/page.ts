import { frameStages } from '#shared/domain/lighting/frame-stages.ts'
import { readSetup } from '#shared/domain/lighting/readings.ts'
import { weightsOf } from '#shared/domain/lighting/test-frame/develop.ts'
import { developStages } from '#shared/domain/lighting/test-frame/develop-stages.ts'
import { LARGE_PIXELS, pictureSize } from '#shared/domain/lighting/test-frame/picture-size.ts'
import type { Layers, Quality } from '#shared/domain/lighting/test-frame/render.ts'
import { askFor } from '#src/features/lighting/test-frame/frame-follower.ts'
import type { FrameAsk } from '#src/features/lighting/test-frame/frame-messages.ts'
import { type FrameRenderer, createFrameRenderer } from '#src/features/lighting/test-frame/frame-renderer.ts'
import { frameScene, frameSetup } from '../frame-setup.ts'

/** Milliseconds of each step, by name; `hands` is the number of workers. */
type Times = {
  hands: number
  rough: number
  dragged: number
  fine: number
  power: number
  large: number
  pauseMs: number
}

const ask = (quality: Quality, shift = 0): FrameAsk => askFor(frameScene(shift), 'upright', quality)

function timed(renderer: FrameRenderer, frame: FrameAsk): Promise<{ ms: number; layers: Layers }> {
  const startedMs = performance.now()
  return new Promise((resolve, reject) => {
    renderer.ask(frame, 0, {
      onDone: (layers) => resolve({ ms: performance.now() - startedMs, layers }),
      onFail: (sentence) => reject(new Error(sentence)),
    })
  })
}

/** The longest that the page could not do anything else, milliseconds. */
function watchPauses(): () => number {
  let last = performance.now()
  let longest = 0
  const timer = setInterval(() => {
    const now = performance.now()
    longest = Math.max(longest, now - last - 10)
    last = now
  }, 10)
  return () => {
    clearInterval(timer)
    return longest
  }
}

async function measure(hands: number): Promise<Times> {
  const renderer = createFrameRenderer({
    startWorker: () =>
      new Worker(new URL('../../../../src/features/lighting/test-frame/frame-worker.ts', import.meta.url), {
        type: 'module',
      }),
    hands,
    isSeen: () => true,
    onSeen: () => undefined,
  })
  const release = renderer.hold()
  const pauses = watchPauses()
  const rough = await timed(renderer, ask('rough'))
  const dragged = await timed(renderer, ask('rough', 0.1))
  const fine = await timed(renderer, ask('fine'))
  const pauseMs = pauses()
  const { setup, lights } = frameSetup()
  const order = frameStages(frameSetup(), readSetup(frameSetup())).map((stage) => stage.light.id)
  const canvases = order.map(() => new OffscreenCanvas(fine.layers.width, fine.layers.height).getContext('2d'))
  const times = Array.from({ length: 12 }, (_, run) => {
    const startedMs = performance.now()
    const changed = lights.map((light) => ({ ...light, power: light.power / (1 + (run % 3)) }))
    developStages(fine.layers, weightsOf(setup, changed), order).forEach((bytes, index) => {
      canvases[index]?.putImageData(new ImageData(bytes, fine.layers.width, fine.layers.height), 0, 0)
    })
    return performance.now() - startedMs
  })
  const power = times.sort((a, b) => a - b)[times.length >> 1] ?? 0
  const large = await timed(renderer, { ...ask('fine'), ...pictureSize('upright', LARGE_PIXELS) })
  release()
  return { hands, rough: rough.ms, dragged: dragged.ms, fine: fine.ms, power, large: large.ms, pauseMs }
}

Object.assign(window, { measure })
