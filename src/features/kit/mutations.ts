import { useMutation, useQueryClient } from '@tanstack/react-query'
import { type KitImportRow, type KitItem, kitListSchema } from '#shared/api/kit.ts'
import type { KitInput } from '#shared/domain/kit/schema.ts'
import { api } from '#src/lib/api.ts'
import { kitQueries } from './queries.ts'

export type KitChange =
  | { kind: 'add'; input: KitInput }
  | { kind: 'update'; item: KitItem; input: KitInput }
  | { kind: 'remove'; item: KitItem }
  | { kind: 'import'; rows: readonly KitImportRow[] }

function send(studioId: string, change: KitChange) {
  const at = `/studios/${studioId}/kit`
  const response = kitListSchema
  switch (change.kind) {
    case 'add':
      return api(at, { method: 'POST', body: change.input, response })
    case 'update':
      return api(`${at}/${change.item.id}`, {
        method: 'PUT',
        body: { ...change.input, version: change.item.version },
        response,
      })
    case 'remove':
      return api(`${at}/${change.item.id}`, { method: 'DELETE', response })
    case 'import':
      return api(`${at}/import`, { method: 'POST', body: { rows: change.rows }, response })
  }
}

/** Changes the kit room; the answer is the whole list. After a conflict the list is fetched again. */
export function useChangeKit(studioId: string) {
  const queryClient = useQueryClient()
  return useMutation({
    mutationFn: (change: KitChange) => send(studioId, change),
    meta: { shown: true },
    onSuccess: (list) => queryClient.setQueryData(kitQueries.ofStudio(studioId).queryKey, list),
    onError: () => queryClient.invalidateQueries({ queryKey: kitQueries.ofStudio(studioId).queryKey }),
  })
}
