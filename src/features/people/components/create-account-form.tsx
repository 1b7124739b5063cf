import { zodResolver } from '@hookform/resolvers/zod'
import { useMutation } from '@tanstack/react-query'
import { useState } from 'react'
import { useForm } from 'react-hook-form'
import { z } from 'zod'
import { showIssues } from '#src/lib/form-issues.ts'
import { Button } from '#src/ui/button.tsx'
import { Field } from '#src/ui/field.tsx'
import { FormError } from '#src/ui/form-error.tsx'
import { Input } from '#src/ui/input.tsx'
import { MIN_PASSWORD_LENGTH, account, emailSchema, nameSchema, passwordSchema } from '../account.ts'
import { PasswordInput } from './password-input.tsx'

const schema = z.object({ name: nameSchema, email: emailSchema, password: passwordSchema })
type Values = z.infer<typeof schema>

export type CreateAccountFormProps = { onCreated: () => void }

export function CreateAccountForm({ onCreated }: CreateAccountFormProps) {
  const [refusal, setRefusal] = useState<string | null>(null)
  const { register, handleSubmit, setError, formState } = useForm<Values>({
    resolver: zodResolver(schema),
    defaultValues: { name: '', email: '', password: '' },
  })
  const create = useMutation({
    mutationFn: account.create,
    meta: { shown: true },
    onSuccess: onCreated,
    onError: (error) => setRefusal(showIssues(error, setError, ['name', 'email', 'password'])),
  })
  return (
    <form
      noValidate
      className="flex flex-col gap-4"
      onSubmit={(event) => {
        setRefusal(null)
        void handleSubmit((values) => create.mutate(values))(event)
      }}
    >
      <FormError>{refusal}</FormError>
      <Field label="Your name" hint="As the others should see it." error={formState.errors.name?.message}>
        <Input autoComplete="name" {...register('name')} />
      </Field>
      <Field label="E-mail" error={formState.errors.email?.message}>
        <Input type="email" autoComplete="username" inputMode="email" autoCapitalize="none" {...register('email')} />
      </Field>
      <Field
        label="Password"
        hint={`At least ${MIN_PASSWORD_LENGTH} characters; a few words are easier than signs.`}
        error={formState.errors.password?.message}
      >
        <PasswordInput autoComplete="new-password" {...register('password')} />
      </Field>
      <Button type="submit" variant="primary" size="large" busy={create.isPending} className="mt-1">
        Create the account
      </Button>
    </form>
  )
}
