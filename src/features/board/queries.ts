import { queryOptions } from '@tanstack/react-query'
import { commentsSchema } from '#shared/api/comments.ts'
import { versionStatesSchema, versionsSchema } from '#shared/api/versions.ts'
import { type Session, sessionSchema } from '#shared/api/studios.ts'
import { ApiError, api } from '#src/lib/api.ts'

async function fetchSession(signal: AbortSignal): Promise<Session | null> {
  try {
    return await api('/session', { response: sessionSchema, signal })
  } catch (error) {
    if (error instanceof ApiError && error.code === 'SIGNED_OUT') return null
    throw error
  }
}

export const boardQueries = {
  /** The cache's own entry of who is signed in: for the initials on what one hangs. */
  session: () =>
    queryOptions({ queryKey: ['session'], queryFn: ({ signal }) => fetchSession(signal), staleTime: 60_000 }),
  comments: (shootId: string) =>
    queryOptions({
      queryKey: ['shoots', shootId, 'comments'],
      queryFn: ({ signal }) => api(`/shoots/${shootId}/comments`, { response: commentsSchema, signal }),
    }),
  versions: (shootId: string) =>
    queryOptions({
      queryKey: ['shoots', shootId, 'versions'],
      queryFn: ({ signal }) => api(`/shoots/${shootId}/versions`, { response: versionsSchema, signal }),
    }),
  /** What a version kept never changes: under a key of its own, so that news of the shoot do not fetch it again. */
  version: (shootId: string, versionId: string) =>
    queryOptions({
      queryKey: ['kept-version', shootId, versionId],
      queryFn: ({ signal }) =>
        api(`/shoots/${shootId}/versions/${versionId}`, { response: versionStatesSchema, signal }),
      staleTime: Infinity,
    }),
}
