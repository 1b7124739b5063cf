import { queryOptions } from '@tanstack/react-query'
import { minutesResponseSchema } from '#shared/api/shoots.ts'
import { type Session, sessionSchema, studioPeopleSchema } from '#shared/api/studios.ts'
import { ApiError, api } from '#src/lib/api.ts'

/** Null when signed out. */
async function fetchSession(signal: AbortSignal): Promise<Session | null> {
  try {
    return await api('/session', { response: sessionSchema, signal })
  } catch (error) {
    if (error instanceof ApiError && error.code === 'SIGNED_OUT') return null
    throw error
  }
}

export const studioQueries = {
  session: () =>
    queryOptions({ queryKey: ['session'], queryFn: ({ signal }) => fetchSession(signal), staleTime: 60_000 }),
  people: (studioId: string) =>
    queryOptions({
      queryKey: ['studios', studioId, 'people'],
      queryFn: ({ signal }) => api(`/studios/${studioId}/people`, { response: studioPeopleSchema, signal }),
    }),
  minutes: (studioId: string) =>
    queryOptions({
      queryKey: ['studios', studioId, 'minutes'],
      queryFn: ({ signal }) => api(`/studios/${studioId}/minutes`, { response: minutesResponseSchema, signal }),
    }),
}
