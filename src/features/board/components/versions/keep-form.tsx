import { type FormEvent, useState } from 'react'
import { VERSION_NAME_MAX, type Version } from '#shared/api/versions.ts'
import { today } from '#src/lib/format.ts'
import { Button } from '#src/ui/button.tsx'
import { Field } from '#src/ui/field.tsx'
import { FormError } from '#src/ui/form-error.tsx'
import { Input } from '#src/ui/input.tsx'
import { useChangeVersions } from '../../mutations.ts'
import { proposedName } from '../../versions/version-days.ts'

/** Keeps the board as it stands; a name is proposed. */
export function KeepForm({ versions }: { versions: readonly Version[] }) {
  const change = useChangeVersions()
  const [typed, setTyped] = useState<string | null>(null)
  const [missing, setMissing] = useState('')
  const [kept, setKept] = useState('')
  const name = typed ?? proposedName(versions, today())
  const handleSubmit = (event: FormEvent) => {
    event.preventDefault()
    if (change.isPending) return
    const words = name.trim()
    setMissing(words === '' ? 'Give it a name to find it by.' : '')
    if (words === '') return
    change.mutate(
      { kind: 'keep', name: words },
      {
        onSuccess: () => {
          setTyped(null)
          setKept(words)
        },
      },
    )
  }
  return (
    <form noValidate className="flex flex-col gap-3" onSubmit={handleSubmit}>
      <FormError>{change.error?.message ?? null}</FormError>
      <div className="flex items-start gap-2 max-md:flex-col max-md:items-stretch">
        <Field label="The board as it stands now" error={missing} className="flex-1">
          <Input
            maxLength={VERSION_NAME_MAX}
            autoComplete="off"
            value={name}
            onChange={(event) => setTyped(event.target.value)}
            onFocus={(event) => event.currentTarget.select()}
          />
        </Field>
        <Button type="submit" variant="primary" busy={change.isPending} className="md:mt-[22px]">
          Keep this version
        </Button>
      </div>
      {/* Here and not at the edge of the screen, where it would lie over the list and not be read out. */}
      <p role="status" className="text-sm text-ink-soft empty:-mt-3">
        {kept !== '' && `“${kept}” is kept.`}
      </p>
    </form>
  )
}
