import { badRows } from '../hostile/bad-rows.ts'
import { garbageFrames, updateWithGap } from '../hostile/frames.ts'
import { foreignPresence } from '../hostile/presence.ts'
import { writingReader } from '../hostile/rights.ts'
import { type Answer, type HostileCase, onStage } from '../hostile/stage.ts'
import { flood, hugeMessage, neverReads } from '../hostile/too-much.ts'
import type { Scenario } from './scenario.ts'

const CASES: readonly HostileCase[] = [
  garbageFrames,
  updateWithGap,
  foreignPresence,
  hugeMessage,
  neverReads,
  flood,
  writingReader,
  badRows,
]

/** What a server does with clients that misbehave: one question, one answer. */
export const hostile: Scenario = {
  name: 'hostile',
  title: 'misbehaving clients',
  head: ['question', 'answer', ''],
  run: async (target, { database, say }) => {
    const answers: Answer[] = []
    for (const one of CASES) {
      if (one.isFor?.(target) === false) continue
      say(`  ${one.name}`)
      answers.push(...(await onStage(one, target, database)))
    }
    return {
      line: { bench: 'hostile', target: target.name, answers },
      isGood: answers.every(({ isGood }) => isGood === true),
      rows: answers.map(({ question, isGood, detail }) => [question, wordFor(isGood), detail ?? '']),
    }
  },
}

function wordFor(isGood: boolean | null): string {
  return isGood === null ? '–' : isGood ? 'yes' : 'NO'
}
