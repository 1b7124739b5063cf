import { queryOptions } from '@tanstack/react-query'
import { api } from '#src/lib/api.ts'
import { kitListSchema } from '#shared/api/kit.ts'

export const lightingQueries = {
  /** The studio's kit as this shoot may read it. */
  kit: (shootId: string) =>
    queryOptions({
      queryKey: ['shoots', shootId, 'kit'],
      queryFn: ({ signal }) => api(`/shoots/${shootId}/kit`, { response: kitListSchema, signal }),
    }),
}
