import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import { sceneOf } from '#shared/domain/lighting/test-frame/scene-of.ts'
import { createFrameFollower } from '#src/features/lighting/test-frame/frame-follower.ts'
import { createFrameRenderer } from '#src/features/lighting/test-frame/frame-renderer.ts'
import { fakeHands } from '#tests/support/fake-frame-worker.ts'
import { OCTA, light, whole } from '#tests/support/lighting-sample.ts'

function sceneWith({ x = -1, fNumber = 8 } = {}) {
  const lights = [light(11, { purpose: 'main', at: [x, 2, 1.2], aim: [0, 1.5, 0], modifier: OCTA })]
  return sceneOf(whole({ lights, camera: { fNumber } }), 'upright', { garmentColour: () => null })
}

function follower() {
  const workers = fakeHands()
  const renderer = createFrameRenderer({
    startWorker: workers.start,
    hands: 1,
    isSeen: () => true,
    onSeen: () => undefined,
  })
  const made = createFrameFollower(renderer, () => performance.now())
  const follow = (scene: ReturnType<typeof sceneWith>) => made.follow(scene, 'upright')
  const qualities = () => workers.begun().map((begun) => begun.quality)
  return { made, workers, follow, qualities }
}

beforeEach(() => {
  vi.useFakeTimers()
})
afterEach(() => {
  vi.useRealTimers()
})

describe('createFrameFollower', () => {
  it('shows the rough picture first, then the fine one', () => {
    const { made, workers, follow } = follower()
    follow(sceneWith())
    vi.advanceTimersByTime(1)
    workers.work()
    expect(made.snapshot()).toMatchObject({ isFine: false, layers: { width: 44, height: 66 } })
    workers.workAll()
    expect(made.snapshot()).toMatchObject({ isFine: true, layers: { width: 219, height: 329 } })
  })

  it('follows a hand with rough pictures of the newest place only, and refines once it rests', () => {
    const { made, workers, follow, qualities } = follower()
    follow(sceneWith())
    vi.advanceTimersByTime(1)
    workers.workAll()
    const before = workers.begun().length
    for (let step = 1; step <= 20; step++) {
      follow(sceneWith({ x: -1 + step / 20 }))
      vi.advanceTimersByTime(16)
      workers.workAll()
    }
    const whileMoving = workers.begun().slice(before)
    expect(whileMoving.map((begun) => begun.quality)).not.toContain('fine')
    expect(whileMoving.length).toBeGreaterThanOrEqual(3)
    expect(whileMoving.length).toBeLessThanOrEqual(6)
    expect(made.snapshot().isFine).toBe(false)
    vi.advanceTimersByTime(230)
    workers.workAll()
    expect(qualities().at(-1)).toBe('rough')
    expect(workers.begun().at(-1)?.scene.emitters[0]?.at[0]).toBe(0)
    vi.advanceTimersByTime(10)
    workers.workAll()
    expect(qualities().at(-1)).toBe('fine')
    expect(made.snapshot().isFine).toBe(true)
  })

  it('keeps the fine picture while only the lens is opened, until the new one is there', () => {
    const { made, workers, follow, qualities } = follower()
    follow(sceneWith())
    vi.advanceTimersByTime(1)
    workers.workAll()
    const shown = made.snapshot().layers
    follow(sceneWith({ fNumber: 4 }))
    vi.advanceTimersByTime(251)
    expect(made.snapshot().layers).toBe(shown)
    workers.workAll()
    expect(made.snapshot().layers).not.toBe(shown)
    expect(qualities()).toEqual(['rough', 'fine', 'fine'])
  })

  it('shows at once what it has shown before', () => {
    const { made, workers, follow } = follower()
    follow(sceneWith())
    vi.advanceTimersByTime(1)
    workers.workAll()
    follow(sceneWith({ x: 1 }))
    vi.advanceTimersByTime(300)
    workers.workAll()
    const before = workers.bands().length
    follow(sceneWith())
    expect(made.snapshot().isFine).toBe(true)
    vi.advanceTimersByTime(1000)
    expect(workers.bands()).toHaveLength(before)
  })

  it('says when it cannot, and works again when told to', () => {
    const { made, workers, follow } = follower()
    workers.refuse(true)
    follow(sceneWith())
    vi.advanceTimersByTime(1)
    expect(made.snapshot().failure).toMatch(/cannot be computed/)
    workers.refuse(false)
    made.tryAgain()
    vi.advanceTimersByTime(100)
    workers.workAll()
    expect(made.snapshot()).toMatchObject({ isFine: true, failure: null })
  })

  it('asks for nothing more once it is stopped', () => {
    const { made, workers, follow } = follower()
    follow(sceneWith())
    made.stop()
    vi.advanceTimersByTime(1000)
    expect(workers.begun()).toEqual([])
  })
})
