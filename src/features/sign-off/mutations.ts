import { useMutation, useQueryClient } from '@tanstack/react-query'
import { type SignOffInput, type SignOffs, signedOffSchema } from '#shared/api/sign-off.ts'
import { api } from '#src/lib/api.ts'
import { signOffQueries } from './queries.ts'

type Answer = SignOffInput & { lookId: string }

/** Answers a look. What was kept joins the history at once; a conflict fetches the looks as they stand now. */
export function useAnswerLook(shootId: string) {
  const queryClient = useQueryClient()
  const { queryKey } = signOffQueries.ofShoot(shootId)
  return useMutation({
    // The screen shows a refusal beside the buttons.
    meta: { shown: true },
    mutationFn: ({ lookId, ...body }: Answer) =>
      api(`/shoots/${shootId}/looks/${lookId}/sign-offs`, { method: 'POST', body, response: signedOffSchema }),
    onSuccess: ({ signOff }) => {
      queryClient.setQueryData<SignOffs>(
        queryKey,
        (known) => known && { ...known, signOffs: [signOff, ...known.signOffs.filter(({ id }) => id !== signOff.id)] },
      )
    },
    onSettled: () => queryClient.invalidateQueries({ queryKey }),
  })
}
