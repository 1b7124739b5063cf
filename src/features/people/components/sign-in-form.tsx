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
import { account, emailSchema } from '../account.ts'
import { PasswordInput } from './password-input.tsx'

const schema = z.object({ email: emailSchema, password: z.string().min(1, 'Type your password') })
type Values = z.infer<typeof schema>

export type SignInFormProps = { onSignedIn: () => void; onLetterSent: (email: string) => void }

/** E-mail and password, or a letter that signs one in. */
export function SignInForm({ onSignedIn, onLetterSent }: SignInFormProps) {
  const [refusal, setRefusal] = useState<string | null>(null)
  const { register, handleSubmit, setError, getValues, trigger, formState } = useForm<Values>({
    resolver: zodResolver(schema),
    defaultValues: { email: '', password: '' },
  })
  const onError = (error: unknown) => setRefusal(showIssues(error, setError, ['email', 'password']))
  const signIn = useMutation({ mutationFn: account.signIn, meta: { shown: true }, onSuccess: onSignedIn, onError })
  const letter = useMutation({
    mutationFn: account.sendSignInLetter,
    meta: { shown: true },
    onSuccess: (_answer, { email }) => onLetterSent(email),
    onError,
  })
  return (
    <form
      noValidate
      className="flex flex-col gap-4"
      onSubmit={(event) => {
        setRefusal(null)
        void handleSubmit((values) => signIn.mutate(values))(event)
      }}
    >
      <FormError>{refusal}</FormError>
      <Field label="E-mail" error={formState.errors.email?.message}>
        <Input type="email" autoComplete="username" inputMode="email" autoCapitalize="none" {...register('email')} />
      </Field>
      <Field label="Password" error={formState.errors.password?.message}>
        <PasswordInput autoComplete="current-password" {...register('password')} />
      </Field>
      <div className="flex flex-col gap-2 pt-1">
        <Button type="submit" variant="primary" size="large" busy={signIn.isPending}>
          Sign in
        </Button>
        <Button
          size="large"
          busy={letter.isPending}
          onClick={() => {
            setRefusal(null)
            void trigger('email', { shouldFocus: true }).then((fits) => {
              if (fits) letter.mutate({ email: getValues('email') })
            })
          }}
        >
          Send me a letter to sign in
        </Button>
      </div>
    </form>
  )
}
