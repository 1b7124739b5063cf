import { useSuspenseQuery } from '@tanstack/react-query'
import { useState } from 'react'
import { ROLES, canInShoot } from '#shared/access/roles.ts'
import type { People } from '#shared/api/people.ts'
import { count } from '#src/lib/format.ts'
import { ROLE_LINES, roleName } from '#src/lib/role-words.ts'
import { useRole, useShoot } from '#src/realtime/shoot-realtime.tsx'
import { Button } from '#src/ui/button.tsx'
import { Confirm } from '#src/ui/confirm.tsx'
import { ScreenBar } from '#src/ui/screen-bar.tsx'
import { useChangePeople, useLeaveShoot } from '../mutations.ts'
import { peopleQueries } from '../queries.ts'
import { InviteDialog } from './invite-dialog.tsx'
import { OpenInvitations } from './open-invitations.tsx'
import { PersonRow } from './person-row.tsx'

type Person = People['people'][number]

export type PeopleScreenProps = { onLeft: () => void }

/** Who is in the shoot as what, who is asked to come, and the door. */
export function PeopleScreen({ onLeft }: PeopleScreenProps) {
  const shoot = useShoot()
  const role = useRole()
  const { data } = useSuspenseQuery(peopleQueries.ofShoot(shoot.id))
  const change = useChangePeople(shoot.id)
  const you = data.people.find((person) => person.you)
  const leave = useLeaveShoot(shoot.id, you?.userId ?? '')
  const [isInviting, setIsInviting] = useState(false)
  const [isLeaving, setIsLeaving] = useState(false)
  const [removing, setRemoving] = useState<Person | null>(null)
  const mayChange = canInShoot(role, 'people.write')
  return (
    <>
      <ScreenBar
        title="People"
        sub={`${count(data.people.length, 'person', 'people')} in this shoot`}
        actions={
          mayChange ? [{ label: 'Invite by letter', variant: 'primary', onPress: () => setIsInviting(true) }] : []
        }
      />
      <div className="grid max-w-6xl items-start gap-5 px-4 pt-4 pb-10 md:px-6 md:pt-1 xl:grid-cols-[minmax(0,1fr)_19rem]">
        <div className="flex flex-col gap-5">
          <ul className="divide-y divide-hair-soft rounded-r border border-hair bg-paper">
            {data.people.map((person) => (
              <PersonRow
                key={person.userId}
                person={person}
                mayChange={mayChange}
                onRole={(next) => change.mutate({ kind: 'role', userId: person.userId, role: next })}
                onRemove={() => setRemoving(person)}
              />
            ))}
          </ul>
          {mayChange && data.invitations.length > 0 && (
            <OpenInvitations invitations={data.invitations} change={change} />
          )}
        </div>
        <aside className="rounded-r border border-hair bg-paper px-4 py-3.5">
          <h2 className="text-lg">What a role may do</h2>
          <dl className="mt-1 text-sm">
            {ROLES.map((value) => (
              <div key={value} className="border-t border-hair-soft py-2 first:border-0">
                <dt className="font-semibold">{roleName(value)}</dt>
                <dd className="text-ink-soft">{ROLE_LINES[value]}</dd>
              </div>
            ))}
          </dl>
          {you && (
            <Button variant="quiet" className="mt-1 -ml-3.5" onClick={() => setIsLeaving(true)}>
              Leave this shoot
            </Button>
          )}
        </aside>
      </div>
      <InviteDialog open={isInviting} onOpenChange={setIsInviting} change={change} />
      <Confirm
        open={removing !== null}
        onOpenChange={(open) => !open && setRemoving(null)}
        title={`Remove ${removing?.name ?? ''} from the shoot?`}
        action="Remove"
        keep="Keep them"
        onConfirm={() => {
          if (removing) change.mutate({ kind: 'remove', userId: removing.userId })
          setRemoving(null)
        }}
      >
        The shoot closes for them at once, on every device. What they made and signed stays.
      </Confirm>
      <Confirm
        open={isLeaving}
        onOpenChange={setIsLeaving}
        title="Leave this shoot?"
        action="Leave"
        keep="Stay"
        busy={leave.isPending}
        onConfirm={() => leave.mutate(undefined, { onSuccess: onLeft, onSettled: () => setIsLeaving(false) })}
      >
        You cannot open it any more; what you made stays. A photographer can invite you again.
      </Confirm>
    </>
  )
}
