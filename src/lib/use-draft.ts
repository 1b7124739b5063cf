import { useCallback, useEffect, useRef, useState } from 'react'
import { holdTyping } from './typing.ts'

export type Draft = {
  value: string
  change: (text: string) => void
  /** Takes over what is typed and follows the kept value again. */
  leave: () => void
  /** Forgets what is typed since it was last taken over. */
  drop: () => void
}

/** While somebody types, the words are taken over this often. */
const EVERY_MS = 500

/**
 * Text being typed: shown at once, taken over twice a second, on leaving, when the field goes away and when the page does,
 * so that nothing is lost; until then the save sign does not say saved.
 */
export function useDraft(value: string, takeOver: (text: string) => void): Draft {
  const [draft, setDraft] = useState<string | null>(null)
  const waiting = useRef<{ text: string; timer: ReturnType<typeof setTimeout>; release: () => void } | null>(null)
  const give = useRef(takeOver)
  useEffect(() => {
    give.current = takeOver
  })

  const flush = useCallback(() => {
    const last = waiting.current
    waiting.current = null
    if (!last) return
    clearTimeout(last.timer)
    // First the words, then the sign: it must not say saved in between.
    try {
      give.current(last.text)
    } finally {
      last.release()
    }
  }, [])
  useEffect(() => flush, [flush])

  const drop = useCallback(() => {
    const last = waiting.current
    waiting.current = null
    if (last) {
      clearTimeout(last.timer)
      last.release()
    }
    setDraft(null)
  }, [])

  return {
    value: draft ?? value,
    change(text) {
      setDraft(text)
      if (waiting.current) waiting.current.text = text
      else waiting.current = { text, timer: setTimeout(flush, EVERY_MS), release: holdTyping(flush) }
    },
    leave() {
      flush()
      setDraft(null)
    },
    drop,
  }
}
