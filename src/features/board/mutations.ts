import { useMutation, useQueryClient } from '@tanstack/react-query'
import { commentsSchema } from '#shared/api/comments.ts'
import { api } from '#src/lib/api.ts'
import { boardQueries } from './queries.ts'

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
