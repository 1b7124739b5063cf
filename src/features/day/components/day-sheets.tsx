import { useState } from 'react'
import { Button } from '#src/ui/button.tsx'
import { Field } from '#src/ui/field.tsx'
import { Input } from '#src/ui/input.tsx'
import { Sheet } from '#src/ui/sheet.tsx'
import { Textarea } from '#src/ui/textarea.tsx'
import { FRAMES_MAX, NOTE_MAX, WHY_MAX } from '../write-day.ts'

export type SkipSheetProps = { title: string; onSkip: (why: string) => void; onClose: () => void }

/** Skipping asks for a word why, and takes none for an answer. */
export function SkipSheet({ title, onSkip, onClose }: SkipSheetProps) {
  const [why, setWhy] = useState('')
  return (
    <Sheet
      open
      onOpenChange={(open) => {
        if (!open) onClose()
      }}
      title={`Skip ${title}?`}
      footer={
        <>
          <Button onClick={onClose}>Keep it</Button>
          <Button variant="primary" onClick={() => onSkip(why)}>
            Skip this shot
          </Button>
        </>
      }
    >
      <Field label="Why, in a word" hint="For those who ask afterwards. It can stay empty.">
        <Input value={why} maxLength={WHY_MAX} onChange={(event) => setWhy(event.target.value)} />
      </Field>
    </Sheet>
  )
}

export type NoteSheetProps = {
  title: string
  note: string
  frames: string
  onSave: (note: string, frames: string) => void
  onClose: () => void
}

export function NoteSheet({ title, note, frames, onSave, onClose }: NoteSheetProps) {
  const [text, setText] = useState(note)
  const [numbers, setNumbers] = useState(frames)
  return (
    <Sheet
      open
      onOpenChange={(open) => {
        if (!open) onClose()
      }}
      title={`Note on ${title}`}
      footer={
        <>
          <Button onClick={onClose}>Leave it</Button>
          <Button variant="primary" onClick={() => onSave(text, numbers)}>
            Keep the note
          </Button>
        </>
      }
    >
      <div className="grid gap-3">
        <Field label="Frame numbers" hint="As the camera counts them, for the picks afterwards.">
          <Input
            value={numbers}
            maxLength={FRAMES_MAX}
            placeholder="0412–0450"
            onChange={(event) => setNumbers(event.target.value)}
          />
        </Field>
        <Field label="Note">
          <Textarea value={text} maxLength={NOTE_MAX} rows={4} onChange={(event) => setText(event.target.value)} />
        </Field>
      </div>
    </Sheet>
  )
}
