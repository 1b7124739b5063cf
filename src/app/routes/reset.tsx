import { useState } from 'react'
import { Link, useNavigate, useSearchParams } from 'react-router-dom'
import { AccountPage } from '#src/features/people/components/account-page.tsx'
import { AskForReset, SetPassword } from '#src/features/people/components/reset-forms.tsx'
import { toast } from '#src/ui/toast.ts'
import { LetterSent } from '../letter-sent.tsx'

const LINK = 'font-semibold text-velvet underline underline-offset-2'

export function Component() {
  const [search] = useSearchParams()
  const navigate = useNavigate()
  const [sentTo, setSentTo] = useState<string | null>(null)
  const token = search.get('token')
  const back = (
    <Link to="/sign-in" className={LINK}>
      Back to signing in
    </Link>
  )
  if (token !== null) {
    return (
      <AccountPage
        title="Set a new password"
        foot={
          <>
            The link has run out?{' '}
            <Link to="/reset" className={LINK}>
              Ask for a new letter
            </Link>
          </>
        }
      >
        <SetPassword
          token={token}
          onSet={() => {
            toast.say('The new password is set. Sign in with it.')
            void navigate('/sign-in', { replace: true })
          }}
        />
      </AccountPage>
    )
  }
  return (
    <AccountPage title={sentTo === null ? 'Forgotten the password' : 'A letter is on its way'} foot={back}>
      {sentTo === null ? (
        <AskForReset email="" onSent={setSentTo} />
      ) : (
        <LetterSent email={sentTo} what="Its link lets you set a new password within the hour." />
      )}
    </AccountPage>
  )
}
