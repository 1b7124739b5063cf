import { performance } from 'node:perf_hooks'
import { pause } from '#tests/realtime/support/client.ts'
import { summary } from '../stats.ts'
import { fourOf } from '../table.ts'
import type { Target } from '../targets/target.ts'
import { countDifferent } from './load.ts'
import { MarkMakers, marksLeft } from './marks.ts'
import type { Bench, Scenario } from './scenario.ts'

const CLIENTS = 10
const DOCUMENTS = 2
const MARKS_PER_SECOND = 10
const BEFORE_S = 4
const AWAY_S = 10
const AFTER_S = 4
const DRAIN_MS = 30_000

/**
 * The database is stopped at once under people who edit, stays away for ten seconds, and comes back while they go on.
 * Then the server is killed: what was acknowledged has to be there for a newcomer.
 */
export const databaseAway: Scenario = {
  name: 'database-away',
  title: `database away for ${AWAY_S} s under ${CLIENTS} clients`,
  head: [
    'edits made',
    'acked',
    'LOST of acked',
    'disconnected',
    'server',
    'equal before the kill',
    'all acked after ms',
    'ack ms p50/p95/p99/max',
  ],
  run: async (target, bench) => {
    if (!target.isPersistent) return null
    const line = await runAway(target, bench)
    return {
      line,
      isGood: line.lostAcked === 0 && line.disconnected === 0 && line.converged && line.survived,
      rows: [
        [
          line.made,
          line.acked,
          line.lostAcked,
          line.disconnected,
          line.survived ? 'lives' : 'DIED',
          line.converged ? 'yes' : 'NO',
          line.allAckedAfterMs,
          fourOf(line.ackMs),
        ],
      ],
    }
  },
}

async function runAway(target: Target, { database }: Bench) {
  const documents = await target.addDocuments(DOCUMENTS, CLIENTS / DOCUMENTS)
  let server = await target.start()
  try {
    const makers = await MarkMakers.sitDown(target, server, documents, CLIENTS)
    const { clients, marks } = makers
    const making = makers.make(MARKS_PER_SECOND, BEFORE_S + AWAY_S + AFTER_S)
    await pause(BEFORE_S * 1000)
    await database.stopAtOnce()
    await pause(AWAY_S * 1000)
    await database.start()
    const backMs = performance.now()
    await making

    const drainFromMs = performance.now()
    const areAcked = () => clients.every((client) => !client.isOpen || client.acked >= client.sent)
    while (!areAcked() && performance.now() - drainFromMs < DRAIN_MS) await pause(10)
    const ackedMs = performance.now()
    await pause(target.settleMs)
    const survived = server.isAlive()
    const disconnected = clients.filter((client) => client.closeCode !== null).length
    const allAckedAfterMs = areAcked() && disconnected === 0 ? Math.round(ackedMs - backMs) : null
    const notConverged = await countDifferent(clients)
    const acked = marks.filter((mark) => makers.isAcked(mark))
    await server.kill('SIGKILL')
    makers.vanish()

    server = await target.start()
    const isLeft = await marksLeft(target, server, documents)
    return {
      bench: 'database-away',
      target: target.name,
      ackMeans: target.ack,
      made: marks.length,
      acked: acked.length,
      lostAcked: acked.filter((mark) => !isLeft(mark)).length,
      lostMade: marks.filter((mark) => !isLeft(mark)).length,
      disconnected,
      survived,
      converged: notConverged === 0 && disconnected === 0,
      allAckedAfterMs,
      ackMs: summary(makers.ackMs),
    }
  } finally {
    await server.kill('SIGKILL')
  }
}
