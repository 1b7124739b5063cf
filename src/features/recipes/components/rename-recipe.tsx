import { type FormEvent, useId, useState } from 'react'
import type { KeptRecipe } from '#shared/api/recipes.ts'
import { Dialog } from '#src/ui/dialog.tsx'
import { EditFooter } from '#src/ui/edit-footer.tsx'
import { Field } from '#src/ui/field.tsx'
import { FormError } from '#src/ui/form-error.tsx'
import { Input } from '#src/ui/input.tsx'

export type RenameRecipeProps = {
  kept: KeptRecipe
  isBusy: boolean
  refusal: string | null
  onSave: (name: string) => void
  onClose: () => void
}

export function RenameRecipe({ kept, isBusy, refusal, onSave, onClose }: RenameRecipeProps) {
  const form = useId()
  const [name, setName] = useState(kept.name)
  const [missing, setMissing] = useState('')
  function handleSubmit(event: FormEvent) {
    event.preventDefault()
    const words = name.trim()
    setMissing(words === '' ? 'Give it a name to find it by.' : '')
    if (words !== '' && !isBusy) onSave(words)
  }
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      title="Rename the recipe"
      description="Setups made by it keep their names."
      footer={<EditFooter form={form} busy={isBusy} onCancel={onClose} />}
    >
      <form id={form} noValidate className="flex flex-col gap-3" onSubmit={handleSubmit}>
        <FormError>{refusal}</FormError>
        <Field label="Name" error={missing}>
          <Input maxLength={80} autoComplete="off" value={name} onChange={(event) => setName(event.target.value)} />
        </Field>
      </form>
    </Dialog>
  )
}
