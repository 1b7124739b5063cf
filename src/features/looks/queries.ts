import { queryOptions } from '@tanstack/react-query'
import { pieceCostsSchema, sitterPrivatesSchema } from '#shared/api/private.ts'
import { api } from '#src/lib/api.ts'

/** What only photographer and stylist may read; in no document. */
export const lookQueries = {
  costs: (shootId: string) =>
    queryOptions({
      queryKey: ['shoots', shootId, 'piece-costs'],
      queryFn: ({ signal }) => api(`/shoots/${shootId}/piece-costs`, { response: pieceCostsSchema, signal }),
    }),
  sizes: (shootId: string) =>
    queryOptions({
      queryKey: ['shoots', shootId, 'sizes'],
      queryFn: ({ signal }) => api(`/shoots/${shootId}/sizes`, { response: sitterPrivatesSchema, signal }),
    }),
}
