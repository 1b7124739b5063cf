import { useMutation, useQueryClient } from '@tanstack/react-query'
import { z } from 'zod'
import { type ShootView, briefResponseSchema, type createShootSchema, createdShootSchema } from '#shared/api/shoots.ts'
import type { DeliverableInput, Location, RoomInput } from '#shared/domain/shoots/schema.ts'
import { api } from '#src/lib/api.ts'
import { shootQueries } from './queries.ts'

/** Starts a shoot; the list of shoots is fetched again. */
export function useCreateShoot() {
  const queryClient = useQueryClient()
  return useMutation({
    mutationFn: (body: z.input<typeof createShootSchema>) =>
      api('/shoots', { method: 'POST', body, response: createdShootSchema }),
    meta: { shown: true },
    onSuccess: () => queryClient.invalidateQueries({ queryKey: shootQueries.list().queryKey, exact: true }),
  })
}

export type BriefChange =
  | { kind: 'brief'; patch: Readonly<Record<string, unknown>> }
  | { kind: 'location'; location: Location }
  | { kind: 'room'; id: string | null; room: RoomInput }
  | { kind: 'no-room'; id: string }
  | { kind: 'deliverable'; id: string | null; deliverable: DeliverableInput }
  | { kind: 'no-deliverable'; id: string }

function send(shootId: string, change: BriefChange) {
  const at = `/shoots/${shootId}`
  switch (change.kind) {
    case 'brief':
      return api(`${at}/brief`, { method: 'PATCH', body: change.patch, response: briefResponseSchema })
    case 'location':
      return api(`${at}/location`, { method: 'PUT', body: change.location, response: briefResponseSchema })
    case 'room':
      return change.id === null
        ? api(`${at}/rooms`, { method: 'POST', body: change.room, response: briefResponseSchema })
        : api(`${at}/rooms/${change.id}`, { method: 'PUT', body: change.room, response: briefResponseSchema })
    case 'no-room':
      return api(`${at}/rooms/${change.id}`, { method: 'DELETE', response: briefResponseSchema })
    case 'deliverable':
      return change.id === null
        ? api(`${at}/deliverables`, { method: 'POST', body: change.deliverable, response: briefResponseSchema })
        : api(`${at}/deliverables/${change.id}`, {
            method: 'PUT',
            body: change.deliverable,
            response: briefResponseSchema,
          })
    case 'no-deliverable':
      return api(`${at}/deliverables/${change.id}`, { method: 'DELETE', response: briefResponseSchema })
  }
}

/** Changes the brief; the answer is the whole brief and takes the old one's place everywhere. */
export function useChangeBrief(shootId: string) {
  const queryClient = useQueryClient()
  return useMutation({
    mutationFn: (change: BriefChange) => send(shootId, change),
    meta: { shown: true },
    // One after the other: an older answer must not take the place of a newer one.
    scope: { id: `brief:${shootId}` },
    onSuccess: ({ brief }) => {
      queryClient.setQueryData(
        shootQueries.detail(shootId).queryKey,
        (shoot: ShootView | undefined) => shoot && { ...shoot, brief },
      )
      void queryClient.invalidateQueries({ queryKey: shootQueries.list().queryKey, exact: true })
    },
  })
}

/** Removes the shoot for everybody, for good. */
export function useRemoveShoot(shootId: string) {
  return useMutation({ mutationFn: () => api(`/shoots/${shootId}`, { method: 'DELETE', response: z.unknown() }) })
}
