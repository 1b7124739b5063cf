import { queryOptions } from '@tanstack/react-query'
import { invitationPageSchema, peopleSchema } from '#shared/api/people.ts'
import { api } from '#src/lib/api.ts'

export const peopleQueries = {
  ofShoot: (shootId: string) =>
    queryOptions({
      queryKey: ['shoots', shootId, 'people'],
      queryFn: ({ signal }) => api(`/shoots/${shootId}/people`, { response: peopleSchema, signal }),
    }),
  invitation: (token: string) =>
    queryOptions({
      queryKey: ['invitations', token],
      queryFn: ({ signal }) =>
        api(`/invitations/${encodeURIComponent(token)}`, { response: invitationPageSchema, signal }),
      retry: false,
    }),
}
