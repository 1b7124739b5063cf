import type { Lamp } from '#shared/domain/shoots/readiness.ts'

/** What the sign on every screen says. One word each: saved, saving, offline, not saved, reload. */
export type SaveState =
  | { kind: 'saved' }
  | { kind: 'saving' }
  | { kind: 'offline'; unsent: number }
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

/** What is known of one open document. */
export type SaveFacts = {
  connected: boolean
  /** The first exchange after connecting is done and acknowledged. */
  settled: boolean
  /** Own edits that the server has not yet called durable. */
  unsent: number
  /** The browser's own store keeps the edits until the server has them. */
  kept: boolean
  /** Why the server will not take what was written, when it said so. */
  refused: string | null
  outdated: boolean
}

/** The sign for one document. `saved` is said only when the server called every own edit durable. */
export function saveStateOf(facts: SaveFacts): SaveState {
  if (facts.outdated) return { kind: 'reload' }
  if (facts.refused !== null && facts.unsent > 0) return { kind: 'not-saved', why: facts.refused }
  if (!facts.connected) {
    return facts.kept || facts.unsent === 0
      ? { kind: 'offline', unsent: facts.unsent }
      : { kind: 'not-saved', why: 'This device cannot keep edits while there is no connection. Leave this page open.' }
  }
  return facts.settled && facts.unsent === 0 ? { kind: 'saved' } : { kind: 'saving' }
}

const GRAVITY: Readonly<Record<SaveState['kind'], number>> = {
  saved: 0,
  saving: 1,
  offline: 2,
  'not-saved': 3,
  reload: 4,
}

/** The gravest of several documents' signs; unsent edits add up. */
export function gravest(states: readonly SaveState[]): SaveState {
  const unsent = states.reduce((sum, state) => sum + (state.kind === 'offline' ? state.unsent : 0), 0)
  const top = states.reduce<SaveState>((a, b) => (GRAVITY[b.kind] > GRAVITY[a.kind] ? b : a), { kind: 'saved' })
  return top.kind === 'offline' ? { kind: 'offline', unsent } : top
}
