import { useMutation, useQueryClient } from '@tanstack/react-query'
import { z } from 'zod'
import type { StudioRole } from '#shared/access/roles.ts'
import { minutesResponseSchema } from '#shared/api/shoots.ts'
import { type StudioPeople, studioPeopleSchema, studioSchema } from '#shared/api/studios.ts'
import type { Minutes } from '#shared/domain/plan/minutes.ts'
import { api } from '#src/lib/api.ts'
import { studioQueries } from './queries.ts'

/** Names a studio that did not exist before; the session lists it afterwards. */
export function useCreateStudio() {
  const queryClient = useQueryClient()
  return useMutation({
    mutationFn: (name: string) => api('/studios', { method: 'POST', body: { name }, response: studioSchema }),
    meta: { shown: true },
    onSuccess: () => queryClient.invalidateQueries({ queryKey: studioQueries.session().queryKey }),
  })
}

export function useRenameStudio(studioId: string) {
  const queryClient = useQueryClient()
  return useMutation({
    mutationFn: (name: string) =>
      api(`/studios/${studioId}`, { method: 'PATCH', body: { name }, response: studioSchema }),
    onSuccess: () => queryClient.invalidateQueries({ queryKey: studioQueries.session().queryKey }),
  })
}

export type PeopleChange =
  | { kind: 'invite'; email: string; role: StudioRole }
  | { kind: 'withdraw'; invitationId: string }
  | { kind: 'role'; userId: string; role: StudioRole }
  | { kind: 'remove'; userId: string }

async function sendPeople(studioId: string, change: PeopleChange): Promise<StudioPeople> {
  const at = `/studios/${studioId}`
  const response = studioPeopleSchema
  switch (change.kind) {
    case 'invite':
      return api(`${at}/invitations`, { method: 'POST', body: { email: change.email, role: change.role }, response })
    case 'withdraw':
      return api(`${at}/invitations/${change.invitationId}`, { method: 'DELETE', response })
    case 'role':
      return api(`${at}/people/${encodeURIComponent(change.userId)}`, {
        method: 'PATCH',
        body: { role: change.role },
        response,
      })
    case 'remove':
      await api(`${at}/people/${encodeURIComponent(change.userId)}`, { method: 'DELETE', response: z.unknown() })
      return api(`${at}/people`, { response })
  }
}

/** Changes who belongs to a studio; the answer is the whole list. */
export function useChangeStudioPeople(studioId: string) {
  const queryClient = useQueryClient()
  return useMutation({
    mutationFn: (change: PeopleChange) => sendPeople(studioId, change),
    onSuccess: (people) => queryClient.setQueryData(studioQueries.people(studioId).queryKey, people),
  })
}

/** Sets the studio's own minutes; open shoots work with them from now on. */
export function useSetMinutes(studioId: string) {
  const queryClient = useQueryClient()
  return useMutation({
    mutationFn: (minutes: Minutes) =>
      api(`/studios/${studioId}/minutes`, { method: 'PUT', body: { minutes }, response: minutesResponseSchema }),
    scope: { id: `minutes:${studioId}` },
    onMutate: (minutes) => queryClient.setQueryData(studioQueries.minutes(studioId).queryKey, { minutes }),
    onError: () => queryClient.invalidateQueries({ queryKey: studioQueries.minutes(studioId).queryKey }),
    onSuccess: (answer) => queryClient.setQueryData(studioQueries.minutes(studioId).queryKey, answer),
  })
}
