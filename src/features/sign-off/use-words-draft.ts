import { useState } from 'react'
import { keepDraft, readDraft } from '#src/lib/drafts.ts'

/** Words typed about a look and not sent yet: they survive another look, another screen and a reload. */
export function useWordsDraft(userId: string, lookId: string): [words: string, setWords: (words: string) => void] {
  const place = `sign-off:${lookId}`
  const [drafts, setDrafts] = useState<ReadonlyMap<string, string>>(new Map())
  const setWords = (words: string) => {
    setDrafts((known) => new Map(known).set(lookId, words))
    keepDraft(userId, place, words === '' ? {} : { words })
  }
  return [drafts.get(lookId) ?? readDraft(userId, place)['words'] ?? '', setWords]
}
