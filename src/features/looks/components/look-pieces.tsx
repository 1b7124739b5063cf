import { useState } from 'react'
import type { Piece } from '#shared/domain/looks/schema.ts'
import type { PlannedLook } from '#shared/domain/plan/read-plan.ts'
import { addMember, removeMember } from '#shared/realtime/collection.ts'
import { looks } from '#shared/realtime/documents.ts'
import { useDoc } from '#src/realtime/shoot-realtime.tsx'
import { Button } from '#src/ui/button.tsx'
import { Field } from '#src/ui/field.tsx'
import { Input } from '#src/ui/input.tsx'
import { Select } from '#src/ui/select.tsx'
import { Swatch } from '#src/ui/swatch.tsx'
import { addNewPiece } from '../write-looks.ts'

export type LookPiecesProps = {
  planned: PlannedLook
  /** Every piece of the shoot, to hang one that another look wears too. */
  all: ReadonlyMap<string, Piece>
  mayWrite: boolean
  onOpen: (pieceId: string) => void
}

/** What is worn: each piece opens; new ones are written down here, known ones are shared. */
export function LookPieces({ planned: { look, pieces }, all, mayWrite, onOpen }: LookPiecesProps) {
  const doc = useDoc('looks')
  const [name, setName] = useState('')
  const others = [...all.values()]
    .filter((piece) => !look.pieceIds.includes(piece.id))
    .sort((a, b) => a.name.localeCompare(b.name))
  return (
    <>
      <ul className="-mt-1">
        {pieces.map((piece) => (
          <li key={piece.id} className="flex items-center gap-2 border-t border-hair-soft first:border-0">
            <button
              type="button"
              onClick={() => onOpen(piece.id)}
              className="flex min-h-9 min-w-0 flex-1 items-center gap-2 rounded-r py-1.5 text-left hover:bg-ink/4 max-md:min-h-11"
            >
              <Swatch colour={piece.colour} sizePx={18} />
              <span className="min-w-0 flex-1">{piece.name}</span>
              <span className="text-sm text-ink-soft">{piece.status}</span>
            </button>
            {mayWrite && (
              <Button
                size="small"
                variant="quiet"
                aria-label={`Take ${piece.name} off this look`}
                onClick={() => removeMember(doc, looks, look.id, 'pieceIds', piece.id)}
              >
                Take off
              </Button>
            )}
          </li>
        ))}
        {pieces.length === 0 && (
          <li className="text-sm text-ink-soft">
            {mayWrite ? 'Write down the first piece: a coat, a ring, what is held.' : 'No pieces written down yet.'}
          </li>
        )}
      </ul>
      {mayWrite && (
        <form
          className="flex items-end gap-2"
          onSubmit={(event) => {
            event.preventDefault()
            if (name.trim() === '') return
            addNewPiece(doc, look.id, { name })
            setName('')
          }}
        >
          <Field label="New piece" className="flex-1">
            <Input
              value={name}
              maxLength={120}
              placeholder="Gloves, grey wool"
              onChange={(event) => setName(event.target.value)}
            />
          </Field>
          <Button type="submit" disabled={name.trim() === ''}>
            Add
          </Button>
        </form>
      )}
      {mayWrite && others.length > 0 && (
        <Field label="Or a piece another look wears">
          <Select
            value=""
            options={[
              { value: '', label: 'Choose a piece' },
              ...others.map((piece) => ({ value: String(piece.id), label: piece.name })),
            ]}
            onChange={(pieceId) => pieceId !== '' && addMember(doc, looks, look.id, 'pieceIds', pieceId, Math.random)}
          />
        </Field>
      )}
    </>
  )
}
