import { runScenarios } from './realtime/run.ts'
import { coldScenario } from './realtime/scenarios/cold.ts'
import { durabilityScenario } from './realtime/scenarios/durability.ts'
import { hostile } from './realtime/scenarios/hostile.ts'
import { loadScenario } from './realtime/scenarios/load.ts'

/**
 * The realtime server in a few minutes: ten people on one document, a newcomer's first sync, kill -9, misbehaving
 * clients. Fails when something is lost, differs or gets through. `npm run bench -- load` has the large ones.
 */
const scenarios = [loadScenario({}), coldScenario(1_000), durabilityScenario(5), hostile]
const isGood = await runScenarios(scenarios, { targets: ['sconce'], waitS: 0 })
process.exit(isGood ? 0 : 1)
