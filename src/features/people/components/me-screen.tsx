import { zodResolver } from '@hookform/resolvers/zod'
import { useMutation } from '@tanstack/react-query'
import { useState } from 'react'
import { useForm } from 'react-hook-form'
import { Link } from 'react-router-dom'
import { z } from 'zod'
import type { Session } from '#shared/api/studios.ts'
import { count } from '#src/lib/format.ts'
import { showIssues } from '#src/lib/form-issues.ts'
import { Button, buttonClass } from '#src/ui/button.tsx'
import { Confirm } from '#src/ui/confirm.tsx'
import { Face } from '#src/ui/face.tsx'
import { Field } from '#src/ui/field.tsx'
import { Input } from '#src/ui/input.tsx'
import { ScreenBar } from '#src/ui/screen-bar.tsx'
import { toast } from '#src/ui/toast.ts'
import { account, nameSchema } from '../account.ts'

export type MeScreenProps = {
  user: Session['user']
  /** Own edits that only this device holds. */
  unsent: number
  /** Whether this machine keeps its letters itself. */
  letters: boolean
  onSignOut: () => Promise<void>
  onRenamed: () => void
}

const CARD = 'rounded-r border border-hair bg-paper px-5 py-5'

export function MeScreen({ user, unsent, letters, onSignOut, onRenamed }: MeScreenProps) {
  const [isAsking, setIsAsking] = useState(false)
  const signOut = useMutation({ mutationFn: onSignOut })
  const elsewhere = useMutation({
    mutationFn: account.signOutElsewhere,
    onSuccess: () => toast.say('Everybody else who was signed in as you is signed out.'),
  })
  return (
    <>
      <title>You · Sconce</title>
      <ScreenBar title="You" />
      <div className="flex max-w-xl flex-col gap-4 px-4 pt-4 pb-10 md:px-6 md:pt-1">
        <section className={CARD}>
          <div className="mb-4 flex items-center gap-4">
            <Face initials={user.initials} name={user.name} colour={user.colour} sizePx={52} />
            <div className="min-w-0">
              <b className="block font-display text-xl font-semibold">{user.name}</b>
              <span className="text-sm break-all text-ink-soft">{user.email}</span>
            </div>
          </div>
          <NameForm name={user.name} onRenamed={onRenamed} />
        </section>
        <section className={CARD}>
          <h2 className="text-lg">Signing in</h2>
          <p className="mt-1 mb-3 text-sm text-ink-soft">
            A letter with a link lets you set a password, or another one.
          </p>
          <div className="flex flex-wrap gap-2">
            <Link to="/reset" className={buttonClass()}>
              Set a password
            </Link>
            <Button busy={elsewhere.isPending} onClick={() => elsewhere.mutate()}>
              Sign out everywhere else
            </Button>
            {letters && (
              <Link to="/letters" className={buttonClass('quiet')}>
                Letters of this machine
              </Link>
            )}
          </div>
        </section>
        <section className={CARD}>
          <h2 className="text-lg">This device</h2>
          <p className="mt-1 mb-3 text-sm text-ink-soft">
            {unsent === 0
              ? 'Everything you did here is on the server. Signing out also forgets the shoots kept on this device.'
              : `${count(unsent, 'change')} of yours ${unsent === 1 ? 'is' : 'are'} kept on this device only and not sent yet. Open the shoot with a signal and wait for “Saved” before signing out.`}
          </p>
          <Button busy={signOut.isPending} onClick={() => (unsent === 0 ? signOut.mutate() : setIsAsking(true))}>
            Sign out
          </Button>
        </section>
      </div>
      <Confirm
        open={isAsking}
        onOpenChange={setIsAsking}
        title={`Lose ${count(unsent, 'change')}?`}
        action="Sign out and lose them"
        keep="Stay signed in"
        busy={signOut.isPending}
        onConfirm={() => signOut.mutate()}
      >
        {unsent === 1 ? 'It is' : 'They are'} on this device only. Signing out now forgets{' '}
        {unsent === 1 ? 'it' : 'them'} for good.
      </Confirm>
    </>
  )
}

const schema = z.object({ name: nameSchema })

function NameForm({ name, onRenamed }: { name: string; onRenamed: () => void }) {
  const { register, handleSubmit, setError, formState } = useForm<z.infer<typeof schema>>({
    resolver: zodResolver(schema),
    values: { name },
  })
  const rename = useMutation({
    mutationFn: account.rename,
    meta: { shown: true },
    onSuccess: () => {
      toast.say('The others see your new name from now on.')
      onRenamed()
    },
    onError: (error) => setError('name', { message: showIssues(error, setError, ['name']) }),
  })
  return (
    <form
      noValidate
      onSubmit={(event) => void handleSubmit((values) => rename.mutate(values))(event)}
      className="flex flex-wrap items-end gap-2"
    >
      <Field label="Your name" error={formState.errors.name?.message} className="min-w-48 flex-1">
        <Input autoComplete="name" {...register('name')} />
      </Field>
      <Button type="submit" busy={rename.isPending} disabled={!formState.isDirty}>
        Change the name
      </Button>
    </form>
  )
}
