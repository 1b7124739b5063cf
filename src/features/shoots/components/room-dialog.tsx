import { zodResolver } from '@hookform/resolvers/zod'
import { useId, useState } from 'react'
import { Controller, type Control, useForm } from 'react-hook-form'
import { z } from 'zod'
import type { Room } from '#shared/domain/shoots/schema.ts'
import { showIssues } from '#src/lib/form-issues.ts'
import { Dialog } from '#src/ui/dialog.tsx'
import { EditFooter } from '#src/ui/edit-footer.tsx'
import { Field } from '#src/ui/field.tsx'
import { FormError } from '#src/ui/form-error.tsx'
import { Input } from '#src/ui/input.tsx'
import { NumberInput } from '#src/ui/number-input.tsx'
import { Textarea } from '#src/ui/textarea.tsx'
import { useChangeBrief } from '../mutations.ts'

const schema = z.object({
  name: z.string().trim().min(1, 'Give the room a name').max(80, 'At most 80 characters'),
  widthM: z.number().nullable(),
  depthM: z.number().nullable(),
  ceilingM: z.number().nullable(),
  power: z.string().max(500, 'At most 500 characters'),
  windows: z.string().max(500, 'At most 500 characters'),
  note: z.string().max(1000, 'At most 1000 characters'),
})
type Values = z.infer<typeof schema>

export type RoomDialogProps = { room: Room | null; shootId: string; onClose: () => void }

export function RoomDialog({ room, shootId, onClose }: RoomDialogProps) {
  const [refusal, setRefusal] = useState<string | null>(null)
  const change = useChangeBrief(shootId)
  const formId = useId()
  const { register, control, handleSubmit, setError, formState } = useForm<Values>({
    resolver: zodResolver(schema),
    defaultValues: {
      name: room?.name ?? '',
      widthM: room?.widthM ?? null,
      depthM: room?.depthM ?? null,
      ceilingM: room?.ceilingM ?? null,
      power: room?.power ?? '',
      windows: room?.windows ?? '',
      note: room?.note ?? '',
    },
  })
  const { errors } = formState
  const onError = (error: unknown) =>
    setRefusal(showIssues(error, setError, ['name', 'widthM', 'depthM', 'ceilingM', 'power', 'windows', 'note']))
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      title={room ? `Change: ${room.name}` : 'Add a room'}
      footer={
        <EditFooter
          form={formId}
          busy={change.isPending}
          onCancel={onClose}
          onRemove={
            room ? () => change.mutate({ kind: 'no-room', id: room.id }, { onSuccess: onClose, onError }) : undefined
          }
        />
      }
    >
      <form
        id={formId}
        noValidate
        className="flex flex-col gap-4"
        onSubmit={(event) =>
          void handleSubmit((values) =>
            change.mutate({ kind: 'room', id: room?.id ?? null, room: values }, { onSuccess: onClose, onError }),
          )(event)
        }
      >
        <FormError>{refusal}</FormError>
        <Field label="Name" error={errors.name?.message}>
          <Input autoComplete="off" placeholder="Long gallery" {...register('name')} />
        </Field>
        <div className="grid grid-cols-3 gap-3">
          <Metres control={control} name="widthM" label="Width" max={200} />
          <Metres control={control} name="depthM" label="Depth" max={200} />
          <Metres control={control} name="ceilingM" label="Ceiling" max={60} />
        </div>
        <Field
          label="Power"
          hint="Sockets and breakers as the venue tells them; ask the venue, and leave mains work to licensed electricians."
          error={errors.power?.message}
        >
          <Textarea rows={2} {...register('power')} />
        </Field>
        <Field
          label="Windows"
          hint="Which way they look, how big, whether they can be covered."
          error={errors.windows?.message}
        >
          <Textarea rows={2} {...register('windows')} />
        </Field>
        <Field label="Note" error={errors.note?.message}>
          <Textarea rows={2} {...register('note')} />
        </Field>
      </form>
    </Dialog>
  )
}

function Metres({
  control,
  name,
  label,
  max,
}: {
  control: Control<Values>
  name: 'widthM' | 'depthM' | 'ceilingM'
  label: string
  max: number
}) {
  return (
    <Field label={label}>
      <Controller
        control={control}
        name={name}
        render={({ field }) => (
          <NumberInput allowEmpty unit="m" min={0} max={max} step={0.1} value={field.value} onChange={field.onChange} />
        )}
      />
    </Field>
  )
}
