import { useState } from 'react'

const PREFIX = 'sconce:words:'

function read(key: string): string {
  try {
    return sessionStorage.getItem(PREFIX + key) ?? ''
  } catch {
    return ''
  }
}

/** Words typed and not sent yet, for each look: they survive another look, another screen and a reload of this tab. */
export function useWordsDraft(lookId: string): [words: string, setWords: (words: string) => void] {
  const [drafts, setDrafts] = useState<ReadonlyMap<string, string>>(new Map())
  const setWords = (words: string) => {
    setDrafts((known) => new Map(known).set(lookId, words))
    try {
      if (words === '') sessionStorage.removeItem(PREFIX + lookId)
      else sessionStorage.setItem(PREFIX + lookId, words)
    } catch {
      // No room: the words still live as long as this screen.
    }
  }
  return [drafts.get(lookId) ?? read(lookId), setWords]
}
