import { useMutation } from '@tanstack/react-query'
import { Button } from '#src/ui/button.tsx'
import { FormError } from '#src/ui/form-error.tsx'
import { account } from '../account.ts'

export type LetterSignInProps = { token: string; onSignedIn: () => void; onAnotherWay: () => void }

/** Where the letter's link leads: one button, so that a program that only looks at links uses nothing up. */
export function LetterSignIn({ token, onSignedIn, onAnotherWay }: LetterSignInProps) {
  const signIn = useMutation({
    mutationFn: () => account.signInByLetter(token),
    meta: { shown: true },
    onSuccess: onSignedIn,
  })
  return (
    <div className="flex flex-col gap-4">
      <FormError>{signIn.error ? signIn.error.message : null}</FormError>
      {!signIn.isError && <p>The letter has shown that the mailbox is yours.</p>}
      {signIn.isError ? (
        <Button variant="primary" size="large" onClick={onAnotherWay}>
          Ask for a new letter
        </Button>
      ) : (
        <Button variant="primary" size="large" busy={signIn.isPending} onClick={() => signIn.mutate()}>
          Sign in
        </Button>
      )}
    </div>
  )
}
