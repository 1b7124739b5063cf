import { useEffect } from 'react'
import { z } from 'zod'
import { arrangeNew } from '#shared/domain/board/arrange.ts'
import { boundsOf, overlaps } from '#shared/domain/board/geometry.ts'
import { areaSchema, frameSchema, noteSchema, paletteSchema, tagSchema } from '#shared/domain/board/schema.ts'
import { visibleBox } from '#shared/domain/board/view.ts'
import { toast } from '#src/ui/toast.ts'
import { isTyping } from './gestures/keyboard.ts'
import { removeSelected } from './gestures/keys.ts'
import { type AddPictures, occupiedBy, roomForNew } from './use-add-pictures.ts'
import { announce, asStep, selectedItems, type WallControl } from './wall-control.ts'
import type { WallItem } from './wall-item.ts'
import { select } from './wall-state.ts'
import { addCopies, addNote } from './write-board.ts'

const TYPE = 'application/x-sconce-wall'

const copiedSchema = z.object({
  shootId: z.string(),
  items: z
    .array(
      z.discriminatedUnion('kind', [
        z.object({ kind: z.literal('frame'), item: frameSchema }),
        z.object({ kind: z.literal('note'), item: noteSchema }),
        z.object({ kind: z.literal('tag'), item: tagSchema }),
        z.object({ kind: z.literal('area'), item: areaSchema }),
        z.object({ kind: z.literal('palette'), item: paletteSchema }),
      ]),
    )
    .max(2000),
})

function wordsOf(entry: WallItem): string {
  switch (entry.kind) {
    case 'frame':
      return entry.item.caption
    case 'note':
      return entry.item.text
    case 'tag':
      return [entry.item.title, entry.item.text].filter((part) => part !== '').join('\n')
    case 'area':
      return entry.item.title
    case 'palette':
      return entry.item.colours.join(' ')
  }
}

function parseCopied(text: string) {
  try {
    const parsed = copiedSchema.safeParse(JSON.parse(text))
    return parsed.success ? parsed.data : null
  } catch {
    return null
  }
}

/** What was copied, fit for this shoot: another shoot's pictures and looks are not reachable from here. */
function fitting(copied: z.infer<typeof copiedSchema>, shootId: string): WallItem[] {
  return copied.items.flatMap((entry): WallItem[] => {
    const { id, box } = entry.item
    const z = 'z' in entry.item ? entry.item.z : -1
    if (copied.shootId === shootId) return [{ ...entry, id, box, z }]
    if (entry.kind === 'frame') return []
    if (entry.kind === 'tag') return [{ kind: 'tag', id, box, z, item: { ...entry.item, lookId: null } }]
    return [{ ...entry, id, box, z }]
  })
}

function pasteItems(control: WallControl, text: string, shootId: string): boolean {
  const copied = parseCopied(text)
  if (!copied) return false
  const entries = fitting(copied, shootId)
  if (entries.length < copied.items.length) {
    toast.say('Pictures stay in their shoot: the rest was pasted. Add the files themselves to have them here as well.')
  }
  const bounds = boundsOf(entries.map((entry) => entry.box))
  if (!bounds) return true
  const seen = visibleBox(control.state.view.get(), control.state.viewport.get())
  // Beside what it was copied from when that is in sight, else into the middle of what is.
  const near = overlaps(seen, bounds)
  const dx = near ? 24 : seen[0] + (seen[2] - bounds[2]) / 2 - bounds[0]
  const dy = near ? 24 : seen[1] + (seen[3] - bounds[3]) / 2 - bounds[1]
  const ids = asStep(control, () => addCopies(control.doc, entries, dx, dy, control.made()))
  select(control.state, ids)
  control.state.focused.set(ids[0] ?? null)
  announce(control, `${control.nameOf(entries)} pasted`)
  return true
}

/** Words become a note where one looks. */
export function pasteText(control: WallControl, text: string): void {
  const { start, width } = roomForNew(control)
  const words = text.trim().slice(0, 2000)
  const lines = Math.ceil(words.length / 24)
  const [box] = arrangeNew([{ w: 230, h: Math.min(600, 26 + lines * 24) }], occupiedBy(control), start, width)
  if (!box || words === '') return
  const id = asStep(control, () => addNote(control.doc, box, words, control.made()))
  select(control.state, [id])
  control.state.focused.set(id)
  announce(control, 'The words are a note now')
}

/** Copy, cut and paste on the wall: things, pictures and words. */
export function useClipboard(control: WallControl, shootId: string, addPictures: AddPictures): void {
  useEffect(() => {
    const handleCopy = (event: ClipboardEvent) => {
      const entries = selectedItems(control)
      if (
        isTyping(event.target) ||
        entries.length === 0 ||
        !event.clipboardData ||
        document.getSelection()?.isCollapsed === false
      )
        return
      event.preventDefault()
      event.clipboardData.setData(
        TYPE,
        JSON.stringify({ shootId, items: entries.map(({ kind, item }) => ({ kind, item })) }),
      )
      event.clipboardData.setData(
        'text/plain',
        entries
          .map(wordsOf)
          .filter((words) => words !== '')
          .join('\n'),
      )
      if (event.type === 'cut') removeSelected(control)
      else announce(control, `${control.nameOf(entries)} copied`)
    }
    const handlePaste = (event: ClipboardEvent) => {
      if (isTyping(event.target) || !event.clipboardData || !control.mayWrite()) return
      if (document.querySelector('[role="dialog"],[role="alertdialog"]')) return
      const files = [...event.clipboardData.files]
      const things = event.clipboardData.getData(TYPE)
      const text = event.clipboardData.getData('text/plain')
      event.preventDefault()
      if (files.length > 0) void addPictures(files)
      else if (!(things !== '' && pasteItems(control, things, shootId)) && text.trim() !== '') pasteText(control, text)
    }
    document.addEventListener('copy', handleCopy)
    document.addEventListener('cut', handleCopy)
    document.addEventListener('paste', handlePaste)
    return () => {
      document.removeEventListener('copy', handleCopy)
      document.removeEventListener('cut', handleCopy)
      document.removeEventListener('paste', handlePaste)
    }
  }, [control, shootId, addPictures])
}
