import { type FormEvent, useState } from 'react'
import { Button } from '#src/ui/button.tsx'
import { Dialog } from '#src/ui/dialog.tsx'
import { Field } from '#src/ui/field.tsx'
import { Input } from '#src/ui/input.tsx'
import { useRemoveShoot } from '../mutations.ts'

export type RemoveShootProps = { shootId: string; title: string; onRemoved: () => void }

/** The end of a shoot that is not wanted: asked for by its title, because nothing brings it back. */
export function RemoveShoot({ shootId, title, onRemoved }: RemoveShootProps) {
  const [isAsking, setIsAsking] = useState(false)
  const [typed, setTyped] = useState('')
  const remove = useRemoveShoot(shootId)
  const fits = typed.trim().toLocaleLowerCase() === title.trim().toLocaleLowerCase()
  const handleSubmit = (event: FormEvent) => {
    event.preventDefault()
    if (fits) remove.mutate(undefined, { onSuccess: onRemoved })
  }
  return (
    <>
      <Button variant="quiet" onClick={() => setIsAsking(true)}>
        Remove this shoot
      </Button>
      <Dialog
        open={isAsking}
        onOpenChange={(open) => {
          setIsAsking(open)
          setTyped('')
        }}
        title="Remove this shoot?"
        description="Board, looks, light, order, pictures and every sign-off go, for everybody and for good."
      >
        <form onSubmit={handleSubmit} className="flex flex-col gap-4">
          <Field label={`Type the title to go on: ${title}`}>
            <Input autoComplete="off" value={typed} onChange={(event) => setTyped(event.target.value)} />
          </Field>
          <div className="flex flex-wrap justify-end gap-2">
            <Button onClick={() => setIsAsking(false)}>Keep it</Button>
            <Button type="submit" variant="danger" disabled={!fits} busy={remove.isPending}>
              Remove the shoot
            </Button>
          </div>
        </form>
      </Dialog>
    </>
  )
}
