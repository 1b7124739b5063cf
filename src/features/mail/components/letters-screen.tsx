import { useQuery } from '@tanstack/react-query'
import { useState } from 'react'
import type { Letters } from '#shared/api/mail.ts'
import { cn } from '#src/lib/cn.ts'
import { shortInstant } from '#src/lib/format.ts'
import { Empty } from '#src/ui/empty.tsx'
import { Waiting } from '#src/ui/waiting.tsx'
import { mailQueries } from '../queries.ts'
import { LetterPane } from './letter-pane.tsx'

type Letter = Letters['letters'][number]

/** Letters that this machine caught instead of sending them: newest first, one open beside the list. */
export function LettersScreen() {
  const { data, error } = useQuery(mailQueries.letters())
  const [openId, setOpenId] = useState<string | null>(null)
  if (error && !data)
    return (
      <Empty title="No letters are kept here">
        This server sends its letters out by mail, so there is nothing to read on it.
      </Empty>
    )
  if (!data) return <Waiting label="Fetching the letters" />
  const first = data.letters[0]
  if (!first) {
    return (
      <Empty title="No letter yet">
        Invitations, sign-in letters and everything else that Sconce would send by mail is kept here, on this machine
        only.
      </Empty>
    )
  }
  const open = data.letters.find((letter) => letter.id === openId) ?? first
  return (
    <div className="grid grid-cols-[minmax(0,1fr)] items-start gap-4 md:grid-cols-[20rem_minmax(0,1fr)]">
      <ul
        aria-label="Letters"
        className="max-h-72 divide-y divide-hair-soft overflow-y-auto rounded-r border border-hair bg-paper md:max-h-[calc(100dvh-9rem)]"
      >
        {data.letters.map((letter) => (
          <li key={letter.id}>
            <LetterLine letter={letter} isOpen={letter.id === open.id} onOpen={() => setOpenId(letter.id)} />
          </li>
        ))}
      </ul>
      <LetterPane letter={open} />
    </div>
  )
}

function LetterLine({ letter, isOpen, onOpen }: { letter: Letter; isOpen: boolean; onOpen: () => void }) {
  return (
    <button
      type="button"
      aria-current={isOpen || undefined}
      onClick={onOpen}
      className={cn(
        'block w-full border-l-3 px-3.5 py-2.5 text-left',
        isOpen ? 'border-glow bg-white' : 'border-transparent hover:bg-white',
      )}
    >
      <span className="flex justify-between gap-2 text-xs text-ink-soft">
        <span className="min-w-0 truncate">{letter.to}</span>
        <span className="flex-none">{shortInstant(letter.atMs)}</span>
      </span>
      <span className="mt-0.5 block text-base font-semibold">{letter.subject}</span>
    </button>
  )
}
