import { pause, until } from '#tests/realtime/support/client.ts'
import { BenchClient, type FirstSync } from '../client.ts'
import { cpuSecondsOf, residentMiB } from '../machine.ts'
import type { ServerChild } from '../server-child.ts'
import { round, summary } from '../stats.ts'
import { fourOf } from '../table.ts'
import type { BenchDocument, Target } from '../targets/target.ts'
import type { Scenario } from './scenario.ts'

const WARM_REPEATS = 10
const COLD_REPEATS = 5
const AT_ONCE = 250
const STORED_MS = 60_000

/** One author makes the whole document within a minute, which no person does. */
const LIMITS = { structsPerMinute: 10_000_000, bytesPerSecond: 1 << 30, burstBytes: 1 << 30 }

/** How long a newcomer waits for a document of so many items: held in memory, and first thing after a restart. */
export function coldScenario(items: number): Scenario {
  return {
    name: `cold-${items}`,
    title: 'first sync',
    head: [
      'items',
      'bytes',
      'warm ms p50/p95/p99/max',
      'after a restart ms p50/p95/p99/max',
      'of it applying ms p50',
      'server CPU ms',
      'server MiB',
    ],
    run: async (target) => {
      const line = await runCold(target, items)
      return {
        line,
        isGood: true,
        rows: [
          [
            items,
            line.bytes,
            fourOf(line.warmMs),
            fourOf(line.coldMs),
            line.applyMs?.p50 ?? null,
            line.serverCpuMsPerSync,
            line.serverMiB,
          ],
        ],
      }
    },
  }
}

async function runCold(target: Target, items: number) {
  const [document, other] = await target.addDocuments(2, 2)
  if (!document || !other) throw new Error('no document')
  const open = (server: ServerChild, which: BenchDocument, seat: number) =>
    new BenchClient(which.seat(server, seat), { dialect: target.dialect })
  const firstSync = async (server: ServerChild): Promise<FirstSync> => {
    const client = open(server, document, 1)
    const measured = await client.connect()
    if (client.items.size !== items) throw new Error(`${client.items.size} of ${items} items came`)
    client.close()
    await pause(20)
    return measured
  }
  /** The first connection of a process pays for its modules and its way to the database: pay at another document. */
  const pay = async (server: ServerChild) => {
    const client = open(server, other, 0)
    await client.connect()
    client.close()
  }

  let server = await target.start(LIMITS)
  try {
    const author = open(server, document, 0)
    await author.connect()
    for (let i = 0; i < items; i += AT_ONCE) {
      author.addItems(Math.min(AT_ONCE, items - i), i)
      await pause(10)
    }
    if (target.ack !== 'none') await until(() => author.acked === author.sent, STORED_MS)
    await pay(server)
    await pause(target.settleMs)

    const serverMiB = residentMiB(server.pid, 'now')
    const cpuBefore = cpuSecondsOf(server.pid)
    const warm: FirstSync[] = []
    for (let i = 0; i < WARM_REPEATS; i++) warm.push(await firstSync(server))
    const serverCpu = cpuSecondsOf(server.pid) - cpuBefore
    author.close()
    await pause(target.settleMs)

    const cold: FirstSync[] = []
    for (let i = 0; target.isPersistent && i < COLD_REPEATS; i++) {
      await server.kill('SIGTERM')
      server = await target.start(LIMITS)
      await pay(server)
      cold.push(await firstSync(server))
    }
    return {
      bench: 'cold',
      target: target.name,
      items,
      bytes: warm[0]?.bytes ?? 0,
      warmMs: summary(warm.map(({ ms }) => ms)),
      coldMs: summary(cold.map(({ ms }) => ms)),
      applyMs: summary(warm.map(({ applyMs }) => applyMs)),
      serverCpuMsPerSync: round((serverCpu * 1000) / WARM_REPEATS),
      serverMiB,
    }
  } finally {
    await server.kill('SIGKILL')
  }
}
