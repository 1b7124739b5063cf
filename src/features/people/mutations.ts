import { useMutation, useQueryClient } from '@tanstack/react-query'
import { z } from 'zod'
import type { Role } from '#shared/access/roles.ts'
import { type People, peopleSchema } from '#shared/api/people.ts'
import { api } from '#src/lib/api.ts'
import { peopleQueries } from './queries.ts'

export type PeopleChange =
  | { kind: 'invite'; email: string; name: string; role: Role }
  | { kind: 'resend'; invitationId: string }
  | { kind: 'withdraw'; invitationId: string }
  | { kind: 'role'; userId: string; role: Role }
  | { kind: 'remove'; userId: string }

function removeFrom(shootId: string, userId: string): Promise<unknown> {
  return api(`/shoots/${shootId}/people/${encodeURIComponent(userId)}`, { method: 'DELETE', response: z.unknown() })
}

async function send(shootId: string, change: PeopleChange): Promise<People> {
  const at = `/shoots/${shootId}`
  const response = peopleSchema
  switch (change.kind) {
    case 'invite':
      return api(`${at}/invitations`, {
        method: 'POST',
        body: { email: change.email, name: change.name, role: change.role },
        response,
      })
    case 'resend':
      return api(`${at}/invitations/${change.invitationId}/resend`, { method: 'POST', body: {}, response })
    case 'withdraw':
      return api(`${at}/invitations/${change.invitationId}`, { method: 'DELETE', response })
    case 'role':
      return api(`${at}/people/${encodeURIComponent(change.userId)}`, {
        method: 'PATCH',
        body: { role: change.role },
        response,
      })
    case 'remove':
      await removeFrom(shootId, change.userId)
      return api(`${at}/people`, { response })
  }
}

/** Changes who is in a shoot; the answer is the whole list. */
export function useChangePeople(shootId: string) {
  const queryClient = useQueryClient()
  return useMutation({
    mutationFn: (change: PeopleChange) => send(shootId, change),
    onSuccess: (people) => queryClient.setQueryData(peopleQueries.ofShoot(shootId).queryKey, people),
  })
}

/** Leaves a shoot: afterwards it does not exist for this person. */
export function useLeaveShoot(shootId: string, userId: string) {
  return useMutation({ mutationFn: () => removeFrom(shootId, userId) })
}
