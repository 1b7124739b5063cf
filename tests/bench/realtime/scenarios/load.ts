import { monitorEventLoopDelay, performance } from 'node:perf_hooks'
import { writeFileSync } from 'node:fs'
import { pause } from '#tests/realtime/support/client.ts'
import { type BenchClient, fingerprint } from '../client.ts'
import { EditBook } from '../edit-book.ts'
import { cpuSecondsOf, ownCpuSeconds, resetPeak, residentMiB } from '../machine.ts'
import { keepPace } from '../pace.ts'
import { hottest } from '../profile.ts'
import { round, summary } from '../stats.ts'
import type { Target } from '../targets/target.ts'
import { fourOf } from '../table.ts'
import { seatPeople } from './people.ts'
import type { Bench, Scenario } from './scenario.ts'

/**
 * So many clients on so many documents, each moving an item (two numbers of a Y.Map in one transaction) so many times a
 * second: how long until a peer has an edit and until its author is told that it is kept, and what that costs.
 */
export type LoadOptions = {
  clients: number
  documents: number
  /** Edits of one client a second. */
  rate: number
  /** Movements of one client's pointer a second. */
  pointerRate: number
  seconds: number
  /** A file for the server's CPU profile of the measured time; its hottest functions are said. */
  profile: string | null
}

export const LOAD: LoadOptions = { clients: 10, documents: 1, rate: 5, pointerRate: 0, seconds: 15, profile: null }

const WARM_UP_MS = 2_000
const DRAIN_MS = 60_000
const ITEMS = 100
const WALL = 4_000
const HOTTEST = 40

export function loadScenario(options: Partial<LoadOptions>): Scenario {
  const chosen = { ...LOAD, ...options }
  return {
    name: `load-${chosen.clients}x${chosen.documents}`,
    title: 'load',
    head: [
      'clients × documents',
      'edits/s (wanted)',
      'to a peer ms p50/p95/p99/max',
      'ack ms p50/p95/p99/max',
      'server CPU s',
      'database CPU s',
      'CPU ms/1,000 deliveries',
      'peak MiB',
      'drain ms',
      'equal at the end',
      'generator CPU s',
      'late ms p99',
    ],
    run: async (target, bench) => {
      const line = await runLoad(target, bench, chosen)
      const isGood = line.converged && line.unacknowledged === 0
      return {
        line,
        isGood,
        rows: [
          [
            `${chosen.clients} × ${chosen.documents}`,
            `${line.editsPerSecond} (${line.wanted})`,
            fourOf(line.peerMs),
            fourOf(line.ackMs),
            line.serverCpuSeconds,
            line.databaseCpuSeconds,
            line.cpuMsPer1000Deliveries,
            line.serverPeakMiB,
            line.drainMs,
            line.converged ? 'yes' : `NO: ${line.notConverged} differ, ${line.disconnected} dropped`,
            line.generator.cpuSeconds,
            line.generator.lateMs?.p99 ?? null,
          ],
        ],
      }
    },
  }
}

async function runLoad(target: Target, { database, say }: Bench, options: LoadOptions) {
  const { clients: count, documents, rate, pointerRate, seconds, profile } = options
  const items = Math.max(ITEMS, Math.ceil(count / documents))
  const server = await target.start()
  try {
    const { clients, joinMs } = await seatPeople(target, server, { clients: count, documents, items })
    const book = new EditBook({ expectsAcks: target.ack !== 'none' })
    clients.forEach((client) => book.follow(client))

    const lateMs: number[] = []
    const move = (i: number, late: number) => {
      const client = clients[i]
      if (!client) return
      // A counting client keeps to an item of its own, of which its view is current.
      const item = client.isLive ? Math.floor(Math.random() * items) : Math.floor(i / documents)
      book.edit(client, () => client.move(`item-${item}`, onWall(), onWall()))
      if (book.isMeasuring) lateMs.push(late)
    }
    let isOver = false
    const pace = { count, isOver: () => isOver }
    const moving = keepPace({ ...pace, perSecond: rate, act: move })
    const pointing =
      pointerRate > 0
        ? keepPace({ ...pace, perSecond: pointerRate, act: (i) => clients[i]?.point(onWall(), onWall()) })
        : Promise.resolve(0)

    await pause(WARM_UP_MS)
    const read = () => ({
      server: cpuSecondsOf(server.pid),
      database: cpuSecondsOf(database.pid()),
      own: ownCpuSeconds(),
      updates: total(clients, 'updatesReceived'),
      presence: total(clients, 'presenceReceived'),
      bytes: total(clients, 'bytesReceived'),
      atMs: performance.now(),
    })
    resetPeak(server.pid)
    if (profile !== null) await server.startProfile()
    const loop = monitorEventLoopDelay({ resolution: 5 })
    loop.enable()
    const before = read()
    book.isMeasuring = true
    await pause(seconds * 1000)
    isOver = true
    const [skipped] = await Promise.all([moving, pointing])
    const windowMs = performance.now() - before.atMs
    const { made } = book
    const drainMs = await drain(clients, book)
    loop.disable()
    const after = read()
    const serverPeakMiB = residentMiB(server.pid, 'peak')
    if (profile !== null) {
      const recorded = await server.stopProfile()
      writeFileSync(profile, JSON.stringify(recorded))
      say(`${target.name}, percent of busy time and ms in ${Math.round((windowMs + drainMs) / 1000)} s (${profile}):`)
      for (const { where, percent, ms } of hottest(recorded, HOTTEST)) say(`${percent} % ${ms} ms ${where}`)
    }

    const disconnected = clients.filter((client) => client.closeCode !== null)
    const notConverged = await countDifferent(clients)
    const deliveries = book.deliveries()
    const serverCpu = after.server - before.server
    return {
      bench: 'load',
      target: target.name,
      ackMeans: target.ack,
      ...{ clients: count, documents, rate, pointerRate, seconds, items },
      editsPerSecond: round(made / (windowMs / 1000)),
      wanted: count * rate,
      skipped,
      peerMs: summary(book.peerMs),
      ackMs: summary(book.ackMs),
      unacknowledged: book.unacknowledged(),
      seenByLivePeers: `${book.seen}/${book.expected()}`,
      framesDelivered: after.updates - before.updates,
      presenceFrames: after.presence - before.presence,
      deliveries,
      deliveredMB: round((after.bytes - before.bytes) / 1e6),
      drainMs: Math.round(drainMs),
      serverCpuSeconds: round(serverCpu, 2),
      databaseCpuSeconds: round(after.database - before.database, 2),
      cpuMsPer1000Deliveries: deliveries > 0 ? round((serverCpu * 1e6) / deliveries, 2) : null,
      serverPeakMiB,
      joinMs: summary(joinMs),
      disconnected: disconnected.length,
      closeCodes: [...new Set(disconnected.map((client) => client.closeCode))],
      refusals: [...new Set(clients.flatMap((client) => client.refusals))],
      converged: notConverged === 0 && disconnected.length === 0,
      notConverged,
      generator: {
        cpuSeconds: round(after.own - before.own, 2),
        loopDelayP99Ms: round(loop.percentile(99) / 1e6),
        lateMs: summary(lateMs),
      },
    }
  } finally {
    await server.kill('SIGKILL')
  }
}

function onWall(): number {
  return Math.floor(Math.random() * WALL)
}

function total(
  clients: readonly BenchClient[],
  what: 'updatesReceived' | 'presenceReceived' | 'bytesReceived',
): number {
  return clients.reduce((sum, client) => sum + client[what], 0)
}

/** Until all live peers have seen all, all is acknowledged and nothing comes any more. Returns the milliseconds. */
async function drain(clients: readonly BenchClient[], book: EditBook): Promise<number> {
  const startedMs = performance.now()
  const isIn = () => performance.now() - startedMs < DRAIN_MS
  const expected = book.expected()
  while (isIn() && (book.seen < expected || book.unacknowledged() > 0)) await pause(10)
  const endedMs = performance.now()
  let last = -1
  while (isIn() && last !== total(clients, 'updatesReceived')) {
    last = total(clients, 'updatesReceived')
    await pause(100)
  }
  return endedMs - startedMs
}

/** How many clients have another document than the first at the same one, once the counting ones have caught up. */
export async function countDifferent(clients: readonly BenchClient[]): Promise<number> {
  const first = new Map<string, string>()
  let different = 0
  for (const client of clients) {
    if (client.closeCode !== null) continue
    if (!client.isLive && !(await client.catchUp())) different++
    const print = fingerprint(client)
    const name = client.seat.documentName
    if (!first.has(name)) first.set(name, print)
    if (first.get(name) !== print) different++
  }
  return different
}
