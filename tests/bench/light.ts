import { performance } from 'node:perf_hooks'
import { parseArgs } from 'node:util'
import { benchFramesInBrowser } from './light/frames-in-browser.ts'
import { benchFrames } from './light/frames.ts'
import { type Clock, benchReadings } from './light/readings.ts'

/**
 * What the light of a setup costs to compute. One JSON line a measurement; the names of some (`readings`, `frames`,
 * `frames-in-browser`) measure only those. `--cpu` counts this process's CPU time instead of the wall clock, for a
 * machine that has other work to do.
 */
const MEASUREMENTS: Readonly<Record<string, (nowMs: Clock) => Iterable<object> | AsyncIterable<object>>> = {
  readings: benchReadings,
  frames: benchFrames,
  'frames-in-browser': benchFramesInBrowser,
}

const { values, positionals } = parseArgs({
  allowPositionals: true,
  options: { cpu: { type: 'boolean', default: false } },
})
const nowMs: Clock = () => (values.cpu ? process.cpuUsage().user / 1000 : performance.now())
const chosen = positionals.length > 0 ? positionals : Object.keys(MEASUREMENTS)
for (const name of chosen) {
  const measure = MEASUREMENTS[name]
  if (!measure) {
    process.stderr.write(`Name some of: ${Object.keys(MEASUREMENTS).join(', ')}\n`)
    process.exit(2)
  }
  for await (const line of measure(nowMs))
    process.stdout.write(`${JSON.stringify({ bench: 'light', measurement: name, ...line })}\n`)
}
