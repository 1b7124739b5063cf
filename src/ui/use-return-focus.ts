import { useRef } from 'react'

type ReturnFocus = {
  onOpenAutoFocus: (event: Event) => void
  onCloseAutoFocus: (event: Event) => void
}

export type ReturnFocusOptions = {
  /** Begin in the first field, for who has a keyboard; else the first thing that can be pressed has the focus. */
  inField?: boolean
}

/**
 * Gives the focus back to what had it when something opened over the screen. The library under our dialogs does so only
 * for a button of its own, and ours are opened from anywhere.
 */
export function useReturnFocus({ inField = false }: ReturnFocusOptions = {}): ReturnFocus {
  const opener = useRef<Element | null>(null)
  return {
    onOpenAutoFocus(event) {
      opener.current = document.activeElement
      if (!inField || !hasKeyboard() || !(event.currentTarget instanceof HTMLElement)) return
      const field = event.currentTarget.querySelector<HTMLElement>(
        'input:not(:disabled), textarea:not(:disabled), select:not(:disabled)',
      )
      if (!field) return
      event.preventDefault()
      field.focus()
    },
    onCloseAutoFocus(event) {
      event.preventDefault()
      // What opened it may be gone, with a menu or with what was removed: then the screen has the focus.
      const back =
        opener.current?.isConnected && opener.current !== document.body
          ? opener.current
          : document.querySelector('main')
      if (back instanceof HTMLElement) back.focus({ preventScroll: true })
    },
  }
}

function hasKeyboard(): boolean {
  return typeof window.matchMedia !== 'function' || !window.matchMedia('(pointer: coarse)').matches
}
