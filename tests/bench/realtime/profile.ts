import { z } from 'zod'
import { round } from './stats.ts'

/** A CPU profile as V8 writes it (`*.cpuprofile`), as far as it is read here. */
export const profileSchema = z.looseObject({
  nodes: z.array(
    z.looseObject({
      id: z.number(),
      callFrame: z.looseObject({ functionName: z.string(), url: z.string(), lineNumber: z.number() }),
    }),
  ),
  samples: z.array(z.number()),
  timeDeltas: z.array(z.number()),
})
export type Profile = z.infer<typeof profileSchema>

/** Waiting, and the profiler's own work when it is asked to stop. */
const NOT_BUSY = new Set(['(idle)', 'dispatch'])

/** Functions by the time spent in themselves: percent of all that was not idle. */
export function hottest(profile: Profile, count: number): { where: string; percent: number; ms: number }[] {
  const byId = new Map(profile.nodes.map((node) => [node.id, node.callFrame]))
  const selfUs = new Map<string, number>()
  let totalUs = 0
  profile.samples.forEach((id, i) => {
    const frame = byId.get(id)
    if (!frame || (frame.url === '' && NOT_BUSY.has(frame.functionName))) return
    const file = frame.url.replace(/^.*\/node_modules\//, '').replace(/^.*?\/(?=(server|shared|tests)\/)/, '')
    const where = `${frame.functionName || '(anonymous)'}${file ? ` ${file}:${frame.lineNumber + 1}` : ''}`
    const us = profile.timeDeltas[i] ?? 0
    totalUs += us
    selfUs.set(where, (selfUs.get(where) ?? 0) + us)
  })
  return [...selfUs]
    .sort(([, a], [, b]) => b - a)
    .slice(0, count)
    .map(([where, us]) => ({ where, percent: round((100 * us) / totalUs), ms: Math.round(us / 1000) }))
}
