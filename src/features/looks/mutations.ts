import { useMutation, useQueryClient } from '@tanstack/react-query'
import type { z } from 'zod'
import {
  type pieceCostInputSchema,
  pieceCostsSchema,
  type sitterPrivateInputSchema,
  sitterPrivatesSchema,
} from '#shared/api/private.ts'
import { api } from '#src/lib/api.ts'
import { lookQueries } from './queries.ts'

type CostInput = z.input<typeof pieceCostInputSchema> & { pieceId: string }
type SizesInput = z.input<typeof sitterPrivateInputSchema> & { sitterId: string }

/** Keeps cost, deposit and size of a piece; the whole list comes back. */
export function useSavePieceCost(shootId: string) {
  const queryClient = useQueryClient()
  return useMutation({
    mutationFn: ({ pieceId, ...body }: CostInput) =>
      api(`/shoots/${shootId}/piece-costs/${pieceId}`, { method: 'PUT', body, response: pieceCostsSchema }),
    onSuccess: (costs) => queryClient.setQueryData(lookQueries.costs(shootId).queryKey, costs),
  })
}

/** Keeps sizes and contact of a sitter; the whole list comes back. */
export function useSaveSizes(shootId: string) {
  const queryClient = useQueryClient()
  return useMutation({
    mutationFn: ({ sitterId, ...body }: SizesInput) =>
      api(`/shoots/${shootId}/sizes/${sitterId}`, { method: 'PUT', body, response: sitterPrivatesSchema }),
    onSuccess: (sizes) => queryClient.setQueryData(lookQueries.sizes(shootId).queryKey, sizes),
  })
}
