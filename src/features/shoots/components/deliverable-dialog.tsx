import { zodResolver } from '@hookform/resolvers/zod'
import { useId, useState } from 'react'
import { Controller, useForm } from 'react-hook-form'
import { z } from 'zod'
import { DELIVERABLE_ORIENTATIONS, type Deliverable } from '#shared/domain/shoots/schema.ts'
import { showIssues } from '#src/lib/form-issues.ts'
import { Dialog } from '#src/ui/dialog.tsx'
import { EditFooter } from '#src/ui/edit-footer.tsx'
import { Field } from '#src/ui/field.tsx'
import { FormError } from '#src/ui/form-error.tsx'
import { Input } from '#src/ui/input.tsx'
import { NumberInput } from '#src/ui/number-input.tsx'
import { Select } from '#src/ui/select.tsx'
import { Textarea } from '#src/ui/textarea.tsx'
import { useChangeBrief } from '../mutations.ts'

const schema = z.object({
  title: z.string().trim().min(1, 'Say what the picture is').max(120, 'At most 120 characters'),
  count: z.number(),
  orientation: z.enum(DELIVERABLE_ORIENTATIONS),
  use: z.string().max(300, 'At most 300 characters'),
  dueOn: z.string(),
})
type Values = z.infer<typeof schema>

export type DeliverableDialogProps = { deliverable: Deliverable | null; shootId: string; onClose: () => void }

export function DeliverableDialog({ deliverable, shootId, onClose }: DeliverableDialogProps) {
  const [refusal, setRefusal] = useState<string | null>(null)
  const change = useChangeBrief(shootId)
  const formId = useId()
  const { register, control, handleSubmit, setError, formState } = useForm<Values>({
    resolver: zodResolver(schema),
    defaultValues: {
      title: deliverable?.title ?? '',
      count: deliverable?.count ?? 1,
      orientation: deliverable?.orientation ?? 'any',
      use: deliverable?.use ?? '',
      dueOn: deliverable?.dueOn ?? '',
    },
  })
  const onError = (error: unknown) =>
    setRefusal(showIssues(error, setError, ['title', 'count', 'orientation', 'use', 'dueOn']))
  const handleValues = ({ dueOn, ...values }: Values) =>
    change.mutate(
      {
        kind: 'deliverable',
        id: deliverable?.id ?? null,
        deliverable: { ...values, dueOn: dueOn === '' ? null : dueOn },
      },
      { onSuccess: onClose, onError },
    )
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      title={deliverable ? 'Change a deliverable' : 'Add a deliverable'}
      footer={
        <EditFooter
          form={formId}
          busy={change.isPending}
          onCancel={onClose}
          onRemove={
            deliverable
              ? () => change.mutate({ kind: 'no-deliverable', id: deliverable.id }, { onSuccess: onClose, onError })
              : undefined
          }
        />
      }
    >
      <form
        id={formId}
        noValidate
        className="flex flex-col gap-4"
        onSubmit={(event) => void handleSubmit(handleValues)(event)}
      >
        <FormError>{refusal}</FormError>
        <div className="grid grid-cols-[5.5rem_minmax(0,1fr)] gap-3">
          <Field label="How many">
            <Controller
              control={control}
              name="count"
              render={({ field }) => (
                <NumberInput
                  min={1}
                  max={999}
                  value={field.value}
                  onChange={(count) => field.onChange(Math.round(count))}
                />
              )}
            />
          </Field>
          <Field label="What" error={formState.errors.title?.message}>
            <Input autoComplete="off" placeholder="Portrait of each character" {...register('title')} />
          </Field>
        </div>
        <div className="grid gap-3 sm:grid-cols-2">
          <Field label="How it is held">
            <Controller
              control={control}
              name="orientation"
              render={({ field }) => (
                <Select
                  options={DELIVERABLE_ORIENTATIONS.map((value) => ({ value, label: value }))}
                  value={field.value}
                  onChange={field.onChange}
                />
              )}
            />
          </Field>
          <Field label="Due on" error={formState.errors.dueOn?.message}>
            <Input type="date" {...register('dueOn')} />
          </Field>
        </div>
        <Field label="What it is for" error={formState.errors.use?.message}>
          <Textarea rows={2} placeholder="Shop window, two by three metres" {...register('use')} />
        </Field>
      </form>
    </Dialog>
  )
}
