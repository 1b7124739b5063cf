import { queryOptions } from '@tanstack/react-query'
import { kitListSchema } from '#shared/api/kit.ts'
import { api } from '#src/lib/api.ts'

export const kitQueries = {
  ofStudio: (studioId: string) =>
    queryOptions({
      queryKey: ['studios', studioId, 'kit'],
      queryFn: ({ signal }) => api(`/studios/${studioId}/kit`, { response: kitListSchema, signal }),
    }),
}
