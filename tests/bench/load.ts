import { parseArgs } from 'node:util'
import { runScenarios } from './realtime/run.ts'
import { coldScenario } from './realtime/scenarios/cold.ts'
import { databaseAway } from './realtime/scenarios/database-away.ts'
import { durabilityScenario } from './realtime/scenarios/durability.ts'
import { hostile } from './realtime/scenarios/hostile.ts'
import { idleScenario } from './realtime/scenarios/idle.ts'
import { LOAD, loadScenario } from './realtime/scenarios/load.ts'
import type { Scenario } from './realtime/scenarios/scenario.ts'
import { PEERS } from './realtime/targets/peers.ts'

/**
 * Many people at once, and what else a realtime server has to stand, for Sconce and (`--peers`) for other servers of the same
 * protocol on the same machine and database.
 *
 *   npm run bench -- load                                    10×1, 50×1, 200×1 and 200×40 clients × documents
 *   npm run bench -- load --peers --scenario all --wait 60   everything, compared, each run on a quiet machine if one comes
 *   npm run bench -- load --targets sconce,hocuspocus-4      chosen servers
 *   npm run bench -- load --clients 100 --docs 4 --rate 10 --cursors 5 --seconds 30
 *   npm run bench -- load --scenario durability,database-away --rounds 5
 *   npm run bench -- load --scenario load-200x1 --profile /tmp/server.cpuprofile
 */
const { values } = parseArgs({
  options: {
    scenario: { type: 'string', default: 'load' },
    targets: { type: 'string', default: 'sconce' },
    peers: { type: 'boolean', default: false },
    clients: { type: 'string' },
    docs: { type: 'string' },
    rate: { type: 'string', default: String(LOAD.rate) },
    cursors: { type: 'string', default: String(LOAD.pointerRate) },
    seconds: { type: 'string', default: String(LOAD.seconds) },
    wait: { type: 'string', default: '0' },
    rounds: { type: 'string', default: '20' },
    profile: { type: 'string' },
  },
})
const options = {
  rate: Number(values.rate),
  pointerRate: Number(values.cursors),
  seconds: Number(values.seconds),
  profile: values.profile ?? null,
}
const sizes =
  values.clients === undefined && values.docs === undefined
    ? ([
        [10, 1],
        [50, 1],
        [200, 1],
        [200, 40],
      ] as const)
    : ([[Number(values.clients ?? LOAD.clients), Number(values.docs ?? LOAD.documents)]] as const)

const all: readonly Scenario[] = [
  ...sizes.map(([clients, documents]) => loadScenario({ ...options, clients, documents })),
  coldScenario(1_000),
  coldScenario(10_000),
  durabilityScenario(Number(values.rounds)),
  databaseAway,
  hostile,
  idleScenario(60),
]
const isChosen = (name: string) =>
  values.scenario.split(',').some((word) => word === 'all' || word === name || name.startsWith(`${word}-`))
const chosen = all.filter(({ name }) => isChosen(name))
if (chosen.length === 0) throw new Error(`scenarios: all, ${all.map(({ name }) => name).join(', ')}`)

const targets = values.peers ? ['sconce', ...PEERS.map(({ name }) => name)] : values.targets.split(',')
const isGood = await runScenarios(chosen, { targets, waitS: Number(values.wait) })
process.exit(isGood ? 0 : 1)
