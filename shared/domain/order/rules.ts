import type { RuleId, ShotId, SitterId } from '#shared/ids.ts'
import type { Plan, PlannedDay } from '#shared/domain/plan/read-plan.ts'
import { clockLabel, listLabel } from './clock.ts'
import type { OrderProblem } from './problem.ts'

/** Names one thing that can be kept or broken: a rule, a sitter's hours, or the meal. */
export type RuleKey = `rule:${string}` | `hours:${string}` | 'meal'

/** A rule among the shots of one day; shots are indices into the problem's `shots`. */
export type ProblemRule = { ruleId: RuleId } & (
  | { kind: 'pin-place'; shot: number; index: number }
  | { kind: 'pin-clock'; shot: number; atMin: number; toleranceMin: number }
  | { kind: 'after'; shot: number; after: number }
  | { kind: 'together'; shots: readonly number[] }
  | { kind: 'window'; shot: number; fromMin: number; toMin: number }
)

export type BrokenRule = {
  key: RuleKey
  kind: ProblemRule['kind'] | 'hours' | 'meal'
  /** The shot at which it is said; null for what concerns the whole day. */
  shotId: ShotId | null
  sitterId: SitterId | null
  /** One sentence: what is wrong and by how much. */
  words: string
}

/** The rules that hold among this day's shots, and those that cannot be kept because another day holds one of their shots. */
export function problemRules(plan: Plan, planned: PlannedDay): { rules: ProblemRule[]; faults: BrokenRule[] } {
  const at = new Map<string, number>(planned.shots.map((shot, index) => [shot.shot.id, index]))
  const dayOf = new Map<string, number>()
  plan.days.forEach((day, index) => day.shots.forEach((shot) => dayOf.set(shot.shot.id, index)))
  const thisDay = plan.days.indexOf(planned)
  const rules: ProblemRule[] = []
  const faults: BrokenRule[] = []
  const titleOf = (id: string) => plan.shots.get(id)?.shot.title ?? ''
  for (const { id: ruleId, rule } of plan.rules) {
    const fault = (shotId: ShotId, words: string) =>
      faults.push({ key: `rule:${ruleId}`, kind: rule.kind, shotId, sitterId: null, words })
    if (rule.kind === 'together') {
      const living = rule.shotIds.filter((id) => plan.shots.has(id))
      const here = living.flatMap((id) => at.get(id) ?? [])
      const first = living.find((id) => at.has(id))
      if (here.length > 1) rules.push({ ruleId, kind: 'together', shots: [...new Set(here)] })
      if (first !== undefined && here.length < living.length) {
        fault(
          first,
          `${listLabel(living.map((id) => `“${titleOf(id)}”`))} belong together, but not all of them are on this day.`,
        )
      }
      continue
    }
    const shot = at.get(rule.shotId)
    if (shot === undefined) continue
    if (rule.kind === 'after') {
      const after = at.get(rule.afterShotId)
      const otherDay = dayOf.get(rule.afterShotId)
      if (after !== undefined) rules.push({ ruleId, kind: 'after', shot, after })
      else if (plan.shots.has(rule.afterShotId) && (otherDay === undefined || otherDay > thisDay)) {
        const where = otherDay === undefined ? 'is not placed yet' : 'is on a later day'
        fault(rule.shotId, `“${titleOf(rule.shotId)}” comes after “${titleOf(rule.afterShotId)}”, which ${where}.`)
      }
    } else if (rule.kind === 'pin-place') rules.push({ ruleId, kind: 'pin-place', shot, index: rule.index })
    else if (rule.kind === 'pin-clock') {
      rules.push({ ruleId, kind: 'pin-clock', shot, atMin: rule.atMin, toleranceMin: rule.toleranceMin })
    } else rules.push({ ruleId, kind: 'window', shot, fromMin: rule.fromMin, toMin: rule.toMin })
  }
  return { rules, faults }
}

/** Everything of a problem that can be broken by an order: its rules, the hours of its sitters, the meal. */
export function ruleKeys(problem: OrderProblem): RuleKey[] {
  return [
    ...problem.rules.map((rule): RuleKey => `rule:${rule.ruleId}`),
    ...problem.sitters.flatMap((sitter): RuleKey[] => (sitter.hours ? [`hours:${sitter.id}`] : [])),
    ...(problem.meal ? (['meal'] as const) : []),
  ]
}

/** The same day with only these rules; hours that are left out mean the whole day, a meal left out is no meal. */
export function withOnlyRules(problem: OrderProblem, keys: ReadonlySet<RuleKey>): OrderProblem {
  return {
    ...problem,
    rules: problem.rules.filter((rule) => keys.has(`rule:${rule.ruleId}`)),
    sitters: problem.sitters.map((sitter) => (keys.has(`hours:${sitter.id}`) ? sitter : { ...sitter, hours: null })),
    meal: keys.has('meal') ? problem.meal : null,
  }
}

const PLACES = ['first', 'second', 'third', 'fourth', 'fifth', 'sixth', 'seventh', 'eighth', 'ninth', 'tenth'] as const

/** "first", "fourth", "12th", "last" for a 0-based place, -1 being the last. */
export function placeLabel(index: number): string {
  if (index < 0) return 'last'
  return PLACES[index] ?? `${index + 1}th`
}

/** A rule in plain words with the numbers of the order as it stands: "Shot 5 comes after shot 2". */
export function ruleWords(problem: OrderProblem, key: RuleKey): string {
  const shot = (index: number) => `shot ${problem.shots[index]?.number ?? '?'}`
  const capital = (words: string) => words.charAt(0).toUpperCase() + words.slice(1)
  if (key === 'meal') {
    const latest = problem.lightsOnMin + (problem.meal?.latestAfterMin ?? 0)
    return `The meal begins no later than ${clockLabel(latest)}`
  }
  const sitter = problem.sitters.find((candidate) => key === `hours:${candidate.id}`)
  if (sitter?.hours)
    return `${sitter.name} is here from ${clockLabel(sitter.hours[0])} to ${clockLabel(sitter.hours[1])}`
  const rule = problem.rules.find((candidate) => key === `rule:${candidate.ruleId}`)
  if (!rule) return 'A rule that is no longer there'
  if (rule.kind === 'pin-place') return capital(`${shot(rule.shot)} stays ${placeLabel(rule.index)}`)
  if (rule.kind === 'pin-clock') {
    const give = rule.toleranceMin > 0 ? `, ${rule.toleranceMin} min either way at most` : ''
    return capital(`${shot(rule.shot)} starts at ${clockLabel(rule.atMin)}${give}`)
  }
  if (rule.kind === 'after') return capital(`${shot(rule.shot)} comes after ${shot(rule.after)}`)
  if (rule.kind === 'together') return `${capital(listLabel(rule.shots.map(shot)))} follow one another directly`
  return capital(`${shot(rule.shot)} lies between ${clockLabel(rule.fromMin)} and ${clockLabel(rule.toMin)}`)
}
