import { zodResolver } from '@hookform/resolvers/zod'
import { useMutation } from '@tanstack/react-query'
import { useState } from 'react'
import { useForm } from 'react-hook-form'
import type { z } from 'zod'
import { acceptInvitationSchema, acceptedInvitationSchema, type InvitationPage } from '#shared/api/people.ts'
import { ROLES } from '#shared/access/roles.ts'
import { api } from '#src/lib/api.ts'
import { showIssues } from '#src/lib/form-issues.ts'
import { ROLE_LINES, STUDIO_ROLE_LINES, asRole, roleName } from '#src/lib/role-words.ts'
import { Button } from '#src/ui/button.tsx'
import { Caution } from '#src/ui/caution.tsx'
import { Field } from '#src/ui/field.tsx'
import { FormError } from '#src/ui/form-error.tsx'
import { Input } from '#src/ui/input.tsx'

type Values = z.infer<typeof acceptInvitationSchema>

export type JoinFormProps = {
  token: string
  invitation: InvitationPage
  /** E-mail of who is signed in on this device now, if anybody. */
  signedInAs: string | null
  onJoined: (to: string) => void
}

/** An invitation: who asks, what for, as what; a name and one button. */
export function JoinForm({ token, invitation, signedInAs, onJoined }: JoinFormProps) {
  const [refusal, setRefusal] = useState<string | null>(null)
  const { register, handleSubmit, setError, formState } = useForm<Values>({
    resolver: zodResolver(acceptInvitationSchema),
    defaultValues: { name: invitation.name },
  })
  const join = useMutation({
    mutationFn: (body: Values) =>
      api(`/invitations/${encodeURIComponent(token)}/accept`, {
        method: 'POST',
        body,
        response: acceptedInvitationSchema,
      }),
    meta: { shown: true },
    onSuccess: ({ to }) => onJoined(to),
    onError: (error) => setRefusal(showIssues(error, setError, ['name'])),
  })
  const shootRole = ROLES.find((role) => role === invitation.role)
  const line = shootRole ? ROLE_LINES[shootRole] : STUDIO_ROLE_LINES[invitation.role === 'owner' ? 'owner' : 'member']
  return (
    <form
      noValidate
      className="flex flex-col gap-4"
      onSubmit={(event) => {
        setRefusal(null)
        void handleSubmit((values) => join.mutate(values))(event)
      }}
    >
      <p className="text-lg leading-snug">
        <b className="font-semibold">{invitation.inviter}</b> invites you to the {invitation.kind}{' '}
        <b className="font-semibold">{invitation.title}</b> as {asRole(invitation.role)}.
      </p>
      <div className="border-y border-hair py-3 text-sm">
        <b className="block font-semibold">{roleName(invitation.role)}</b>
        <span className="text-ink-soft">{line}</span>
      </div>
      {signedInAs !== null && signedInAs.toLowerCase() !== invitation.email.toLowerCase() && (
        <Caution>
          You are signed in as {signedInAs}, and the invitation is for {invitation.email}. Sign out first, then open the
          letter again.
        </Caution>
      )}
      <FormError>{refusal}</FormError>
      <Field
        label="Your name"
        hint={`You join as ${invitation.email}. No password is needed.`}
        error={formState.errors.name?.message}
      >
        <Input autoComplete="name" {...register('name')} />
      </Field>
      <Button type="submit" variant="primary" size="large" busy={join.isPending}>
        Join the {invitation.kind}
      </Button>
    </form>
  )
}
