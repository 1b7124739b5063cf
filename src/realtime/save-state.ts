import type { Lamp } from '#shared/domain/shoots/readiness.ts'
import { shortInstant } from '#src/lib/format.ts'

/** What the sign on every screen says. One word each: saved, saving, offline, not saved, reload. */
export type SaveState =
  | { kind: 'saved' }
  /** `kept`: this device keeps it until the server has it. */
  | { kind: 'saving'; kept: boolean }
  /** `sinceMs`: when the oldest of the unsent edits was made; null without any. */
  | { kind: 'offline'; unsent: number; sinceMs: number | null }
  | { kind: 'not-saved'; why: string }
  | { kind: 'reload' }

/** The five words and their lamps, the same on every screen. */
export const SAVE_SIGNS: Readonly<Record<SaveState['kind'], { words: string; lamp: Lamp }>> = {
  saved: { words: 'Saved', lamp: 'lit' },
  saving: { words: 'Saving…', lamp: 'half' },
  offline: { words: 'Offline – kept on this device', lamp: 'half' },
  'not-saved': { words: 'Not saved', lamp: 'unlit' },
  reload: { words: 'Reload needed', lamp: 'unlit' },
}

/** "since 14:05", with the day when that is another one. */
export function sinceWords(sinceMs: number, nowMs: number): string {
  const words = shortInstant(sinceMs)
  const [day, time] = words.split(', ')
  return `since ${shortInstant(nowMs).split(', ')[0] === day ? time : words}`
}

/** What is known of one open document. */
export type SaveFacts = {
  /** `brief`: lost a moment ago, or not there yet; nobody needs to be told when it comes back at once. */
  link: 'up' | 'brief' | 'down'
  /** In this visit, everything known here was once acknowledged. */
  settled: boolean
  /** Own edits that the server has not yet called durable. */
  unsent: number
  sinceMs: number | null
  /** The browser's own store keeps the edits until the server has them. */
  kept: boolean
  /** Why the server will not take what was written, when it said so. */
  refused: string | null
  outdated: boolean
}

/** The sign for one document. `saved` is said only when the server called every own edit durable. */
export function saveStateOf({ link, settled, unsent, sinceMs, kept, refused, outdated }: SaveFacts): SaveState {
  if (outdated) return { kind: 'reload' }
  if (refused !== null && unsent > 0) return { kind: 'not-saved', why: refused }
  if (link === 'down') {
    return kept || unsent === 0
      ? { kind: 'offline', unsent, sinceMs }
      : { kind: 'not-saved', why: 'This device cannot keep edits while there is no connection. Leave this page open.' }
  }
  return settled && unsent === 0 ? { kind: 'saved' } : { kind: 'saving', kept: kept || unsent === 0 }
}

const GRAVITY: Readonly<Record<SaveState['kind'], number>> = {
  saved: 0,
  saving: 1,
  offline: 2,
  'not-saved': 3,
  reload: 4,
}

/** The gravest of several documents' signs; unsent edits add up and are as old as the oldest. */
export function gravest(states: readonly SaveState[]): SaveState {
  const top = states.reduce<SaveState>((a, b) => (GRAVITY[b.kind] > GRAVITY[a.kind] ? b : a), { kind: 'saved' })
  if (top.kind === 'saving') return { kind: 'saving', kept: states.every((one) => one.kind !== 'saving' || one.kept) }
  if (top.kind !== 'offline') return top
  const offline = states.filter((state) => state.kind === 'offline')
  const since = offline.flatMap(({ sinceMs }) => (sinceMs === null ? [] : [sinceMs]))
  return {
    kind: 'offline',
    unsent: offline.reduce((sum, { unsent }) => sum + unsent, 0),
    sinceMs: since.length === 0 ? null : Math.min(...since),
  }
}
