import { useEffect } from 'react'
import type { Undo } from './use-undo.ts'

/** Ctrl or ⌘ with Z takes back one's own last change; with Shift it does it again. */
export function useUndoKeys({ undo, redo }: Undo): void {
  useEffect(() => {
    const handleKey = (event: KeyboardEvent) => {
      const isTyping =
        event.target instanceof HTMLElement &&
        event.target.closest('input, textarea, select, [contenteditable]') !== null
      if (isTyping || !(event.ctrlKey || event.metaKey) || event.key.toLowerCase() !== 'z') return
      event.preventDefault()
      if (event.shiftKey) redo()
      else undo()
    }
    window.addEventListener('keydown', handleKey)
    return () => window.removeEventListener('keydown', handleKey)
  }, [undo, redo])
}
