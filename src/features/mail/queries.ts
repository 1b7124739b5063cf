import { queryOptions } from '@tanstack/react-query'
import { lettersSchema } from '#shared/api/mail.ts'
import { api } from '#src/lib/api.ts'

export const mailQueries = {
  letters: () =>
    queryOptions({
      queryKey: ['letters'],
      queryFn: ({ signal }) => api('/letters', { response: lettersSchema, signal }),
      refetchInterval: 4000,
    }),
}
