import type { Need } from '#shared/domain/board/schema.ts'
import type { OrderComparison } from '#shared/domain/order/compare.ts'
import { clockLabel, listLabel, minutesLabel } from '#shared/domain/order/clock.ts'
import type { OrderProblem } from '#shared/domain/order/problem.ts'
import type { Proposal } from '#shared/domain/order/propose.ts'
import { placeLabel } from '#shared/domain/order/rules.ts'
import type { Changeover } from '#shared/domain/order/schedule-types.ts'
import type { Plan, PlannedDay, PlannedShot } from '#shared/domain/plan/read-plan.ts'
import type { RuleBody } from '#shared/domain/plan/schema.ts'
import { count, shortDate } from '#src/lib/format.ts'

export const NEED_WORDS: Readonly<Record<Need, string>> = {
  must: 'Needed by the client',
  should: 'Wanted',
  could: 'If there is time',
}

export const ORIENTATION_WORDS = { upright: 'Upright', across: 'Across', square: 'Square' } as const

/** "Day 2, Fri 15 Oct" */
export function dayName({ day }: PlannedDay, index: number): string {
  return day.date ? `Day ${index + 1}, ${shortDate(day.date)}` : `Day ${index + 1}`
}

/** "09:00" for a field; past midnight the clock begins again. */
export function clockField(minutes: number): string {
  return clockLabel(minutes)
}

/** Minutes since midnight of "09:00"; null when it is no time. */
export function minutesOf(clock: string): number | null {
  const match = /^(\d{1,2}):(\d{2})/.exec(clock)
  return match?.[1] && match[2] ? Number(match[1]) * 60 + Number(match[2]) : null
}

/** "Shot 3, Hands on the escapement" */
export function shotName({ number, shot }: PlannedShot): string {
  return number === null ? `“${shot.title}”` : `shot ${number}, ${shot.title}`
}

/** Looks, set and setup of a shot, each in words, also where it is missing. */
export function shotParts({ looks, set, setup }: PlannedShot): { text: string; kind: 'said' | 'setup' | 'missing' }[] {
  const worn = looks.length > 2 ? [`${looks.length} looks`] : looks.map(({ look }) => look.name)
  return [
    worn.length > 0 ? { text: worn.join(', '), kind: 'said' } : { text: 'no look yet', kind: 'missing' },
    set ? { text: set.name, kind: 'said' } : { text: 'no set yet', kind: 'missing' },
    setup ? { text: setup.setup.name, kind: 'setup' } : { text: 'no setup yet', kind: 'missing' },
  ]
}

/** A changeover in one line: where to, who changes while the clock waits, what happens to the lights. */
export function changeWords(changeover: Changeover): string {
  const { setMove, lighting, wardrobe, fromShotId } = changeover
  const parts: string[] = []
  if (setMove) {
    if (fromShotId === null) parts.push(`Rig ${setMove.toSetName}`)
    else if (setMove.otherRoom) parts.push(`Move to ${setMove.toRoomName}`)
    else parts.push(`On to ${setMove.toSetName}`)
  } else if (fromShotId === null && lighting.length > 0) parts.push('Rig')
  for (const change of wardrobe) {
    if (change.onClockMin > 0)
      parts.push(change.first ? `${change.sitterName} gets ready` : `${change.sitterName} into ${change.lookName}`)
  }
  parts.push(...lighting.map((action) => action.what))
  return parts.join(' · ') || 'Get ready'
}

/** A rule as one of its shots has it: "Comes after 1 The Clockmaker, seated". */
export function ruleSentence(rule: RuleBody, plan: Plan, shotId: string): string {
  const name = (id: string) => {
    const planned = plan.shots.get(id)
    if (!planned) return 'a shot that is gone'
    return `${planned.number ?? ''} ${planned.shot.title}`.trim()
  }
  switch (rule.kind) {
    case 'pin-place':
      return `Stays ${placeLabel(rule.index)}`
    case 'pin-clock':
      return rule.toleranceMin > 0
        ? `Starts at ${clockLabel(rule.atMin)}, at most ${minutesLabel(rule.toleranceMin)} later`
        : `Starts at ${clockLabel(rule.atMin)}`
    case 'after':
      return rule.shotId === shotId ? `Comes after ${name(rule.afterShotId)}` : `Comes before ${name(rule.shotId)}`
    case 'together':
      return `Together with ${listLabel(rule.shotIds.filter((id) => id !== shotId).map(name))}`
    case 'window':
      return `Only between ${clockLabel(rule.fromMin)} and ${clockLabel(rule.toMin)}`
  }
}

/** The shots that a rule speaks of. */
export function shotsOfRule(rule: RuleBody): readonly string[] {
  if (rule.kind === 'together') return rule.shotIds
  return rule.kind === 'after' ? [rule.shotId, rule.afterShotId] : [rule.shotId]
}

const NUMBERS = [
  'No',
  'One',
  'Two',
  'Three',
  'Four',
  'Five',
  'Six',
  'Seven',
  'Eight',
  'Nine',
  'Ten',
  'Eleven',
  'Twelve',
] as const

function inWords(number: number): string {
  return NUMBERS[number] ?? String(number)
}

/** "Same twelve shots, nothing dropped. Two pins and one “after” kept." */
export function keptWords(problem: OrderProblem, comparison: OrderComparison): string {
  const kept = new Set(comparison.kept)
  const of = (kinds: readonly string[]) =>
    problem.rules.filter((rule) => kinds.includes(rule.kind) && kept.has(`rule:${rule.ruleId}`)).length
  const parts = [
    [of(['pin-place', 'pin-clock']), 'pin', 'pins'],
    [of(['after']), '“after”', '“afters”'],
    [of(['together']), '“together”', '“togethers”'],
    [of(['window']), 'window', 'windows'],
  ] as const
  const said = parts.flatMap(([number, one, many]) =>
    number === 0 ? [] : [`${inWords(number).toLowerCase()} ${number === 1 ? one : many}`],
  )
  const shots = `Same ${inWords(problem.shots.length).toLowerCase()} shots, nothing dropped.`
  if (said.length === 0) return problem.rules.length === 0 ? shots : `${shots} None of the rules can be kept.`
  const list = listLabel(said)
  return `${shots} ${list.charAt(0).toUpperCase()}${list.slice(1)} kept${of(['pin-place', 'pin-clock', 'after', 'together', 'window']) < problem.rules.length ? `, of ${problem.rules.length} rules` : ''}.`
}

/** What is known about the best there can be. */
export function provenWords(proposal: Proposal): string {
  if (proposal.proven) return 'Proven: no order of these shots takes less.'
  if (proposal.gapMin <= 0) return 'Not proven in every detail, but no order of these shots wraps earlier.'
  return `Not proven: some order may wrap up to ${minutesLabel(proposal.gapMin)} earlier, before ${clockLabel(proposal.leastWrapMin)} none can.`
}

/** What a proposal is, as its title. */
export function proposalTitle(comparison: OrderComparison, isBetter: boolean, proven: boolean): string {
  const { present, proposed } = comparison
  if (!isBetter) return proven ? 'This is the shortest order there is' : 'Nothing shorter was found'
  if (proposed.broken.length < present.broken.length)
    return proposed.broken.length === 0 ? 'A day that keeps every rule' : 'A day that keeps more rules'
  if (proposed.notMade < present.notMade) return 'A day that makes more shots'
  return proposed.wrapMin < present.wrapMin ? 'A shorter day' : 'A calmer day'
}

/** "The proposed order is used: wrap 16:50, 4 shots moved." */
export function usedWords(comparison: OrderComparison): string {
  return `The proposed order is used: wrap ${clockLabel(comparison.proposed.wrapMin)}, ${count(comparison.moved, 'shot')} moved.`
}
