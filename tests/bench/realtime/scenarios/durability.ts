import { performance } from 'node:perf_hooks'
import { pause } from '#tests/realtime/support/client.ts'
import { round, summary } from '../stats.ts'
import { fourOf } from '../table.ts'
import type { Target } from '../targets/target.ts'
import { MarkMakers, marksLeft } from './marks.ts'
import type { Scenario } from './scenario.ts'

const CLIENTS = 10
const DOCUMENTS = 2
const MARKS_PER_SECOND = 10
/** Seconds of work before the kill, round by round: fixed, so that all targets meet the same moments. */
const KILL_AFTER_S = [3.1, 4.7, 6.3, 8.9, 11.7, 2.3, 5.5, 7.7]
/** For what the server had sent before it died and the kernel still holds. */
const ON_ITS_WAY_MS = 50

/**
 * People edit, the server is killed with -9, all of them are gone at the same moment, it starts again and a newcomer
 * looks. Nothing comes back from anybody's memory: what is missing was lost.
 */
export function durabilityScenario(rounds: number): Scenario {
  return {
    name: 'durability',
    title: `kill -9, ${CLIENTS} clients on ${DOCUMENTS} documents, ${MARKS_PER_SECOND} edits/s each`,
    head: [
      'rounds',
      'ack means',
      'edits made',
      'acked',
      'LOST of acked',
      'seen by a peer',
      'LOST of seen',
      'lost of made',
      'oldest loss ms',
      'ack ms p50/p95/p99/max',
    ],
    run: async (target) => {
      const ackMs: number[] = []
      const each: Awaited<ReturnType<typeof killOnce>>[] = []
      for (let i = 0; i < rounds; i++) {
        each.push(await killOnce(target, KILL_AFTER_S[i % KILL_AFTER_S.length] ?? 1, ackMs))
      }
      const sum = (key: Exclude<keyof (typeof each)[number], 'killAfterS'>) =>
        each.reduce((total, round) => total + round[key], 0)
      const line = {
        bench: 'durability',
        target: target.name,
        ackMeans: target.ack,
        rounds,
        made: sum('made'),
        acked: target.ack === 'none' ? null : sum('acked'),
        lostAcked: target.ack === 'none' ? null : sum('lostAcked'),
        seen: sum('seen'),
        lostSeen: sum('lostSeen'),
        lostMade: sum('lostMade'),
        oldestLossMs: Math.max(0, ...each.map((round) => round.oldestLossMs)),
        ackMs: summary(ackMs),
        each,
      }
      return {
        line,
        isGood: line.lostAcked === 0,
        rows: [
          [
            rounds,
            line.ackMeans,
            line.made,
            line.acked,
            line.lostAcked,
            line.seen,
            line.lostSeen,
            line.lostMade,
            line.oldestLossMs,
            fourOf(line.ackMs),
          ],
        ],
      }
    },
  }
}

async function killOnce(target: Target, killAfterS: number, ackMs: number[]) {
  const documents = await target.addDocuments(DOCUMENTS, CLIENTS / DOCUMENTS)
  let server = await target.start()
  try {
    const makers = await MarkMakers.sitDown(target, server, documents, CLIENTS)
    await makers.make(MARKS_PER_SECOND, killAfterS)
    const killedMs = performance.now()
    await server.kill('SIGKILL')
    await pause(ON_ITS_WAY_MS)
    makers.vanish()
    ackMs.push(...makers.ackMs)

    server = await target.start()
    const isLeft = await marksLeft(target, server, documents)
    const { marks } = makers
    const lost = marks.filter((mark) => !isLeft(mark))
    return {
      killAfterS,
      made: marks.length,
      acked: marks.filter((mark) => makers.isAcked(mark)).length,
      seen: marks.filter((mark) => makers.isSeen(mark)).length,
      lostMade: lost.length,
      lostAcked: lost.filter((mark) => makers.isAcked(mark)).length,
      lostSeen: lost.filter((mark) => makers.isSeen(mark)).length,
      oldestLossMs: lost[0] ? round(killedMs - lost[0].atMs, 0) : 0,
    }
  } finally {
    await server.kill('SIGKILL')
  }
}
