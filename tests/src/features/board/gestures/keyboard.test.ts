// @vitest-environment jsdom
import { fireEvent } from '@testing-library/dom'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { attachKeyboard } from '#src/features/board/gestures/keyboard.ts'
import { select } from '#src/features/board/wall-state.ts'
import { FRAME, NOTE, OTHER, type TestWall, testWall } from '#tests/src/features/board/support/wall.ts'

describe('attachKeyboard', () => {
  let wall: TestWall
  let element: HTMLElement
  let detach: () => void

  beforeEach(() => {
    wall = testWall()
    element = document.body.appendChild(document.createElement('div'))
    element.tabIndex = 0
    detach = attachKeyboard(element, wall)
    wall.state.focused.set(FRAME)
  })
  afterEach(() => {
    detach()
    element.remove()
  })
  const press = (key: string, more: KeyboardEventInit = {}) => {
    fireEvent.keyDown(element, { key, ...more })
    fireEvent.keyUp(element, { key, ...more })
  }
  const said = () => wall.state.announcement.get().trim()

  it('picks up with Enter, moves with arrows, and writes once when it drops', () => {
    const before = wall.writes()
    press('Enter')
    expect(said()).toMatch(/^Frame Collar high picked up/)
    press('ArrowRight')
    press('ArrowDown', { shiftKey: true })
    expect(said()).toBe('moved to 10 right, 60 down')
    expect(wall.boxOf(FRAME)).toEqual([0, 0, 212, 286])
    expect(wall.writes()).toBe(before)
    expect(wall.presence.at(-1)).toEqual({ dragging: { [FRAME]: [10, 60, 212, 286] } })
    press('Enter')
    expect(said()).toBe('Frame Collar high dropped')
    expect(wall.boxOf(FRAME)).toEqual([10, 60, 212, 286])
    expect(wall.writes()).toBe(before + 1)
    expect(wall.presence.at(-1)).toEqual({ dragging: undefined })
  })

  it('does the same with Space', () => {
    press(' ')
    press('ArrowLeft')
    press(' ')
    expect(wall.boxOf(FRAME)).toEqual([-10, 0, 212, 286])
  })

  it('puts back with Escape and writes nothing', () => {
    const before = wall.writes()
    press('Enter')
    press('ArrowRight')
    press('Escape')
    expect(said()).toBe('Frame Collar high is back where it was')
    expect(wall.boxOf(FRAME)).toEqual([0, 0, 212, 286])
    expect(wall.writes()).toBe(before)
  })

  it('goes from thing to thing with arrows when nothing is selected', () => {
    press('ArrowRight')
    expect(wall.state.focused.get()).toBe(OTHER)
    press('End')
    expect(wall.state.focused.get()).toBe(NOTE)
    press('Home')
    expect(wall.state.focused.get()).toBe(FRAME)
  })

  it('nudges what is selected, and undo takes back only that', () => {
    select(wall.state, [FRAME, NOTE])
    wall.stopUndo()
    press('ArrowDown')
    press('ArrowDown')
    expect(wall.boxOf(FRAME)).toEqual([0, 20, 212, 286])
    expect(wall.boxOf(NOTE)).toEqual([0, 420, 200, 52])
    press('z', { ctrlKey: true })
    expect(wall.boxOf(FRAME)).toEqual([0, 0, 212, 286])
    press('z', { ctrlKey: true, shiftKey: true })
    expect(wall.boxOf(FRAME)).toEqual([0, 20, 212, 286])
  })

  it('removes with Delete, goes on to the next thing, and undo brings it back', () => {
    select(wall.state, [FRAME])
    press('Delete')
    expect(wall.items().has(FRAME)).toBe(false)
    expect(wall.state.focused.get()).toBe(OTHER)
    press('z', { ctrlKey: true })
    expect(wall.items().has(FRAME)).toBe(true)
  })

  it('copies the selection and selects the copy', () => {
    select(wall.state, [FRAME])
    press('d', { ctrlKey: true })
    const [copy] = wall.state.selection.get()
    expect(copy).not.toBe(FRAME)
    expect(wall.boxOf(copy ?? '')).toEqual([24, 24, 212, 286])
    expect(wall.items().size).toBe(4)
  })

  it('selects and looks, but never moves, for who may only read', () => {
    wall.readOnly(true)
    press('Enter')
    expect([...wall.state.selection.get()]).toEqual([FRAME])
    press('ArrowRight')
    press('Delete')
    press('Enter')
    expect(wall.state.lifted.get()).toBe(false)
    expect(wall.boxOf(FRAME)).toEqual([0, 0, 212, 286])
  })

  it('leaves keys alone that are typed into a field', () => {
    const field = element.appendChild(document.createElement('textarea'))
    select(wall.state, [FRAME])
    fireEvent.keyDown(field, { key: 'Delete' })
    fireEvent.keyDown(field, { key: 'ArrowRight' })
    expect(wall.boxOf(FRAME)).toEqual([0, 0, 212, 286])
  })
})
