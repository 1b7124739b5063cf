import type { Sitter } from '#shared/domain/looks/schema.ts'
import type { Plan, PlannedLook } from '#shared/domain/plan/read-plan.ts'
import type { SignOffState } from '#shared/domain/sign-off/state.ts'
import { count } from '#src/lib/format.ts'

export type Rail = { sitter: Sitter | null; looks: PlannedLook[] }

/** After every numbered shot. */
const NEVER = 1e9

/** Rails in the order their sitters are first photographed, then by name; looks whose sitter is gone come last. */
export function railsOf(plan: Plan, sitters: ReadonlyMap<string, Sitter>): Rail[] {
  const first = new Map<string, number>()
  for (const { number, looks } of plan.shots.values()) {
    if (number === null) continue
    for (const { look } of looks) first.set(look.sitterId, Math.min(first.get(look.sitterId) ?? Infinity, number))
  }
  const rails = new Map<string, Rail>([...sitters.values()].map((sitter) => [String(sitter.id), { sitter, looks: [] }]))
  const nobody: Rail = { sitter: null, looks: [] }
  for (const planned of plan.looks.values()) (rails.get(planned.look.sitterId) ?? nobody).looks.push(planned)
  const sorted = [...rails].sort(
    ([a, x], [b, y]) =>
      (first.get(a) ?? NEVER) - (first.get(b) ?? NEVER) || (x.sitter?.name ?? '').localeCompare(y.sitter?.name ?? ''),
  )
  return [...sorted.map(([, rail]) => rail), ...(nobody.looks.length > 0 ? [nobody] : [])]
}

/** For each look, its pieces that a look before it on the rails wears already, with that look's name. */
export function sharedPieces(looks: readonly PlannedLook[]): Map<string, Map<string, string>> {
  const seen = new Map<string, string>()
  return new Map(
    looks.map(({ look, pieces }) => {
      const shared = new Map<string, string>(
        pieces.flatMap(({ id }) => (seen.has(id) ? [[String(id), seen.get(id) ?? ''] as const] : [])),
      )
      for (const { id } of pieces) if (!seen.has(id)) seen.set(id, look.name)
      return [look.id, shared]
    }),
  )
}

/** "4 looks on 3 sitters · 2 signed off, 1 changed since" */
export function sumOf(plan: Plan, rails: number, stateOf: (lookId: string) => SignOffState): string {
  if (plan.looks.size === 0) return ''
  const kinds = [...plan.looks.keys()].map((lookId) => stateOf(lookId).kind)
  const of = (kind: SignOffState['kind'], words: string) => {
    const number = kinds.filter((other) => other === kind).length
    return number > 0 ? [`${number} ${words}`] : []
  }
  const states = [
    ...of('signed off', 'signed off'),
    ...of('changed since', 'changed since'),
    ...of('change asked', 'to change'),
    ...of('waiting', 'waiting'),
  ].join(', ')
  return `${count(plan.looks.size, 'look')} on ${count(rails, 'sitter')} · ${states}`
}
