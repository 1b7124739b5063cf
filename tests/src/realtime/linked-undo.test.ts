import { describe, expect, it } from 'vitest'
import * as Y from 'yjs'
import { LOCAL_ORIGIN } from '#shared/realtime/collection.ts'
import { linkNewestSteps } from '#src/realtime/linked-undo.ts'
import { createUndo } from '#src/realtime/undo-manager.ts'

function oneDocument() {
  const doc = new Y.Doc()
  const root = doc.getMap<unknown>('things')
  const undo = createUndo(doc, [root])
  return {
    undo,
    write(value: number) {
      undo.stopCapturing()
      doc.transact(() => root.set('value', value), LOCAL_ORIGIN)
      undo.stopCapturing()
    },
    overwrite: (value: number) => doc.transact(() => root.set('value', value), 'somebody else'),
    value: () => root.get('value'),
  }
}

function pair() {
  const board = oneDocument()
  const plan = oneDocument()
  for (const one of [board, plan]) {
    one.write(1)
    one.write(2)
  }
  linkNewestSteps(board.undo, plan.undo)
  return { board, plan, values: () => [board.value(), plan.value()] }
}

describe('linkNewestSteps', () => {
  it('undoes and redoes both with either, again and again, and no other step', () => {
    const { board, plan, values } = pair()
    for (const [one, other] of [
      [board, plan],
      [plan, board],
    ] as const) {
      one.undo.undo()
      expect(values()).toEqual([1, 1])
      other.undo.redo()
      expect(values()).toEqual([2, 2])
    }
    board.undo.undo()
    board.undo.undo()
    expect(values()).toEqual([undefined, 1])
    board.undo.redo()
    expect(values()).toEqual([1, 1])
    board.undo.redo()
    expect(values()).toEqual([2, 2])
  })

  it('leaves what was done since in the other document, and the two apart', () => {
    const { board, plan, values } = pair()
    plan.write(3)
    board.undo.undo()
    expect(values()).toEqual([1, 3])
    plan.undo.undo()
    plan.undo.undo()
    expect(values()).toEqual([1, 1])
    board.undo.redo()
    expect(values()).toEqual([2, 1])
  })

  it('waits for the step itself when more was done since in the same document', () => {
    const { board, values } = pair()
    board.write(3)
    board.undo.undo()
    expect(values()).toEqual([2, 2])
    board.undo.undo()
    expect(values()).toEqual([1, 1])
  })

  it('takes no older step back where others have overwritten all of this one', () => {
    const { board, plan, values } = pair()
    let canUndo = true
    plan.undo.on('stack-item-popped', () => (canUndo = plan.undo.undoStack.length > 0))
    plan.undo.on('stack-cleared', () => (canUndo = plan.undo.undoStack.length > 0))
    plan.overwrite(9)
    board.undo.undo()
    expect(values()).toEqual([1, 9])
    expect([plan.undo.undoStack.length, canUndo]).toEqual([1, true])
    board.undo.redo()
    expect(values()).toEqual([2, 9])
  })

  it('redoes nothing else when there was nothing to take back', () => {
    const { board, plan, values } = pair()
    plan.write(3)
    plan.undo.undo()
    plan.overwrite(9)
    const redo = [...plan.undo.redoStack]
    board.undo.undo()
    board.undo.redo()
    expect(values()).toEqual([2, 9])
    expect(plan.undo.redoStack).toEqual(redo)
  })
})
