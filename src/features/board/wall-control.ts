import { createContext, use } from 'react'
import type * as Y from 'yjs'
import type { Made } from '#shared/domain/board/schema.ts'
import type { Presence } from '#shared/realtime/protocol.ts'
import type { WallItem, WallItems } from './wall-item.ts'
import type { WallState } from './wall-state.ts'

/** A change of what others see of this person; an undefined key is taken away. */
export type PresencePatch = { [Key in keyof Presence]?: Presence[Key] | undefined }

/** All that hands on the wall need: what is seen, what hangs there, and how to write. Stable for the life of a board. */
export type WallControl = {
  doc: Y.Doc
  state: WallState
  items(): WallItems
  mayWrite(): boolean
  /** A kept version is looked at: nobody else is here, and what is said of things now is not said of them then. */
  isPast: boolean
  /** Ends the present undo step. */
  stopUndo(): void
  undo(): void
  redo(): void
  setPresence(patch: PresencePatch): void
  made(): Made
  /** A frame was let go over a shot of the strip. */
  coverShot(shotId: string, frameId: string): void
  /** Name of a thing as it is announced. */
  nameOf(entries: readonly WallItem[]): string
}

const Context = createContext<WallControl | null>(null)
export const WallControlProvider = Context.Provider

/** @throws outside of a board: a programming error. */
export function useWall(): WallControl {
  const control = use(Context)
  if (!control) throw new Error('useWall needs a board above it')
  return control
}

/** Things selected, as they hang now. */
export function selectedItems(control: WallControl): WallItem[] {
  const items = control.items()
  return [...control.state.selection.get()].flatMap((id) => items.get(id) ?? [])
}

export function announce(control: WallControl, words: string): void {
  // The same words twice are a new announcement: a screen reader speaks only of what changed.
  const again = control.state.announcement.get() === words
  control.state.announcement.set(again ? `${words}\u00a0` : words)
}

/** Does something as an undo step of its own. */
export function asStep<T>(control: WallControl, write: () => T): T {
  control.stopUndo()
  const result = write()
  control.stopUndo()
  return result
}
