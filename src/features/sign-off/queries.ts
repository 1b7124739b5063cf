import { queryOptions } from '@tanstack/react-query'
import { signOffsSchema } from '#shared/api/sign-off.ts'
import { api } from '#src/lib/api.ts'

export const signOffQueries = {
  /** Fetched again when somebody answers: the server announces this key. */
  ofShoot: (shootId: string) =>
    queryOptions({
      queryKey: ['shoots', shootId, 'sign-offs'],
      queryFn: ({ signal }) => api(`/shoots/${shootId}/sign-offs`, { response: signOffsSchema, signal }),
    }),
}
