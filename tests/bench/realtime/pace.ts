import { performance } from 'node:perf_hooks'
import { pause } from '#tests/realtime/support/client.ts'

/** Longer than this behind, what is due is skipped instead of made up for in a burst. */
const SKIP_MS = 1_000

/**
 * Lets each of `count` act so often a second, each from a moment of its own, until it is over.
 * `act` is told how late it comes, ms. Returns how many acts were skipped.
 */
export async function keepPace(options: {
  count: number
  perSecond: number
  isOver: () => boolean
  act: (i: number, lateMs: number) => void
}): Promise<number> {
  const { count, perSecond, isOver, act } = options
  const everyMs = 1000 / perSecond
  const startedMs = performance.now()
  const dueMs = Float64Array.from({ length: count }, () => startedMs + Math.random() * everyMs)
  let skipped = 0
  while (!isOver()) {
    const now = performance.now()
    for (let i = 0; i < count; i++) {
      let due = dueMs[i] ?? Infinity
      if (due > now) continue
      if (now - due > SKIP_MS) {
        skipped += Math.floor((now - due) / everyMs)
        due = now
      }
      act(i, now - due)
      dueMs[i] = due + everyMs
    }
    await pause(2)
  }
  return skipped
}
