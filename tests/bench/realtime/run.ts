import { startBenchDatabase } from './database.ts'
import { untilQuiet, withForeignCpu } from './machine.ts'
import type { Cell, Scenario } from './scenarios/scenario.ts'
import { table } from './table.ts'
import { PEERS, createPeer, isInstalled } from './targets/peers.ts'
import { createSconce } from './targets/sconce.ts'
import type { Target } from './targets/target.ts'

/**
 * Runs each scenario against each target, Sconce first, one after the other on a cluster of their own: a line of JSON each on
 * standard output, the tables at the end, and how far it is on standard error. Resolves to whether Sconce kept
 * everything it promises.
 *
 * Generator, server and database share the machine; `others %` is how much of it something else used meanwhile.
 */
export async function runScenarios(
  scenarios: readonly Scenario[],
  options: {
    /** Names of targets. */
    targets: readonly string[]
    /** How long each run waits for others to leave the machine alone, at most. */
    waitS: number
  },
): Promise<boolean> {
  const { targets: wanted, waitS } = options
  const print = (text: string) => process.stdout.write(`${text}\n`)
  const say = (text: string) => process.stderr.write(`${text}\n`)
  const database = await startBenchDatabase()
  const targets: Target[] = []
  const stop = () => void database.remove().finally(() => process.exit(130))
  process.once('SIGINT', stop).once('SIGTERM', stop)
  try {
    if (wanted.includes('sconce')) targets.push(await createSconce(database))
    const peers = PEERS.filter(({ name }) => wanted.includes(name))
    targets.push(...peers.filter(isInstalled).map((peer) => createPeer(peer, database)))
    const missing = peers.filter((peer) => !isInstalled(peer)).map(({ name }) => name)
    if (missing.length > 0) say(`Not installed, and left out: ${missing.join(', ')} (npm run bench -- peers).`)

    const tables = new Map<string, { head: readonly string[]; rows: Cell[][] }>()
    let isGood = true
    for (const scenario of scenarios) {
      for (const target of targets) {
        await untilQuiet(waitS)
        say(`${scenario.name}: ${target.name} …`)
        const { result, foreignCpuPercent } = await withForeignCpu(() => attempt(scenario, target, { database, say }))
        if (!result) continue
        print(JSON.stringify({ ...result.line, foreignCpuPercent }))
        const rows = result.rows.map((row) => [target.name, ...row, foreignCpuPercent])
        const drawn = tables.get(scenario.title) ?? { head: ['server', ...scenario.head, 'others %'], rows: [] }
        tables.set(scenario.title, drawn)
        drawn.rows.push(...rows)
        if (target.name === 'sconce') isGood &&= result.isGood
      }
    }
    for (const [title, { head, rows }] of tables) print(`\n${title}\n${table(head, rows)}`)
    return isGood
  } finally {
    await Promise.all(targets.map((target) => target.close()))
    await database.remove()
  }
}

/** A target that breaks down does not end the run for the others. */
async function attempt(...[scenario, target, bench]: [Scenario, ...Parameters<Scenario['run']>]) {
  try {
    return await scenario.run(target, bench)
  } catch (error) {
    const reason = error instanceof Error ? error.message : String(error)
    return { line: { bench: scenario.name, target: target.name, failed: reason }, rows: [[reason]], isGood: false }
  }
}
