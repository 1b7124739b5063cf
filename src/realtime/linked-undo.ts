import type * as Y from 'yjs'

type End = { manager: Y.UndoManager; step: object | undefined }
type Popped = { stackItem: object; type: 'undo' | 'redo' }

/**
 * Makes the newest steps of two documents one step of the hand: undoing or redoing one does the same with the other,
 * for as long as the other's is still the newest there.
 */
export function linkNewestSteps(a: Y.UndoManager, b: Y.UndoManager): void {
  let isFollowing = false
  const follow =
    (mine: End, its: End) =>
    ({ stackItem, type }: Popped) => {
      if (isFollowing || stackItem !== mine.step) return
      const [from, to] = type === 'undo' ? (['undoStack', 'redoStack'] as const) : (['redoStack', 'undoStack'] as const)
      if (its.manager[from].at(-1) !== its.step) {
        // More was done there since: from here on each goes its own way.
        mine.step = undefined
        its.step = undefined
        return
      }
      isFollowing = true
      const isTaken = takeNewest(its.manager, type)
      isFollowing = false
      for (const end of [mine, its]) end.step = isTaken ? end.manager[to].at(-1) : undefined
    }
  const one: End = { manager: a, step: a.undoStack.at(-1) }
  const other: End = { manager: b, step: b.undoStack.at(-1) }
  a.on('stack-item-popped', follow(one, other))
  b.on('stack-item-popped', follow(other, one))
}

/** The newest step and no other: when others have overwritten all of it, Yjs would go on to the next older one. */
function takeNewest(manager: Y.UndoManager, type: 'undo' | 'redo'): boolean {
  const stack = manager[`${type}Stack`]
  const older = stack.splice(0, stack.length - 1)
  try {
    return manager[type]() !== null
  } finally {
    stack.unshift(...older)
    // Nothing was cleared; whoever looked at the stack meanwhile looks again.
    manager.emit('stack-cleared', [{ undoStackCleared: false, redoStackCleared: false }])
  }
}
