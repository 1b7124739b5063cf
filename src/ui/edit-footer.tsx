import { Button } from './button.tsx'

export type EditFooterProps = {
  /** Id of the form that is saved. */
  form: string
  busy: boolean
  onCancel: () => void
  /** Missing for what is only being added, and for what is removed elsewhere. */
  onRemove?: (() => void) | undefined
}

/** The foot of a dialog that changes one thing: remove it, leave it, save it. */
export function EditFooter({ form, busy, onCancel, onRemove }: EditFooterProps) {
  return (
    <>
      {onRemove && (
        <Button variant="danger" className="mr-auto" busy={busy} onClick={onRemove}>
          Remove
        </Button>
      )}
      <Button onClick={onCancel}>Cancel</Button>
      <Button type="submit" form={form} variant="primary" busy={busy}>
        Save
      </Button>
    </>
  )
}
