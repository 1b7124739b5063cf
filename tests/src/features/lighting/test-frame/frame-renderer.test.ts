import { describe, expect, it, vi } from 'vitest'
import { AMBIENT, type Layers } from '#shared/domain/lighting/test-frame/render.ts'
import { sceneOf } from '#shared/domain/lighting/test-frame/scene-of.ts'
import type { FrameAsk } from '#src/features/lighting/test-frame/frame-messages.ts'
import { NO_FRAMES, URGENCY, createFrameRenderer } from '#src/features/lighting/test-frame/frame-renderer.ts'
import { fakeHands } from '#tests/support/fake-frame-worker.ts'
import { OCTA, light, whole } from '#tests/support/lighting-sample.ts'

const FACE: [number, number, number] = [0, 1.5, 0]

function askOf(x = -1, more: Partial<FrameAsk> = {}): FrameAsk {
  const setup = whole({
    lights: [
      light(11, { purpose: 'main', at: [x, 2, 1.2], aim: FACE, modifier: OCTA }),
      light(12, { purpose: 'rim', at: [1.6, 2, -1], aim: FACE }),
    ],
  })
  const scene = sceneOf(setup, 'upright', { garmentColour: () => null })
  return { scene, width: 4, height: 60, quality: 'fine', ...more }
}

function renderer({ hands = 1 } = {}) {
  const workers = fakeHands()
  let isSeen = true
  const seen = new Set<() => void>()
  const made = createFrameRenderer({
    startWorker: workers.start,
    hands,
    isSeen: () => isSeen,
    onSeen: (listener) => seen.add(listener),
  })
  return {
    made,
    workers,
    setSeen(next: boolean) {
      isSeen = next
      for (const listener of seen) listener()
    },
  }
}

const listener = () => ({ onBand: vi.fn(), onDone: vi.fn<(layers: Layers) => void>(), onFail: vi.fn() })

describe('createFrameRenderer', () => {
  it('hands out rows band by band, about the eyes first, and puts them together', () => {
    const { made, workers } = renderer()
    const heard = listener()
    made.ask(askOf(), URGENCY.strip, heard)
    workers.workAll()
    expect(workers.bands()).toEqual([
      [0, 24],
      [24, 48],
      [48, 60],
    ])
    expect(heard.onBand).toHaveBeenCalledTimes(3)
    const [layers] = heard.onDone.mock.calls[0] ?? []
    expect(layers?.ids).toHaveLength(3)
    // The fake worker writes the row's number into every value of it.
    expect(layers?.layers.map((layer) => layer[59 * 12])).toEqual([59, 59, 59])
  })

  it('shares the rows of a picture among two workers', () => {
    const { made, workers } = renderer({ hands: 2 })
    made.ask(askOf(), URGENCY.strip, listener())
    expect(workers.begun()).toHaveLength(2)
    expect(workers.bands()).toHaveLength(2)
  })

  it('does what is more urgent between two bands, and goes on afterwards', () => {
    const { made, workers } = renderer()
    const [large, strip] = [listener(), listener()]
    made.ask(askOf(-1), URGENCY.large, large)
    made.ask(askOf(0.5), URGENCY.strip, strip)
    workers.work()
    expect(strip.onDone).not.toHaveBeenCalled()
    workers.workAll()
    expect(strip.onDone.mock.invocationCallOrder[0]).toBeLessThan(large.onDone.mock.invocationCallOrder[0] ?? 0)
  })

  it('hands out nothing of what was taken back, and says nothing of it', () => {
    const { made, workers } = renderer()
    const heard = listener()
    const takeBack = made.ask(askOf(), URGENCY.large, heard)
    takeBack()
    workers.workAll()
    expect(workers.bands()).toHaveLength(1)
    expect(heard.onBand).not.toHaveBeenCalled()
    expect(heard.onDone).not.toHaveBeenCalled()
  })

  it('computes only the light that was moved', () => {
    const { made, workers } = renderer()
    made.ask(askOf(-1), URGENCY.strip, listener())
    workers.workAll()
    const heard = listener()
    made.ask(askOf(0.5), URGENCY.strip, heard)
    workers.workAll()
    expect(workers.begun().map((begun) => begun.scene.emitters.length)).toEqual([2, 1])
    expect(heard.onDone.mock.calls[0]?.[0].ids.at(-1)).toBe(AMBIENT)
  })

  it('knows a picture again without a worker', async () => {
    const { made, workers } = renderer()
    made.ask(askOf(), URGENCY.strip, listener())
    workers.workAll()
    const before = workers.bands().length
    const heard = listener()
    made.ask(askOf(), URGENCY.strip, heard)
    await Promise.resolve()
    expect(heard.onDone).toHaveBeenCalledTimes(1)
    expect(workers.bands()).toHaveLength(before)
  })

  it('does nothing while nobody sees the page, and begins when somebody does', () => {
    const { made, workers, setSeen } = renderer()
    const heard = listener()
    setSeen(false)
    made.ask(askOf(), URGENCY.strip, heard)
    expect(workers.bands()).toEqual([])
    setSeen(true)
    workers.workAll()
    expect(heard.onDone).toHaveBeenCalledTimes(1)
  })

  it('ends its workers a second after the last picture has left the screen, unless there is another', () => {
    vi.useFakeTimers()
    const { made, workers } = renderer({ hands: 2 })
    const [first, second] = [made.hold(), made.hold()]
    made.ask(askOf(), URGENCY.strip, listener())
    first()
    expect(workers.ended()).toBe(0)
    second()
    const third = made.hold()
    vi.advanceTimersByTime(2000)
    expect(workers.ended()).toBe(0)
    third()
    vi.advanceTimersByTime(2000)
    expect(workers.ended()).toBe(2)
    vi.useRealTimers()
  })

  it('says so in a plain sentence when a worker cannot start or breaks, and tries again when told to', () => {
    for (const how of ['start', 'error', 'failed'] as const) {
      const { made, workers } = renderer()
      const heard = listener()
      if (how === 'start') workers.refuse(true)
      made.ask(askOf(), URGENCY.strip, heard)
      if (how === 'error') workers.breakDown()
      if (how === 'failed') workers.failNext()
      expect(heard.onFail).toHaveBeenCalledExactlyOnceWith(NO_FRAMES)
      workers.refuse(false)
      made.tryAgain()
      const again = listener()
      made.ask(askOf(), URGENCY.strip, again)
      workers.workAll()
      expect(again.onDone).toHaveBeenCalledTimes(1)
    }
  })
})
