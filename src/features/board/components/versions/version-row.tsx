import { MoreHorizontal } from 'lucide-react'
import { type FormEvent, useState } from 'react'
import { Link } from 'react-router-dom'
import { VERSION_NAME_MAX, type Version } from '#shared/api/versions.ts'
import { shortInstant } from '#src/lib/format.ts'
import { Button, IconButton, buttonClass } from '#src/ui/button.tsx'
import { Confirm } from '#src/ui/confirm.tsx'
import { FormError } from '#src/ui/form-error.tsx'
import { Input } from '#src/ui/input.tsx'
import { Menu } from '#src/ui/menu.tsx'
import { useChangeVersions } from '../../mutations.ts'

type VersionRowProps = {
  version: Version
  /** Its page, to look at it. */
  to: string
  zone: string
  mayWrite: boolean
  onLook: () => void
  onTakeBack: () => void
}

/** One kept version: what it is called, who kept it and when, and what can be done with it. */
export function VersionRow({ version, to, zone, mayWrite, onLook, onTakeBack }: VersionRowProps) {
  const change = useChangeVersions()
  const [name, setName] = useState<string | null>(null)
  const [removing, setRemoving] = useState(false)
  if (name !== null) {
    const handleSubmit = (event: FormEvent) => {
      event.preventDefault()
      const words = name.trim()
      if (words === '' || words === version.name) setName(null)
      else change.mutate({ kind: 'rename', id: version.id, name: words }, { onSuccess: () => setName(null) })
    }
    return (
      <li className="border-t border-hair-soft py-2.5">
        <form noValidate className="flex flex-wrap items-center gap-2" onSubmit={handleSubmit}>
          <Input
            autoFocus
            aria-label={`Another name for ${version.name}`}
            maxLength={VERSION_NAME_MAX}
            autoComplete="off"
            value={name}
            className="!w-auto min-w-40 flex-1"
            onChange={(event) => setName(event.target.value)}
            onKeyDown={(event) => {
              if (event.key !== 'Escape') return
              // The dialog around it stays.
              event.stopPropagation()
              setName(null)
            }}
          />
          <Button onClick={() => setName(null)}>Cancel</Button>
          <Button type="submit" variant="primary" busy={change.isPending}>
            Save
          </Button>
        </form>
        <FormError>{change.error?.message ?? null}</FormError>
      </li>
    )
  }
  return (
    <li className="border-t border-hair-soft py-2.5">
      <div className="flex items-center gap-2">
        <div className="min-w-0 flex-1">
          <div className="font-semibold break-words">{version.name}</div>
          <div className="text-xs text-ink-soft">
            {version.by}, {shortInstant(version.atMs, zone)}
          </div>
        </div>
        <Link to={to} className={buttonClass('plain', 'small')} aria-label={`Look at ${version.name}`} onClick={onLook}>
          Look
        </Link>
        {mayWrite && (
          <Menu
            trigger={
              <IconButton label={`More about ${version.name}`}>
                <MoreHorizontal size={17} aria-hidden />
              </IconButton>
            }
            items={[
              { label: 'Take it back', onSelect: onTakeBack },
              { label: 'Rename', onSelect: () => setName(version.name) },
              'line',
              { label: 'Remove', danger: true, onSelect: () => setRemoving(true) },
            ]}
          />
        )}
      </div>
      <Confirm
        open={removing}
        onOpenChange={setRemoving}
        title={`Remove “${version.name}”?`}
        action="Remove"
        busy={change.isPending}
        onConfirm={() => change.mutate({ kind: 'remove', id: version.id }, { onSuccess: () => setRemoving(false) })}
      >
        Nobody can look at it or take it back any more. The board itself stays as it is.
        <FormError>{change.error?.message ?? null}</FormError>
      </Confirm>
    </li>
  )
}
