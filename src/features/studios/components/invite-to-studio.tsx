import { zodResolver } from '@hookform/resolvers/zod'
import { useState } from 'react'
import { Controller, useForm, useWatch } from 'react-hook-form'
import type { z } from 'zod'
import { STUDIO_ROLES } from '#shared/access/roles.ts'
import { studioInvitationInputSchema } from '#shared/api/studios.ts'
import { showIssues } from '#src/lib/form-issues.ts'
import { STUDIO_ROLE_LINES, roleName } from '#src/lib/role-words.ts'
import { Button } from '#src/ui/button.tsx'
import { Dialog } from '#src/ui/dialog.tsx'
import { Field } from '#src/ui/field.tsx'
import { FormError } from '#src/ui/form-error.tsx'
import { Input } from '#src/ui/input.tsx'
import { Select } from '#src/ui/select.tsx'
import { toast } from '#src/ui/toast.ts'
import type { useChangeStudioPeople } from '../mutations.ts'

export type InviteToStudioProps = {
  open: boolean
  onOpenChange: (open: boolean) => void
  invite: ReturnType<typeof useChangeStudioPeople>
}

export function InviteToStudio({ open, onOpenChange, invite }: InviteToStudioProps) {
  return (
    <Dialog
      open={open}
      onOpenChange={onOpenChange}
      title="Invite somebody to the studio"
      description="They get a letter with a link that works for seven days."
    >
      <InviteForm invite={invite} onSent={() => onOpenChange(false)} />
    </Dialog>
  )
}

function InviteForm({ invite, onSent }: { invite: InviteToStudioProps['invite']; onSent: () => void }) {
  const [refusal, setRefusal] = useState<string | null>(null)
  const { register, control, handleSubmit, setError, formState } = useForm<z.infer<typeof studioInvitationInputSchema>>(
    {
      resolver: zodResolver(studioInvitationInputSchema),
      defaultValues: { email: '', role: 'member' },
    },
  )
  const role = useWatch({ control, name: 'role' })
  return (
    <form
      noValidate
      className="flex flex-col gap-4"
      onSubmit={(event) => {
        setRefusal(null)
        void handleSubmit((values) =>
          invite.mutate(
            { kind: 'invite', ...values },
            {
              onSuccess: () => {
                toast.say(`A letter is on its way to ${values.email}.`)
                onSent()
              },
              onError: (error) => setRefusal(showIssues(error, setError, ['email', 'role'])),
            },
          ),
        )(event)
      }}
    >
      <FormError>{refusal}</FormError>
      <Field label="E-mail" error={formState.errors.email && 'This is not an e-mail address'}>
        <Input type="email" autoComplete="off" inputMode="email" autoCapitalize="none" {...register('email')} />
      </Field>
      <Field label="As" hint={STUDIO_ROLE_LINES[role]}>
        <Controller
          control={control}
          name="role"
          render={({ field }) => (
            <Select
              options={STUDIO_ROLES.map((value) => ({ value, label: roleName(value) }))}
              value={field.value}
              onChange={field.onChange}
            />
          )}
        />
      </Field>
      <div className="flex justify-end">
        <Button type="submit" variant="primary" busy={invite.isPending}>
          Send the letter
        </Button>
      </div>
    </form>
  )
}
