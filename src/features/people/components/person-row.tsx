import { ROLES, type Role } from '#shared/access/roles.ts'
import type { People } from '#shared/api/people.ts'
import { roleName } from '#src/lib/role-words.ts'
import { Button } from '#src/ui/button.tsx'
import { Face } from '#src/ui/face.tsx'
import { Select } from '#src/ui/select.tsx'

export type PersonRowProps = {
  person: People['people'][number]
  mayChange: boolean
  onRole: (role: Role) => void
  onRemove: () => void
}

export function PersonRow({ person, mayChange, onRole, onRemove }: PersonRowProps) {
  return (
    <li className="flex flex-wrap items-center gap-x-4 gap-y-2 px-4 py-3">
      <Face initials={person.initials} name={person.name} colour={person.colour} sizePx={38} />
      <div className="min-w-40 flex-1">
        <b className="font-semibold">{person.name}</b>
        {person.you && <span className="text-ink-soft"> (you)</span>}
        {person.email !== null && (
          <a
            href={`mailto:${person.email}`}
            className="block text-xs break-all text-ink-soft underline-offset-2 hover:underline max-md:py-3"
          >
            {person.email}
          </a>
        )}
      </div>
      {mayChange ? (
        <>
          <Select
            aria-label={`Role of ${person.name}`}
            className="!w-40"
            options={ROLES.map((value) => ({ value, label: roleName(value) }))}
            value={person.role}
            onChange={onRole}
          />
          <Button
            variant="quiet"
            aria-label={`Remove ${person.name}`}
            className={person.you ? 'invisible' : ''}
            onClick={onRemove}
          >
            Remove
          </Button>
        </>
      ) : (
        <span className="text-sm text-ink-soft">{roleName(person.role)}</span>
      )}
    </li>
  )
}
