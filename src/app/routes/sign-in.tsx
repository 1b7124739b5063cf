import { useQuery } from '@tanstack/react-query'
import { useState } from 'react'
import { Link, Navigate, useSearchParams } from 'react-router-dom'
import { AccountPage } from '#src/features/people/components/account-page.tsx'
import { CreateAccountForm } from '#src/features/people/components/create-account-form.tsx'
import { LetterSignIn } from '#src/features/people/components/letter-sign-in.tsx'
import { SignInForm } from '#src/features/people/components/sign-in-form.tsx'
import { studioQueries } from '#src/features/studios/queries.ts'
import { count } from '#src/lib/format.ts'
import { useUnsentOnDevice } from '#src/realtime/use-unsent-on-device.ts'
import { Caution } from '#src/ui/caution.tsx'
import { LetterSent } from '../letter-sent.tsx'
import { safePath, useGoOn } from '../signed-in-again.ts'

const LINK = 'font-semibold text-velvet underline underline-offset-2'

export function Component() {
  const [search, setSearch] = useSearchParams()
  const [sentTo, setSentTo] = useState<string | null>(null)
  const goOn = useGoOn()
  const { data: session } = useQuery(studioQueries.session())
  const to = search.get('to')
  const letter = search.get('letter')
  const isNew = search.has('new')
  const onward = to === null ? '' : `&to=${encodeURIComponent(to)}`
  if (letter !== null) {
    return (
      <AccountPage title="Sign in">
        <LetterSignIn
          token={letter}
          onSignedIn={() => goOn(to)}
          onAnotherWay={() => setSearch(to === null ? {} : { to })}
        />
      </AccountPage>
    )
  }
  if (session) return <Navigate to={safePath(to)} replace />
  if (sentTo !== null) {
    return (
      <AccountPage
        title="A letter is on its way"
        foot={
          <button type="button" className={LINK} onClick={() => setSentTo(null)}>
            Back to signing in
          </button>
        }
      >
        <LetterSent email={sentTo} what="Its link signs you in; it works once, within a quarter of an hour." />
      </AccountPage>
    )
  }
  if (isNew) {
    return (
      <AccountPage
        title="Create an account"
        foot={
          <>
            You have one?{' '}
            <Link to={`/sign-in?${onward.slice(1)}`} className={LINK}>
              Sign in
            </Link>
          </>
        }
      >
        <CreateAccountForm onCreated={() => goOn(to)} />
      </AccountPage>
    )
  }
  return (
    <AccountPage
      title="Sign in"
      foot={
        <div className="flex flex-col gap-2">
          <span>
            New here?{' '}
            <Link to={`/sign-in?new${onward}`} className={LINK}>
              Create an account
            </Link>
          </span>
          <span>
            Forgotten the password?{' '}
            <Link to="/reset" className={LINK}>
              Set a new one
            </Link>
          </span>
          <span>Invited to a shoot? Open the link in your letter; it needs no password.</span>
        </div>
      }
    >
      <KeptHere />
      <SignInForm onSignedIn={() => goOn(to)} onLetterSent={setSentTo} />
    </AccountPage>
  )
}

/** After a session has ended by itself: what was not sent is not lost. Without a name, for the device may be shared. */
function KeptHere() {
  const unsent = useUnsentOnDevice()
  if (unsent === 0) return null
  return (
    <Caution className="mb-5" title={`${count(unsent, 'change')} ${unsent === 1 ? 'is' : 'are'} kept on this device`}>
      Whoever made {unsent === 1 ? 'it' : 'them'} signs in again and opens the shoot: what may still be sent goes to the
      server then, and of anything else a copy can be saved.
    </Caution>
  )
}
