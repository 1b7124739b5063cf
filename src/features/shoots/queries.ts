import { queryOptions } from '@tanstack/react-query'
import { shootCardsSchema, shootSchema } from '#shared/api/shoots.ts'
import { api } from '#src/lib/api.ts'

export const shootQueries = {
  list: () =>
    queryOptions({
      queryKey: ['shoots'],
      queryFn: ({ signal }) => api('/shoots', { response: shootCardsSchema, signal }),
    }),
  detail: (shootId: string) =>
    queryOptions({
      queryKey: ['shoots', shootId],
      queryFn: ({ signal }) => api(`/shoots/${shootId}`, { response: shootSchema, signal }),
      staleTime: 30_000,
    }),
}
