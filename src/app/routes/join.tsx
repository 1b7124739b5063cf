import { useQuery } from '@tanstack/react-query'
import { Link, useParams } from 'react-router-dom'
import { AccountPage } from '#src/features/people/components/account-page.tsx'
import { JoinForm } from '#src/features/people/components/join-form.tsx'
import { peopleQueries } from '#src/features/people/queries.ts'
import { studioQueries } from '#src/features/studios/queries.ts'
import { ApiError } from '#src/lib/api.ts'
import { Button, buttonClass } from '#src/ui/button.tsx'
import { Caution } from '#src/ui/caution.tsx'
import { Waiting } from '#src/ui/waiting.tsx'
import { useGoOn } from '../signed-in-again.ts'

export function Component() {
  const { token = '' } = useParams()
  const goOn = useGoOn()
  const { data: session } = useQuery(studioQueries.session())
  const invitation = useQuery(peopleQueries.invitation(token))
  if (invitation.isPending) return <Waiting label="Opening the invitation" />
  if (invitation.isError) return <CannotJoin error={invitation.error} onAgain={() => void invitation.refetch()} />
  return (
    <AccountPage title="You are invited">
      <JoinForm token={token} invitation={invitation.data} signedInAs={session?.user.email ?? null} onJoined={goOn} />
    </AccountPage>
  )
}

function CannotJoin({ error, onAgain }: { error: Error; onAgain: () => void }) {
  const code = error instanceof ApiError ? error.code : 'INTERNAL'
  const isOver = code === 'GONE' || code === 'NOT_FOUND' || code === 'BAD_REQUEST'
  return (
    <AccountPage title={isOver ? 'This invitation is not open' : 'The invitation cannot be read'}>
      <div className="flex flex-col gap-4">
        <Caution tone="glow">
          {code === 'NOT_FOUND' || code === 'BAD_REQUEST'
            ? 'There is no such invitation. The link may have been cut short on its way.'
            : error.message}
        </Caution>
        {isOver ? (
          <>
            <p className="text-ink-soft">
              Ask whoever invited you for a new letter: it takes them one press. If you have joined already, sign in, or
              have a letter sent that signs you in.
            </p>
            <Link to="/sign-in" className={buttonClass('primary', 'large')}>
              Sign in
            </Link>
          </>
        ) : (
          <Button variant="primary" size="large" onClick={onAgain}>
            Try again
          </Button>
        )}
      </div>
    </AccountPage>
  )
}
