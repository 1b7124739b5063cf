import { clockLabel, listLabel, minutesLabel } from './clock.ts'
import type { OrderProblem } from './problem.ts'
import { type BrokenRule, type ProblemRule, type RuleKey, placeLabel } from './rules.ts'
import type { ScheduledShot } from './schedule-types.ts'
import type { MealBreak } from './wardrobe.ts'

type Timed = { shots: readonly ScheduledShot[]; meal: MealBreak | null }
type Placed = { at: number; startMin: number; endMin: number }

/**
 * Every rule that an order breaks, each breach with a sentence: rules among shots, hours of sitters (once for each
 * shot that ends after they leave), the meal. `order` holds indices of the problem's shots, `timed` their times.
 */
export function brokenRules(problem: OrderProblem, order: readonly number[], timed: Timed): BrokenRule[] {
  const placed = new Map<number, Placed>()
  order.forEach((shot, at) => {
    const times = timed.shots[at]
    if (times) placed.set(shot, { at, startMin: times.startMin, endMin: times.endMin })
  })
  const broken = problem.rules.flatMap((rule) => {
    const breach = breachOf(problem, rule, placed)
    return breach ? [of(problem, `rule:${rule.ruleId}`, rule.kind, breach.shot, breach.words)] : []
  })
  for (const shot of order) broken.push(...hoursBroken(problem, shot, placed.get(shot)))
  const meal = mealBroken(problem, timed)
  return meal === null ? broken : [...broken, of(problem, 'meal', 'meal', order[0] ?? -1, meal)]
}

function of(problem: OrderProblem, key: RuleKey, kind: BrokenRule['kind'], shot: number, words: string): BrokenRule {
  return { key, kind, shotId: kind === 'meal' ? null : (problem.shots[shot]?.id ?? null), sitterId: null, words }
}

function breachOf(
  problem: OrderProblem,
  rule: ProblemRule,
  placed: ReadonlyMap<number, Placed>,
): { shot: number; words: string } | null {
  const shotName = (shot: number) => `“${problem.shots[shot]?.title ?? ''}”`
  if (rule.kind === 'together') {
    const here = rule.shots.flatMap((shot) => placed.get(shot)?.at ?? [])
    if (here.length < 2 || Math.max(...here) - Math.min(...here) === here.length - 1) return null
    const names = listLabel(rule.shots.filter((shot) => placed.has(shot)).map(shotName))
    return { shot: firstOf(rule.shots, placed), words: `${names} belong together, but other shots lie between them.` }
  }
  const where = placed.get(rule.shot)
  if (!where) return null
  const name = shotName(rule.shot)
  if (rule.kind === 'after') {
    const other = placed.get(rule.after)
    if (!other || other.at < where.at) return null
    return { shot: rule.shot, words: `${name} comes after ${shotName(rule.after)}, but stands before it.` }
  }
  if (rule.kind === 'pin-place') {
    const wanted = rule.index < 0 ? placed.size - 1 : Math.min(rule.index, placed.size - 1)
    if (where.at === wanted) return null
    const place = rule.index < 0 || rule.index >= placed.size ? -1 : rule.index
    return { shot: rule.shot, words: `${name} stays ${placeLabel(place)}, but stands ${placeLabel(where.at)}.` }
  }
  if (rule.kind === 'pin-clock') {
    const lateMin = where.startMin - rule.atMin
    if (lateMin <= rule.toleranceMin) return null
    return {
      shot: rule.shot,
      words: `${name} starts at ${clockLabel(rule.atMin)}, but cannot before ${clockLabel(where.startMin)}, ${minutesLabel(lateMin)} late.`,
    }
  }
  if (where.endMin <= rule.toMin) return null
  const late = minutesLabel(where.endMin - rule.toMin)
  return {
    shot: rule.shot,
    words: `${name} lies between ${clockLabel(rule.fromMin)} and ${clockLabel(rule.toMin)}, but ends at ${clockLabel(where.endMin)}, ${late} late.`,
  }
}

function firstOf(shots: readonly number[], placed: ReadonlyMap<number, Placed>): number {
  const here = shots.filter((shot) => placed.has(shot))
  return here.reduce(
    (first, shot) => ((placed.get(shot)?.at ?? 0) < (placed.get(first)?.at ?? 0) ? shot : first),
    here[0] ?? -1,
  )
}

function hoursBroken(problem: OrderProblem, shot: number, where: Placed | undefined): BrokenRule[] {
  const planned = problem.shots[shot]
  if (!planned || !where) return []
  return planned.wears.flatMap(({ sitter: s }): BrokenRule[] => {
    const sitter = problem.sitters[s]
    if (!sitter?.hours || where.endMin <= sitter.hours[1]) return []
    const words = `${sitter.name} leaves at ${clockLabel(sitter.hours[1])}, but “${planned.title}” ends at ${clockLabel(where.endMin)}, ${minutesLabel(where.endMin - sitter.hours[1])} late.`
    return [{ key: `hours:${sitter.id}`, kind: 'hours', shotId: planned.id, sitterId: sitter.id, words }]
  })
}

function mealBroken(problem: OrderProblem, timed: Timed): string | null {
  if (!problem.meal) return null
  const latest = problem.lightsOnMin + problem.meal.latestAfterMin
  const first = timed.shots[0]
  if (timed.meal) {
    if (timed.meal.startMin <= latest) return null
    return `The meal begins no later than ${clockLabel(latest)}, but the first shot ends at ${clockLabel(timed.meal.startMin)}.`
  }
  if (!first || first.endMin <= latest) return null
  return `The meal begins no later than ${clockLabel(latest)}, but there is no gap between two shots before that.`
}
