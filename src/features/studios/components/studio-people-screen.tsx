import { useSuspenseQuery } from '@tanstack/react-query'
import { useState } from 'react'
import { STUDIO_ROLES, type StudioRole, canInStudio } from '#shared/access/roles.ts'
import type { StudioPeople } from '#shared/api/studios.ts'
import { count, shortInstant } from '#src/lib/format.ts'
import { STUDIO_ROLE_LINES, roleName } from '#src/lib/role-words.ts'
import { Button } from '#src/ui/button.tsx'
import { Confirm } from '#src/ui/confirm.tsx'
import { Face } from '#src/ui/face.tsx'
import { ScreenBar } from '#src/ui/screen-bar.tsx'
import { Select } from '#src/ui/select.tsx'
import { useChangeStudioPeople } from '../mutations.ts'
import { studioQueries } from '../queries.ts'
import { InviteToStudio } from './invite-to-studio.tsx'

type Person = StudioPeople['people'][number]

export type StudioPeopleScreenProps = { studioId: string; name: string; role: StudioRole; userId: string }

/** Who belongs to the studio. That gives nobody a look inside a shoot. */
export function StudioPeopleScreen({ studioId, name, role, userId }: StudioPeopleScreenProps) {
  const { data } = useSuspenseQuery(studioQueries.people(studioId))
  const change = useChangeStudioPeople(studioId)
  const [isInviting, setIsInviting] = useState(false)
  const [removing, setRemoving] = useState<Person | null>(null)
  const mayChange = canInStudio(role, 'members.write')
  return (
    <>
      <title>{`People · ${name} · Sconce`}</title>
      <ScreenBar
        title="People"
        sub={`${count(data.people.length, 'person', 'people')} in ${name}`}
        actions={
          mayChange ? [{ label: 'Invite somebody', variant: 'primary', onPress: () => setIsInviting(true) }] : []
        }
      />
      <div className="flex max-w-4xl flex-col gap-5 px-4 pt-4 pb-10 md:px-6 md:pt-1">
        <ul className="divide-y divide-hair-soft rounded-r border border-hair bg-paper">
          {data.people.map((person) => (
            <li key={person.userId} className="flex flex-wrap items-center gap-x-4 gap-y-2 px-4 py-3">
              <Face initials={person.initials} name={person.name} colour={person.colour} sizePx={38} />
              <div className="min-w-40 flex-1">
                <b className="font-semibold">{person.name}</b>
                {person.userId === userId && <span className="text-ink-soft"> (you)</span>}
                <div className="text-xs break-all text-ink-soft">{person.email}</div>
              </div>
              {mayChange && person.userId !== userId ? (
                <>
                  <Select
                    aria-label={`Role of ${person.name}`}
                    className="!w-36"
                    options={STUDIO_ROLES.map((value) => ({ value, label: roleName(value) }))}
                    value={person.role}
                    onChange={(next) => change.mutate({ kind: 'role', userId: person.userId, role: next })}
                  />
                  <Button variant="quiet" onClick={() => setRemoving(person)}>
                    Remove
                  </Button>
                </>
              ) : (
                <span className="text-sm text-ink-soft">{roleName(person.role)}</span>
              )}
            </li>
          ))}
        </ul>
        {data.invitations.length > 0 && (
          <section>
            <h2 className="mb-2 text-lg">Invited</h2>
            <ul className="divide-y divide-hair-soft rounded-r border border-hair bg-paper">
              {data.invitations.map((invitation) => (
                <li key={invitation.id} className="flex flex-wrap items-center gap-x-4 gap-y-1 px-4 py-2.5 text-sm">
                  <span className="min-w-40 flex-1 font-semibold break-all">{invitation.email}</span>
                  <span className="text-ink-soft">
                    {roleName(invitation.role)} · until {shortInstant(invitation.expiresAtMs)}
                  </span>
                  {mayChange && (
                    <Button
                      variant="quiet"
                      onClick={() => change.mutate({ kind: 'withdraw', invitationId: invitation.id })}
                    >
                      Withdraw
                    </Button>
                  )}
                </li>
              ))}
            </ul>
          </section>
        )}
        <dl className="grid gap-x-8 gap-y-2 text-sm text-ink-soft sm:grid-cols-2">
          {STUDIO_ROLES.map((value) => (
            <div key={value}>
              <dt className="font-semibold text-ink">{roleName(value)}</dt>
              <dd>{STUDIO_ROLE_LINES[value]}</dd>
            </div>
          ))}
        </dl>
        <p className="text-sm text-ink-soft">
          Belonging to the studio gives nobody a look inside a shoot: people are invited into each shoot by its
          photographer.
        </p>
      </div>
      <InviteToStudio open={isInviting} onOpenChange={setIsInviting} invite={change} />
      <Confirm
        open={removing !== null}
        onOpenChange={(open) => !open && setRemoving(null)}
        title={`Remove ${removing?.name ?? ''} from the studio?`}
        action="Remove"
        keep="Keep them"
        onConfirm={() => {
          if (removing) change.mutate({ kind: 'remove', userId: removing.userId })
          setRemoving(null)
        }}
      >
        They lose the kit room, the minutes and the right to start shoots here. Shoots they are in stay as they are.
      </Confirm>
    </>
  )
}
