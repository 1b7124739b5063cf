import { useMemo } from 'react'
import { arrangeNew } from '#shared/domain/board/arrange.ts'
import { reveal } from '#shared/domain/board/view.ts'
import { occupiedBy, roomForNew } from './use-add-pictures.ts'
import { announce, asStep, type WallControl } from './wall-control.ts'
import { select, setView } from './wall-state.ts'
import { addArea, addNote, addPalette, addTag } from './write-board.ts'

export type NewThings = { note(): string; tag(): string; area(): string; palette(): string }

const FIRST_COLOURS = ['#23304a', '#8e6a22', '#6e7c84', '#b7a98f', '#3a1f12']

/** Makes a thing where one looks, beside what hangs there, and selects it. Each returns the new id. */
export function useNewThings(control: WallControl): NewThings {
  return useMemo(() => {
    const make = (
      size: { w: number; h: number },
      add: (box: [number, number, number, number]) => string,
      words: string,
      edit: boolean,
    ) => {
      const { start, width } = roomForNew(control)
      const [box] = arrangeNew([size], occupiedBy(control), start, width)
      const { state } = control
      const id = asStep(control, () => add(box ?? [start.x, start.y, size.w, size.h]))
      select(state, [id])
      state.focused.set(id)
      if (box && state.viewport.get().widthPx > 0)
        setView(state, reveal(state.view.get(), box, state.viewport.get(), 24))
      if (edit) state.editing.set(id)
      announce(control, words)
      return id
    }
    return {
      note: () =>
        make(
          { w: 210, h: 52 },
          (box) => addNote(control.doc, box, '', control.made()),
          'A new note. Write its words.',
          true,
        ),
      tag: () =>
        make(
          { w: 184, h: 110 },
          (box) => addTag(control.doc, box, control.made()),
          'A new tag. Give it a title or a look.',
          true,
        ),
      area: () =>
        make(
          { w: 520, h: 24 },
          (box) => addArea(control.doc, box, '', control.made()),
          'A new area. Give it a title.',
          true,
        ),
      palette: () =>
        make(
          { w: 200, h: 58 },
          (box) => addPalette(control.doc, box, { title: '', colours: FIRST_COLOURS }, control.made()),
          'A new palette.',
          false,
        ),
    }
  }, [control])
}
