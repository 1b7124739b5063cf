import { zodResolver } from '@hookform/resolvers/zod'
import { useState } from 'react'
import { Controller, useForm, useWatch } from 'react-hook-form'
import { z } from 'zod'
import { ROLES } from '#shared/access/roles.ts'
import { showIssues } from '#src/lib/form-issues.ts'
import { ROLE_LINES, roleName } from '#src/lib/role-words.ts'
import { Button } from '#src/ui/button.tsx'
import { Dialog } from '#src/ui/dialog.tsx'
import { Field } from '#src/ui/field.tsx'
import { FormError } from '#src/ui/form-error.tsx'
import { Input } from '#src/ui/input.tsx'
import { Select } from '#src/ui/select.tsx'
import { toast } from '#src/ui/toast.ts'
import { emailSchema } from '../account.ts'
import type { useChangePeople } from '../mutations.ts'

const schema = z.object({
  email: emailSchema,
  name: z.string().trim().max(80, 'At most 80 characters'),
  role: z.enum(ROLES),
})

export type InviteDialogProps = {
  open: boolean
  onOpenChange: (open: boolean) => void
  change: ReturnType<typeof useChangePeople>
}

export function InviteDialog({ open, onOpenChange, change }: InviteDialogProps) {
  return (
    <Dialog
      open={open}
      onOpenChange={onOpenChange}
      title="Invite by letter"
      description="They get a letter with a link that works for seven days. They need no password."
    >
      <InviteForm change={change} onSent={() => onOpenChange(false)} />
    </Dialog>
  )
}

function InviteForm({ change, onSent }: { change: InviteDialogProps['change']; onSent: () => void }) {
  const [refusal, setRefusal] = useState<string | null>(null)
  const { register, control, handleSubmit, setError, formState } = useForm<z.infer<typeof schema>>({
    resolver: zodResolver(schema),
    defaultValues: { email: '', name: '', role: 'client' },
  })
  const role = useWatch({ control, name: 'role' })
  const handleValues = (values: z.infer<typeof schema>) =>
    change.mutate(
      { kind: 'invite', ...values },
      {
        onSuccess: () => {
          toast.say(`A letter is on its way to ${values.email}.`)
          onSent()
        },
        onError: (error) => setRefusal(showIssues(error, setError, ['email', 'name', 'role'])),
      },
    )
  return (
    <form
      noValidate
      className="flex flex-col gap-4"
      onSubmit={(event) => {
        setRefusal(null)
        void handleSubmit(handleValues)(event)
      }}
    >
      <FormError>{refusal}</FormError>
      <Field label="E-mail" error={formState.errors.email?.message}>
        <Input type="email" autoComplete="off" inputMode="email" autoCapitalize="none" {...register('email')} />
      </Field>
      <Field
        label="Name"
        hint="So that the letter can greet them. May stay empty."
        error={formState.errors.name?.message}
      >
        <Input autoComplete="off" {...register('name')} />
      </Field>
      <Field label="Role" hint={ROLE_LINES[role]}>
        <Controller
          control={control}
          name="role"
          render={({ field }) => (
            <Select
              options={ROLES.map((value) => ({ value, label: roleName(value) }))}
              value={field.value}
              onChange={field.onChange}
            />
          )}
        />
      </Field>
      <div className="flex justify-end">
        <Button type="submit" variant="primary" busy={change.isPending}>
          Send the letter
        </Button>
      </div>
    </form>
  )
}
