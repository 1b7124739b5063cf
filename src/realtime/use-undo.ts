import { useEffect, useMemo, useSyncExternalStore } from 'react'
import type * as Y from 'yjs'
import type { DocumentKind } from '#shared/realtime/documents.ts'
import { createStore } from './store.ts'
import { type ShootDocuments, useShootContext } from './shoot-realtime.tsx'

export type Undo = {
  undo(): void
  redo(): void
  canUndo: boolean
  canRedo: boolean
  /** Ends the present undo step, so that the next change is a step of its own. */
  stop(): void
}

/** Steps are numbered as they are made, so that undo over several documents goes back in the order of the hand. */
let step = 0
const numbered = new WeakMap<object, number>()
const watched = new WeakSet<Y.UndoManager>()

function watch(manager: Y.UndoManager): void {
  if (watched.has(manager)) return
  watched.add(manager)
  manager.on('stack-item-added', ({ stackItem }: { stackItem: object }) => numbered.set(stackItem, ++step))
}

type Stack = 'undoStack' | 'redoStack'

function latest(managers: readonly Y.UndoManager[], stack: Stack): Y.UndoManager | undefined {
  let found: Y.UndoManager | undefined
  let highest = -1
  for (const manager of managers) {
    const top = manager[stack].at(-1)
    const number = top ? (numbered.get(top) ?? 0) : -1
    if (number > highest) {
      highest = number
      found = manager
    }
  }
  return found
}

function undoStore(documents: ShootDocuments, kinds: readonly DocumentKind[]) {
  const managers = kinds.map((kind) => documents[kind].undo)
  managers.forEach(watch)
  const read = (): Undo => ({
    undo: () => latest(managers, 'undoStack')?.undo(),
    redo: () => latest(managers, 'redoStack')?.redo(),
    canUndo: managers.some((manager) => manager.undoStack.length > 0),
    canRedo: managers.some((manager) => manager.redoStack.length > 0),
    stop: () => managers.forEach((manager) => manager.stopCapturing()),
  })
  const store = createStore(read())
  const refresh = () => store.set(read())
  return {
    store,
    listen() {
      for (const manager of managers) for (const event of EVENTS) manager.on(event, refresh)
      refresh()
      return () => {
        for (const manager of managers) for (const event of EVENTS) manager.off(event, refresh)
      }
    },
  }
}

const EVENTS = ['stack-item-added', 'stack-item-popped', 'stack-item-updated', 'stack-cleared'] as const

/** Undo and redo of one's own changes in these documents. */
export function useUndo(kinds: readonly DocumentKind[]): Undo {
  const { documents } = useShootContext()
  const key = kinds.join()
  // eslint-disable-next-line react-hooks/exhaustive-deps -- `key` stands for the kinds, which are a new array at every render
  const { store, listen } = useMemo(() => undoStore(documents, kinds), [documents, key])
  useEffect(listen, [listen])
  return useSyncExternalStore(store.subscribe, store.get)
}
