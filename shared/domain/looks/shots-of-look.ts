import type { Plan, PlannedShot } from '#shared/domain/plan/read-plan.ts'

/** After every numbered shot. */
const LAST = 1e9

/** The shots a look is seen in: by number in the running order, then the loose ones. */
export function shotsOfLook(plan: Plan, lookId: string): PlannedShot[] {
  return [...plan.shots.values()]
    .filter(({ looks }) => looks.some(({ look }) => look.id === lookId))
    .sort((a, b) => (a.number ?? LAST) - (b.number ?? LAST) || (a.shot.id < b.shot.id ? -1 : 1))
}

/** Shots in words: `shot 2`, `shots 3, 4 and 6`, loose ones by title; empty for none. */
export function shotsInWords(shots: readonly PlannedShot[]): string {
  const numbers = shots.flatMap(({ number }) => (number === null ? [] : [String(number)]))
  const titles = shots.flatMap(({ number, shot }) => (number === null ? [`“${shot.title}”`] : []))
  const [first, ...others] = numbers
  const all = first === undefined ? titles : [`${others.length > 0 ? 'shots' : 'shot'} ${first}`, ...others, ...titles]
  const last = all.at(-1)
  return all.length > 1 && last !== undefined ? `${all.slice(0, -1).join(', ')} and ${last}` : (last ?? '')
}
