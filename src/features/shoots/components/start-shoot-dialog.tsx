import { zodResolver } from '@hookform/resolvers/zod'
import { useState } from 'react'
import { Controller, useForm } from 'react-hook-form'
import { z } from 'zod'
import { browserZone, zones } from '#src/lib/format.ts'
import { showIssues } from '#src/lib/form-issues.ts'
import { Button } from '#src/ui/button.tsx'
import { Dialog } from '#src/ui/dialog.tsx'
import { Field } from '#src/ui/field.tsx'
import { FormError } from '#src/ui/form-error.tsx'
import { Input } from '#src/ui/input.tsx'
import { Select } from '#src/ui/select.tsx'
import { useCreateShoot } from '../mutations.ts'

const schema = z.object({
  studioId: z.string(),
  title: z.string().trim().min(1, 'Give it a working title').max(120, 'At most 120 characters'),
  date: z.string(),
  zone: z.string(),
})
type Values = z.infer<typeof schema>

export type StartShootDialogProps = {
  open: boolean
  onOpenChange: (open: boolean) => void
  studios: readonly { id: string; name: string }[]
  onStarted: (shootId: string) => void
}

export function StartShootDialog({ open, onOpenChange, studios, onStarted }: StartShootDialogProps) {
  return (
    <Dialog
      open={open}
      onOpenChange={onOpenChange}
      title="Start a shoot"
      description="A title is enough; everything else can wait for the brief."
    >
      <StartShootForm studios={studios} onStarted={onStarted} />
    </Dialog>
  )
}

function StartShootForm({ studios, onStarted }: Pick<StartShootDialogProps, 'studios' | 'onStarted'>) {
  const [refusal, setRefusal] = useState<string | null>(null)
  const zone = browserZone()
  const { register, control, handleSubmit, setError, formState } = useForm<Values>({
    resolver: zodResolver(schema),
    defaultValues: { studioId: studios[0]?.id ?? '', title: '', date: '', zone },
  })
  const create = useCreateShoot()
  const handleValues = (values: Values) =>
    create.mutate(
      {
        studioId: values.studioId,
        title: values.title,
        date: values.date === '' ? null : values.date,
        zone: values.zone,
      },
      {
        onSuccess: ({ id }) => onStarted(id),
        onError: (error) => setRefusal(showIssues(error, setError, ['title', 'date', 'zone'])),
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
      <Field label="Title" error={formState.errors.title?.message}>
        <Input autoComplete="off" {...register('title')} />
      </Field>
      {studios.length > 1 && (
        <Field label="Studio">
          <Controller
            control={control}
            name="studioId"
            render={({ field }) => (
              <Select
                options={studios.map(({ id, name }) => ({ value: id, label: name }))}
                value={field.value}
                onChange={field.onChange}
              />
            )}
          />
        </Field>
      )}
      <div className="grid gap-4 sm:grid-cols-2">
        <Field label="First day" hint="Leave it open if it is not settled." error={formState.errors.date?.message}>
          <Input type="date" {...register('date')} />
        </Field>
        <Field label="Time zone" hint="Where the shoot happens." error={formState.errors.zone?.message}>
          <Controller
            control={control}
            name="zone"
            render={({ field }) => (
              <Select
                options={zones(zone).map((name) => ({ value: name, label: name.replaceAll('_', ' ') }))}
                value={field.value}
                onChange={field.onChange}
              />
            )}
          />
        </Field>
      </div>
      <div className="flex justify-end pt-1">
        <Button type="submit" variant="primary" busy={create.isPending}>
          Start the shoot
        </Button>
      </div>
    </form>
  )
}
