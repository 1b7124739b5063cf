import * as Y from 'yjs'

/** One update for several, or the several when Yjs cannot merge them: nothing may stand still for one of them. */
export function mergedUpdates(updates: readonly Uint8Array[]): readonly Uint8Array[] {
  if (updates.length === 1) return updates
  try {
    return [Y.mergeUpdates([...updates])]
  } catch {
    return updates
  }
}
