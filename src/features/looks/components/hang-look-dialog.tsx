import { type FormEvent, useState } from 'react'
import type { Sitter } from '#shared/domain/looks/schema.ts'
import { useDoc } from '#src/realtime/shoot-realtime.tsx'
import { Button } from '#src/ui/button.tsx'
import { Dialog } from '#src/ui/dialog.tsx'
import { Field } from '#src/ui/field.tsx'
import { Input } from '#src/ui/input.tsx'
import { Select } from '#src/ui/select.tsx'
import { sitterTitle } from '../words.ts'
import { hangLook, hangSitter } from '../write-looks.ts'

const NEW = 'new'

export type HangLookDialogProps = {
  sitters: readonly Sitter[]
  /** The rail it was opened at. */
  onSitterId: string | null
  onClose: () => void
  onHung: (lookId: string) => void
}

/** The two things a look begins with: its name and who wears it. */
export function HangLookDialog({ sitters, onSitterId, onClose, onHung }: HangLookDialogProps) {
  const doc = useDoc('looks')
  const [name, setName] = useState('')
  const [sitterId, setSitterId] = useState(onSitterId ?? (sitters[0]?.id as string | undefined) ?? NEW)
  const [newName, setNewName] = useState('')
  const [character, setCharacter] = useState('')
  const [isTried, setIsTried] = useState(false)
  const isNew = sitterId === NEW

  function submit(event: FormEvent) {
    event.preventDefault()
    setIsTried(true)
    if (name.trim() === '' || (isNew && newName.trim() === '')) return
    const known = sitters.find((sitter) => sitter.id === sitterId)
    onHung(hangLook(doc, { name, sitterId: known?.id ?? hangSitter(doc, { name: newName, character }) }))
  }

  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      title="Hang a look"
      footer={
        <>
          <Button onClick={onClose}>Not now</Button>
          <Button variant="primary" type="submit" form="hang-look">
            Hang it
          </Button>
        </>
      }
    >
      <form id="hang-look" onSubmit={submit} className="flex flex-col gap-4">
        <Field label="Name of the look" error={isTried && name.trim() === '' ? 'Give the look a name.' : undefined}>
          <Input
            autoFocus
            value={name}
            maxLength={80}
            placeholder="Night coat"
            onChange={(event) => setName(event.target.value)}
          />
        </Field>
        {sitters.length > 0 && (
          <Field label="On whom">
            <Select
              value={sitterId}
              options={[
                ...sitters.map((sitter) => ({ value: String(sitter.id), label: sitterTitle(sitter) })),
                { value: NEW, label: 'Somebody new' },
              ]}
              onChange={setSitterId}
            />
          </Field>
        )}
        {isNew && (
          <div className="grid grid-cols-2 gap-3">
            <Field label="Sitter" error={isTried && newName.trim() === '' ? 'Say who wears it.' : undefined}>
              <Input value={newName} maxLength={80} onChange={(event) => setNewName(event.target.value)} />
            </Field>
            <Field label="Plays">
              <Input
                value={character}
                maxLength={80}
                placeholder="The Astronomer"
                onChange={(event) => setCharacter(event.target.value)}
              />
            </Field>
          </div>
        )}
      </form>
    </Dialog>
  )
}
