import { useQuery } from '@tanstack/react-query'
import { Link } from 'react-router-dom'
import { mailQueries } from '#src/features/mail/queries.ts'
import { Caution } from '#src/ui/caution.tsx'

export type LetterSentProps = { email: string; what: string }

/** After a letter was asked for; on a machine that catches its letters itself, where they can be read. */
export function LetterSent({ email, what }: LetterSentProps) {
  const { data } = useQuery({ ...mailQueries.letters(), refetchInterval: false, retry: false })
  return (
    <div role="status" className="flex flex-col gap-4">
      <Caution tone="bottle" title="Look in your mailbox">
        If {email} has an account, a letter is on its way. {what}
      </Caution>
      {data && (
        <p className="text-sm">
          This machine keeps its letters itself:{' '}
          <Link to="/letters" className="font-semibold text-velvet underline">
            read them here
          </Link>
          .
        </p>
      )}
    </div>
  )
}
