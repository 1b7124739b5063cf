import * as Y from 'yjs'
import { LOCAL_ORIGIN } from '#shared/realtime/collection.ts'

/** What was replaced in one undo step: field by field, the value before the step. */
type Replaced = Map<Y.Map<unknown>, Map<string, unknown>>

const REPLACED = 'replaced'

/** Not one of a person's own steps: what this writes is never undone. */
const REFILL_ORIGIN = Object.freeze({ kind: 'undo-refill' as const })

type FieldChange = { action: 'add' | 'update' | 'delete'; oldValue: unknown }
type StackEvent = {
  stackItem: { meta: Map<unknown, unknown> }
  changedParentTypes: { values(): Iterable<readonly { target: unknown; changes: { keys: ReadonlyMap<string, FieldChange> } }[]> }
}

function replacedIn({ meta }: StackEvent['stackItem']): Replaced {
  const known = meta.get(REPLACED)
  // Nobody else writes under this name.
  return known instanceof Map ? (known as Replaced) : new Map()
}

function rememberReplaced({ stackItem, changedParentTypes }: StackEvent): void {
  const replaced = replacedIn(stackItem)
  stackItem.meta.set(REPLACED, replaced)
  const events = new Set([...changedParentTypes.values()].flat())
  for (const event of events) {
    const { target } = event
    if (!(target instanceof Y.Map)) continue
    const fields = replaced.get(target) ?? new Map<string, unknown>()
    replaced.set(target, fields)
    for (const [key, { action, oldValue }] of event.changes.keys) {
      if (action === 'update' && !fields.has(key) && !(oldValue instanceof Y.AbstractType)) fields.set(key, oldValue)
    }
  }
}

/**
 * Undo of one's own changes. When two people write the same field at the same moment, Yjs takes the later value away on
 * undo but puts nothing back: the field is gone and with it, for everybody, the item. Here the value from before the
 * step comes back. A field that somebody has written since keeps what they wrote.
 */
export function createUndo(doc: Y.Doc, roots: Y.Map<unknown>[]): Y.UndoManager {
  const undo = new Y.UndoManager(roots, { trackedOrigins: new Set([LOCAL_ORIGIN]), captureTimeout: 500 })
  undo.on('stack-item-added', rememberReplaced)
  undo.on('stack-item-updated', rememberReplaced)
  undo.on('stack-item-popped', ({ stackItem }) => {
    doc.transact(() => {
      for (const [map, fields] of replacedIn(stackItem)) for (const [key, value] of fields) if (!map.has(key)) map.set(key, value)
    }, REFILL_ORIGIN)
  })
  return undo
}
