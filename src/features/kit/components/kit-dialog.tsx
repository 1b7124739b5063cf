import { type FormEvent, useId, useMemo, useState } from 'react'
import type { KitItem } from '#shared/api/kit.ts'
import type { KitInput } from '#shared/domain/kit/schema.ts'
import { Dialog } from '#src/ui/dialog.tsx'
import { EditFooter } from '#src/ui/edit-footer.tsx'
import { Field } from '#src/ui/field.tsx'
import { FormError } from '#src/ui/form-error.tsx'
import { Input } from '#src/ui/input.tsx'
import { NumberInput } from '#src/ui/number-input.tsx'
import { Textarea } from '#src/ui/textarea.tsx'
import { KitIssuesContext, issuesOf } from '../kit-issues.ts'
import { KitNumbers } from './kit-numbers.tsx'

export type KitDialogProps = {
  title: string
  input: KitInput
  /** Modifiers of the kit, for meter readings. */
  modifiers: readonly KitItem[]
  isBusy: boolean
  refusal: string | null
  onClose: () => void
  onSave: (input: KitInput) => void
}

export function KitDialog({ title, input, modifiers, isBusy, refusal, onClose, onSave }: KitDialogProps) {
  const [draft, setDraft] = useState<KitInput>({
    name: input.name,
    quantity: input.quantity,
    note: input.note,
    body: input.body,
  })
  const [isNameMissing, setIsNameMissing] = useState(false)
  const [isRefused, setIsRefused] = useState(false)
  const issues = useMemo(() => issuesOf({ ...draft, name: draft.name.trim() || 'x' }), [draft])
  const form = useId()
  const handleSubmit = (event: FormEvent) => {
    event.preventDefault()
    const name = draft.name.trim()
    setIsNameMissing(name === '')
    setIsRefused(issues.size > 0)
    if (name !== '' && issues.size === 0) onSave({ ...draft, name })
  }
  return (
    <Dialog
      open
      wide
      onOpenChange={(open) => !open && onClose()}
      title={title}
      footer={<EditFooter form={form} busy={isBusy} onCancel={onClose} />}
    >
      <form id={form} noValidate onSubmit={handleSubmit} className="flex flex-col gap-4">
        <FormError>
          {isRefused && issues.size > 0
            ? `${issues.size === 1 ? 'One number' : 'Some numbers'} cannot be right: see below. Nothing was saved; what you typed is still here.`
            : refusal}
        </FormError>
        <div className="grid gap-4 sm:grid-cols-[minmax(0,1fr)_7rem]">
          <Field label="Name" error={isNameMissing ? 'Give it a name' : undefined}>
            <Input
              autoComplete="off"
              maxLength={120}
              value={draft.name}
              onChange={(event) => setDraft({ ...draft, name: event.target.value })}
            />
          </Field>
          <Field label="How many" error={issues.get('quantity')}>
            <NumberInput
              value={draft.quantity}
              onChange={(quantity) => setDraft({ ...draft, quantity: Math.round(quantity) })}
            />
          </Field>
        </div>
        <KitIssuesContext value={issues}>
          <KitNumbers body={draft.body} modifiers={modifiers} onChange={(body) => setDraft({ ...draft, body })} />
        </KitIssuesContext>
        <Field label="Note">
          <Textarea
            rows={2}
            maxLength={1000}
            value={draft.note}
            onChange={(event) => setDraft({ ...draft, note: event.target.value })}
          />
        </Field>
      </form>
    </Dialog>
  )
}
