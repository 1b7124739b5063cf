import { differences } from './differences.ts'
import { fingerprintOf } from './fingerprint.ts'
import type { ANSWERS, FrozenLook, LookDifference } from './schema.ts'

/** An answer as far as a look's state depends on it. `atMs`: an instant, ms since 1970 UTC. */
export type Answer = {
  answer: (typeof ANSWERS)[number]
  fingerprint: string
  frozen: FrozenLook
  words: string
  name: string
  atMs: number
}

export type SignOffState<A extends Answer = Answer> =
  | { kind: 'waiting' }
  | { kind: 'signed off'; answer: A }
  /** Signed off once, another by now. */
  | { kind: 'changed since'; answer: A; differences: LookDifference[] }
  /** `changedSince`: the look was altered after the change was asked for, and waits to be looked at again. */
  | { kind: 'change asked'; answer: A; changedSince: boolean; differences: LookDifference[] }

/**
 * Where a look stands with the client. The newest answer given to exactly this version decides; a look changed back to
 * a version that was signed off is signed off again. Without an answer to this version the newest answer of all counts.
 *
 * @param history the answers to this one look, in any order.
 */
export function signOffState<A extends Answer>(history: readonly A[], current: FrozenLook): SignOffState<A> {
  const newestFirst = [...history].sort((a, b) => b.atMs - a.atMs)
  const fingerprint = fingerprintOf(current)
  const exact = newestFirst.find((answer) => answer.fingerprint === fingerprint)
  if (exact) {
    return exact.answer === 'signed off'
      ? { kind: 'signed off', answer: exact }
      : { kind: 'change asked', answer: exact, changedSince: false, differences: [] }
  }
  const newest = newestFirst[0]
  if (!newest) return { kind: 'waiting' }
  const changes = differences(newest.frozen, current)
  return newest.answer === 'signed off'
    ? { kind: 'changed since', answer: newest, differences: changes }
    : { kind: 'change asked', answer: newest, changedSince: true, differences: changes }
}

/** The lamp of a look: lit when signed off as it stands, half when answered otherwise, unlit while nobody has answered. */
export function signOffLamp(state: SignOffState): 'unlit' | 'half' | 'lit' {
  switch (state.kind) {
    case 'waiting':
      return 'unlit'
    case 'signed off':
      return 'lit'
    case 'changed since':
    case 'change asked':
      return 'half'
  }
}

/** A look's state in a word or two, for the list and the lamp's name. */
export function signOffWords(state: SignOffState): string {
  switch (state.kind) {
    case 'waiting':
      return 'Waiting for an answer'
    case 'signed off':
      return 'Signed off'
    case 'changed since':
      return 'Changed since'
    case 'change asked':
      return state.changedSince ? 'Changed as asked, look again' : 'Change asked for'
  }
}
