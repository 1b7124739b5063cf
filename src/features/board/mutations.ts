import { useMutation, useQueryClient } from '@tanstack/react-query'
import { commentsSchema } from '#shared/api/comments.ts'
import { versionsSchema } from '#shared/api/versions.ts'
import { ApiError, api } from '#src/lib/api.ts'
import { type ShootDocuments, useShootContext } from '#src/realtime/shoot-realtime.tsx'
import { untilSaved } from '#src/realtime/until-saved.ts'
import { boardQueries } from './queries.ts'
import { type KeptKind, openVersion, takeBackVersion } from './versions/take-back-version.ts'

/** Adds a comment to a frame; the answer is the shoot's whole list. */
export function useAddComment(shootId: string, frameId: string) {
  const queryClient = useQueryClient()
  return useMutation({
    mutationFn: (text: string) =>
      api(`/shoots/${shootId}/comments`, {
        method: 'POST',
        body: { subject: 'frame', subjectId: frameId, text },
        response: commentsSchema,
      }),
    onSuccess: (comments) => queryClient.setQueryData(boardQueries.comments(shootId).queryKey, comments),
  })
}

/** Removes one's own comment. */
export function useRemoveComment(shootId: string) {
  const queryClient = useQueryClient()
  return useMutation({
    mutationFn: (commentId: string) =>
      api(`/shoots/${shootId}/comments/${commentId}`, { method: 'DELETE', response: commentsSchema }),
    onSuccess: (comments) => queryClient.setQueryData(boardQueries.comments(shootId).queryKey, comments),
  })
}

const notSaved = () =>
  new ApiError(
    'OFFLINE',
    'What you did last is not on the server yet, so nothing was kept or changed. Try again when the sign says Saved.',
  )

/** A version holds what the server has: one's own edits must be there first. @throws ApiError when they are not. */
async function requireSaved({ board, plan }: ShootDocuments): Promise<void> {
  if (!(await untilSaved([board, plan]))) throw notSaved()
}

/** What is written into a document that was closed meanwhile is lost. @throws ApiError when one was. */
function requireOpen({ board, plan }: ShootDocuments): void {
  if (board.doc.isDestroyed || plan.doc.isDestroyed)
    throw new ApiError('CONFLICT', 'You left the shoot meanwhile. Nothing was changed.')
}

export type VersionChange =
  { kind: 'keep'; name: string } | { kind: 'rename'; id: string; name: string } | { kind: 'remove'; id: string }

/** Keeps, renames or removes a version; the answer is the shoot's whole list. */
export function useChangeVersions() {
  const queryClient = useQueryClient()
  const { shoot, documents } = useShootContext()
  const path = `/shoots/${shoot.id}/versions`
  return useMutation({
    meta: { shown: true },
    mutationFn: async (change: VersionChange) => {
      if (change.kind === 'remove') return api(`${path}/${change.id}`, { method: 'DELETE', response: versionsSchema })
      const body = { name: change.name }
      if (change.kind === 'rename')
        return api(`${path}/${change.id}`, { method: 'PATCH', body, response: versionsSchema })
      await requireSaved(documents)
      return api(path, { method: 'POST', body, response: versionsSchema })
    },
    onSuccess: (versions) => queryClient.setQueryData(boardQueries.versions(shoot.id).queryKey, versions),
  })
}

/** Takes a version back, after what is there now has been kept for everybody else. */
export function useTakeBack() {
  const queryClient = useQueryClient()
  const { shoot, documents } = useShootContext()
  return useMutation({
    meta: { shown: true },
    mutationFn: async ({ id, kinds }: { id: string; kinds: readonly KeptKind[] }) => {
      const states = await queryClient.fetchQuery(boardQueries.version(shoot.id, id))
      await requireSaved(documents)
      // Before the others are told that it happens, and again before it does.
      requireOpen(documents)
      const versions = await api(`/shoots/${shoot.id}/versions/${id}/take-back`, {
        method: 'POST',
        response: versionsSchema,
      })
      requireOpen(documents)
      const written = takeBackVersion(documents, openVersion(states, documents), kinds, Date.now())
      return { versions, written }
    },
    onSuccess: ({ versions }) => queryClient.setQueryData(boardQueries.versions(shoot.id).queryKey, versions),
  })
}
