// @vitest-environment jsdom
import { describe, expect, it } from 'vitest'
import { addCopies, removeFromWall, restack, writeBoxes } from '#src/features/board/write-board.ts'
import { FRAME, NOTE, OTHER, testWall } from '#tests/src/features/board/support/wall.ts'

describe('writeBoxes', () => {
  it('says that nothing was written when nothing moved', () => {
    const wall = testWall()
    expect(writeBoxes(wall.doc, new Map([[FRAME, [0, 0, 212, 286]]]))).toBe(false)
    expect(writeBoxes(wall.doc, new Map([[FRAME, [Number.NaN, 4, 212, 286]]]))).toBe(true)
    expect(wall.boxOf(FRAME)).toEqual([0, 4, 212, 286])
  })
})

describe('addCopies', () => {
  it('copies frames and notes in front of everything, in their own order', () => {
    const wall = testWall()
    const entries = [...wall.items().values()]
    const ids = addCopies(wall.doc, entries, 10, 10, wall.made())
    const copies = ids.map((id) => wall.items().get(id))
    expect(copies.map((copy) => copy?.kind)).toEqual(['frame', 'frame', 'note'])
    expect(copies.map((copy) => copy?.z)).toEqual([3, 4, 5])
    expect(copies.map((copy) => copy?.item.made?.initials)).toEqual(['IM', 'IM', 'IM'])
  })
})

describe('restack', () => {
  it('lifts to the front and puts to the back', () => {
    const wall = testWall()
    restack(wall.doc, new Set([FRAME]), 'front')
    expect(wall.items().get(FRAME)?.z).toBe(3)
    restack(wall.doc, new Set([NOTE]), 'back')
    expect(wall.items().get(NOTE)?.z).toBe(0)
    expect(wall.items().get(OTHER)?.z).toBe(1)
  })
})

describe('removeFromWall', () => {
  it('marks as removed and keeps what others wrote meanwhile', () => {
    const wall = testWall()
    removeFromWall(wall.doc, [FRAME, NOTE], 1_700_000_000_000)
    expect([...wall.items().keys()]).toEqual([OTHER])
    wall.undo()
    expect(wall.items().size).toBe(3)
  })
})
