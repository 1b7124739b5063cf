import type { People } from '#shared/api/people.ts'
import { shortInstant } from '#src/lib/format.ts'
import { roleName } from '#src/lib/role-words.ts'
import { Button } from '#src/ui/button.tsx'
import { toast } from '#src/ui/toast.ts'
import type { useChangePeople } from '../mutations.ts'

export type OpenInvitationsProps = { invitations: People['invitations']; change: ReturnType<typeof useChangePeople> }

export function OpenInvitations({ invitations, change }: OpenInvitationsProps) {
  return (
    <section>
      <h2 className="mb-2 text-lg">Invited, not here yet</h2>
      <ul className="divide-y divide-hair-soft rounded-r border border-hair bg-paper">
        {invitations.map((invitation) => (
          <li key={invitation.id} className="flex flex-wrap items-center gap-x-4 gap-y-1 px-4 py-2.5">
            <div className="min-w-44 flex-1">
              <b className="font-semibold">{invitation.name || invitation.email}</b>
              <div className="text-xs text-ink-soft">
                {invitation.name && <span className="break-all">{invitation.email} · </span>}
                {roleName(invitation.role)} · sent {shortInstant(invitation.sentAtMs)} ·{' '}
                {invitation.expired ? (
                  <span className="font-semibold text-glow-ink">has run out</span>
                ) : (
                  `works until ${shortInstant(invitation.expiresAtMs)}`
                )}
              </div>
            </div>
            <Button
              aria-label={`Send the letter to ${invitation.email} again`}
              onClick={() =>
                change.mutate(
                  { kind: 'resend', invitationId: invitation.id },
                  {
                    onSuccess: () =>
                      toast.say(
                        `A new letter is on its way to ${invitation.email}; the link in the old one is closed.`,
                      ),
                  },
                )
              }
            >
              Send again
            </Button>
            <Button
              variant="quiet"
              aria-label={`Withdraw the invitation of ${invitation.email}`}
              onClick={() => change.mutate({ kind: 'withdraw', invitationId: invitation.id })}
            >
              Withdraw
            </Button>
          </li>
        ))}
      </ul>
    </section>
  )
}
