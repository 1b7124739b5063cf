import { useCallback } from 'react'
import { arrangeNew } from '#shared/domain/board/arrange.ts'
import { type Point, boundsOf } from '#shared/domain/board/geometry.ts'
import { printSize } from '#shared/domain/board/print.ts'
import { visibleBox } from '#shared/domain/board/view.ts'
import { uploadIdSchema } from '#shared/ids.ts'
import { useOutbox } from '#src/realtime/outbox/use-outbox.ts'
import { NotAPicture } from '#src/realtime/outbox/prepare-picture.ts'
import { toast } from '#src/ui/toast.ts'
import { focusItem } from './gestures/keys.ts'
import { type WallControl, announce, useWall } from './wall-control.ts'
import { select } from './wall-state.ts'
import { addFrames } from './write-board.ts'

export type AddPictures = (files: readonly File[], options?: { at?: Point; fromCamera?: boolean }) => Promise<void>

/** Where new things go and how wide their rows may be: where one looks, or below everything where no wall is shown. */
export function roomForNew({ state, items }: WallControl, at?: Point): { start: Point; width: number } {
  const { widthPx } = state.viewport.get()
  if (widthPx === 0) {
    const bounds = boundsOf([...items().values()].map((entry) => entry.box))
    return bounds
      ? { start: { x: bounds[0], y: bounds[1] + bounds[3] + 40 }, width: Math.max(720, bounds[2]) }
      : { start: { x: 24, y: 44 }, width: 720 }
  }
  const [x, y, w] = visibleBox(state.view.get(), state.viewport.get())
  if (at) return { start: at, width: Math.max(320, x + w - at.x) }
  const margin = 24 / state.view.get().zoom
  return { start: { x: Math.round(x + margin), y: Math.round(y + margin) }, width: Math.max(320, w - 2 * margin) }
}

/** Boxes of everything that new things must not cover. */
export function occupiedBy({ items }: WallControl) {
  return [...items().values()].map((entry) => entry.box)
}

function sentences(problems: readonly { name: string; why: string }[]): string {
  const [first, ...more] = problems
  if (!first) return ''
  const others = more.length === 0 ? '' : ` ${more.length} more could not be added either.`
  return `${first.name}: ${first.why}${others}`
}

/** Pins files as frames: at once from this device, to everybody when they have been sent. */
export function useAddPictures(): AddPictures {
  const control = useWall()
  const { add } = useOutbox()
  return useCallback(
    async (files, options = {}) => {
      if (!control.mayWrite() || files.length === 0) return
      const { start, width } = roomForNew(control, options.at)
      const problems: { name: string; why: string }[] = []
      const pinned: string[] = []
      control.stopUndo()
      for (const file of files) {
        try {
          const { uploadId, widthPx, heightPx } = await add(file, file.name)
          const [box] = arrangeNew([printSize(widthPx, heightPx)], occupiedBy(control), start, width)
          if (!box) continue
          const picture = { uploadId: uploadIdSchema.parse(uploadId), state: 'waiting' as const, widthPx, heightPx }
          const ids = addFrames(
            control.doc,
            [{ box, picture, rights: options.fromCamera ? 'ours' : 'unknown' }],
            control.made(),
          )
          pinned.push(...ids)
        } catch (error) {
          if (!(error instanceof NotAPicture)) throw error
          problems.push({ name: file.name || 'The picture', why: error.message })
        }
      }
      control.stopUndo()
      if (problems.length > 0) toast.error(sentences(problems))
      const [first] = pinned
      if (!first) return
      select(control.state, pinned)
      focusItem(control, first)
      const words = pinned.length === 1 ? 'One picture pinned' : `${pinned.length} pictures pinned`
      announce(control, words)
      // Where no wall is shown, the new print may be out of sight.
      if (control.state.viewport.get().widthPx === 0) toast.say(`${words}.`)
    },
    [control, add],
  )
}
