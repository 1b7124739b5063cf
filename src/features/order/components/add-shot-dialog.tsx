import { useState } from 'react'
import { Button } from '#src/ui/button.tsx'
import { Dialog } from '#src/ui/dialog.tsx'
import { Field } from '#src/ui/field.tsx'
import { Input } from '#src/ui/input.tsx'

export type AddShotDialogProps = { onClose: () => void; onAdd: (title: string) => void }

export function AddShotDialog({ onClose, onAdd }: AddShotDialogProps) {
  const [title, setTitle] = useState('')
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      title="Add a shot"
      description="It stands at the end of the day; everything else can be filled in beside it."
    >
      <form
        className="flex flex-col gap-4"
        onSubmit={(event) => {
          event.preventDefault()
          if (title.trim() !== '') onAdd(title.trim())
        }}
      >
        <Field label="Title">
          <Input
            autoFocus
            maxLength={120}
            value={title}
            placeholder="Hands on the escapement"
            onChange={(event) => setTitle(event.target.value)}
          />
        </Field>
        <div className="flex justify-end">
          <Button type="submit" variant="primary" disabled={title.trim() === ''}>
            Add it
          </Button>
        </div>
      </form>
    </Dialog>
  )
}
