import { cautionsOf } from '#shared/domain/lighting/cautions.ts'
import { readSetup } from '#shared/domain/lighting/readings.ts'
import { wallMap } from '#shared/domain/lighting/wall.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { BOOM, FULL_WARM, GRID, HALF_BLUE, OCTA, SOFTBOX, light, whole } from '#tests/support/lighting-sample.ts'

export type Clock = () => number

const FACE: [number, number, number] = [0, 1.5, 0]
const RUNS = 2_000
const WARM_UP = 200
const TARGET_MS = 2

/** Every purpose, eight lights; moved a little for each run, so that nothing can be kept. */
function setupOf(shift: number): WholeSetup {
  return whole({
    ambientLux: 120,
    lights: [
      light(1, { purpose: 'main', at: [-1.2 + shift, 2, 1.1], aim: FACE, modifier: OCTA, support: BOOM }),
      light(2, { purpose: 'fill', at: [1.4, 1.6, 2], aim: FACE, modifier: SOFTBOX, power: 1 / 16 }),
      light(3, {
        purpose: 'background',
        at: [-1.9, 0.8, -1.2],
        aim: [-0.4, 1.3, -2],
        modifier: GRID,
        gels: [HALF_BLUE],
      }),
      light(4, { purpose: 'background', at: [1.9, 0.8, -1.2], aim: [0.5, 1.2, -2], gels: [HALF_BLUE] }),
      light(5, { purpose: 'rim', at: [1.7, 2.1, -1.1], aim: FACE, modifier: GRID, gels: [FULL_WARM] }),
      light(6, { purpose: 'rim', at: [-1.7, 2.1, -1.1], aim: FACE, modifier: GRID }),
      light(7, { purpose: 'accent', at: [2, 1, 0.5], aim: [0, 1, 0], modifier: GRID }),
      light(8, { purpose: 'accent', at: [-2, 1, 0.5], aim: [0, 1, 0], modifier: SOFTBOX, power: 1 / 32 }),
    ],
    props: [{ at: [1, 1.1, 0.4], turnDeg: -60 }],
  })
}

function timesMs(runs: number, nowMs: Clock, work: (whole: WholeSetup) => unknown): number[] {
  const times: number[] = []
  for (let run = 0; run < runs + WARM_UP; run++) {
    const setup = setupOf((run % 100) / 500)
    const startedMs = nowMs()
    work(setup)
    if (run >= WARM_UP) times.push(nowMs() - startedMs)
  }
  return times.sort((a, b) => a - b)
}

const at = (sorted: readonly number[], share: number) =>
  Number((sorted[Math.min(sorted.length - 1, Math.floor(sorted.length * share))] ?? 0).toFixed(3))

/** Readings and cautions of eight lights, and the wall map beside them. */
export function* benchReadings(nowMs: Clock): Iterable<object> {
  const options = { orientations: ['upright'], frames: 40 } as const
  const times = timesMs(RUNS, nowMs, (setup) => cautionsOf(setup, options, readSetup(setup, options)))
  const medianMs = at(times, 0.5)
  yield { lights: 8, runs: RUNS, medianMs, p95Ms: at(times, 0.95), targetMs: TARGET_MS, met: medianMs <= TARGET_MS }
  const maps = timesMs(200, nowMs, (setup) => wallMap(setup, { columns: 60, rows: 45 }))
  yield { lights: 8, wallMap: '60 × 45', medianMs: at(maps, 0.5), p95Ms: at(maps, 0.95) }
}
