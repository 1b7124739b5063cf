import { monitorEventLoopDelay } from 'node:perf_hooks'
import type { Quantiles } from '#server/realtime/recent.ts'

const RESOLUTION_MS = 20
const WINDOW_MS = 60_000

/** Begins to watch how late the event loop is. Answers in ms, over the last whole minute (before it, since the start). */
export function watchLoopDelay(): () => Quantiles {
  const histogram = monitorEventLoopDelay({ resolution: RESOLUTION_MS })
  histogram.enable()
  // It records the time between two of its ticks, in ns; what exceeds a tick is the delay.
  const toMs = (ns: number) => Math.max(0, ns / 1e6 - RESOLUTION_MS)
  const read = (): Quantiles => ({
    p50: toMs(histogram.percentile(50)),
    p95: toMs(histogram.percentile(95)),
    p99: toMs(histogram.percentile(99)),
    max: toMs(histogram.max),
  })
  let lastMinute: Quantiles | null = null
  setInterval(() => {
    lastMinute = read()
    histogram.reset()
  }, WINDOW_MS).unref()
  return () => lastMinute ?? read()
}
