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
import { MIN_PASSWORD_LENGTH, account, emailSchema, passwordSchema } from '../account.ts'
import { PasswordInput } from './password-input.tsx'

const askSchema = z.object({ email: emailSchema })
const setSchema = z.object({ password: passwordSchema })

export type AskForResetProps = { email: string; onSent: (email: string) => void }

export function AskForReset({ email, onSent }: AskForResetProps) {
  const [refusal, setRefusal] = useState<string | null>(null)
  const { register, handleSubmit, setError, formState } = useForm<z.infer<typeof askSchema>>({
    resolver: zodResolver(askSchema),
    defaultValues: { email },
  })
  const send = useMutation({
    mutationFn: account.sendResetLetter,
    meta: { shown: true },
    onSuccess: (_answer, input) => onSent(input.email),
    onError: (error) => setRefusal(showIssues(error, setError, ['email'])),
  })
  return (
    <form
      noValidate
      className="flex flex-col gap-4"
      onSubmit={(event) => {
        setRefusal(null)
        void handleSubmit((values) => send.mutate(values))(event)
      }}
    >
      <FormError>{refusal}</FormError>
      <p className="text-ink-soft">A letter with a link comes to you; with it you choose a new one.</p>
      <Field label="E-mail" error={formState.errors.email?.message}>
        <Input type="email" autoComplete="username" inputMode="email" autoCapitalize="none" {...register('email')} />
      </Field>
      <Button type="submit" variant="primary" size="large" busy={send.isPending}>
        Send the letter
      </Button>
    </form>
  )
}

export type SetPasswordProps = { token: string; onSet: () => void }

export function SetPassword({ token, onSet }: SetPasswordProps) {
  const [refusal, setRefusal] = useState<string | null>(null)
  const { register, handleSubmit, setError, formState } = useForm<z.infer<typeof setSchema>>({
    resolver: zodResolver(setSchema),
    defaultValues: { password: '' },
  })
  const set = useMutation({
    mutationFn: (values: z.infer<typeof setSchema>) => account.setPassword({ token, newPassword: values.password }),
    meta: { shown: true },
    onSuccess: onSet,
    onError: (error) => setRefusal(showIssues(error, setError, ['password'])),
  })
  return (
    <form
      noValidate
      className="flex flex-col gap-4"
      onSubmit={(event) => {
        setRefusal(null)
        void handleSubmit((values) => set.mutate(values))(event)
      }}
    >
      <FormError>{refusal}</FormError>
      <Field
        label="New password"
        hint={`At least ${MIN_PASSWORD_LENGTH} characters. Everybody signed in with the old one is signed out.`}
        error={formState.errors.password?.message}
      >
        <PasswordInput autoComplete="new-password" {...register('password')} />
      </Field>
      <Button type="submit" variant="primary" size="large" busy={set.isPending}>
        Set the password
      </Button>
    </form>
  )
}
