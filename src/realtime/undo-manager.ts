import * as Y from 'yjs'
import { LOCAL_ORIGIN } from '#shared/realtime/collection.ts'

/** What was replaced in one undo step: field by field, the value before the step. */
type Replaced = Map<Y.Map<unknown>, Map<string, unknown>>

type FieldChange = { action: 'add' | 'update' | 'delete'; oldValue: unknown }
type StackEvent = {
  stackItem: object
  changedParentTypes: {
    values(): Iterable<readonly { target: unknown; changes: { keys: ReadonlyMap<string, FieldChange> } }[]>
  }
}

/** In place of a value: there was none, or none that can be put back. */
const ABSENT = Symbol('absent')

/** Not one of a person's own steps: what this writes is never undone. */
const REFILL_ORIGIN = Object.freeze({ kind: 'undo-refill' as const })

/**
 * Undo of one's own changes. When two people write the same field at the same moment, Yjs takes the later value away on
 * undo but puts nothing back: the field is gone and with it, for everybody, the item. Here the value from before the
 * step comes back. A field that somebody has written since keeps what they wrote.
 */
export function createUndo(doc: Y.Doc, roots: Y.Map<unknown>[]): Y.UndoManager {
  const undo = new Y.UndoManager(roots, { trackedOrigins: new Set([LOCAL_ORIGIN]), captureTimeout: 500 })
  const memory = new WeakMap<object, Replaced>()

  const remember = ({ stackItem, changedParentTypes }: StackEvent) => {
    const replaced: Replaced = memory.get(stackItem) ?? new Map<Y.Map<unknown>, Map<string, unknown>>()
    memory.set(stackItem, replaced)
    for (const { target, changes } of new Set([...changedParentTypes.values()].flat())) {
      if (!(target instanceof Y.Map)) continue
      const fields = replaced.get(target) ?? new Map<string, unknown>()
      replaced.set(target, fields)
      for (const [key, { action, oldValue }] of changes.keys) {
        if (fields.has(key)) continue
        fields.set(key, action === 'add' || oldValue instanceof Y.AbstractType ? ABSENT : oldValue)
      }
    }
  }

  const refill = ({ stackItem }: { stackItem: object }) => {
    doc.transact(() => {
      for (const [map, fields] of memory.get(stackItem) ?? [])
        for (const [key, value] of fields) if (value !== ABSENT && !map.has(key)) map.set(key, value)
    }, REFILL_ORIGIN)
  }

  undo.on('stack-item-added', remember)
  undo.on('stack-item-updated', remember)
  undo.on('stack-item-popped', refill)
  return undo
}
