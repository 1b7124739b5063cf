import { useCallback, useEffect, useRef, useState } from 'react'

export type Draft = {
  value: string
  change: (text: string) => void
  /** Writes what is typed and follows the document again. */
  leave: () => void
}

const PAUSE_MS = 500

/** Text being typed: shown at once, written after a pause, on leaving and when the field goes away, so nothing is lost. */
export function useDraft(value: string, write: (text: string) => void): Draft {
  const [draft, setDraft] = useState<string | null>(null)
  const pending = useRef<(() => void) | null>(null)
  const timer = useRef<ReturnType<typeof setTimeout> | undefined>(undefined)

  const flush = useCallback(() => {
    clearTimeout(timer.current)
    const now = pending.current
    pending.current = null
    now?.()
  }, [])
  useEffect(() => flush, [flush])

  return {
    value: draft ?? value,
    change(text) {
      setDraft(text)
      pending.current = () => write(text)
      clearTimeout(timer.current)
      timer.current = setTimeout(flush, PAUSE_MS)
    },
    leave() {
      flush()
      setDraft(null)
    },
  }
}
