import { useMutation, useQueryClient } from '@tanstack/react-query'
import { type KeptRecipe, recipesSchema } from '#shared/api/recipes.ts'
import type { Recipe } from '#shared/domain/recipes/schema.ts'
import { api } from '#src/lib/api.ts'
import { recipeQueries } from './queries.ts'

export type RecipeChange =
  | { kind: 'keep'; recipe: Recipe }
  | { kind: 'rename'; kept: KeptRecipe; name: string }
  | { kind: 'remove'; kept: KeptRecipe }

function send(studioId: string, change: RecipeChange) {
  const at = `/studios/${studioId}/recipes`
  const response = recipesSchema
  switch (change.kind) {
    case 'keep':
      return api(at, { method: 'POST', body: { recipe: change.recipe }, response })
    case 'rename':
      return api(`${at}/${change.kept.id}`, { method: 'PATCH', body: { name: change.name }, response })
    case 'remove':
      return api(`${at}/${change.kept.id}`, { method: 'DELETE', response })
  }
}

/** Changes the studio's recipes; the answer is the whole list. */
export function useChangeRecipes(studioId: string) {
  const queryClient = useQueryClient()
  return useMutation({
    mutationFn: (change: RecipeChange) => send(studioId, change),
    meta: { shown: true },
    onSuccess: (list) => queryClient.setQueryData(recipeQueries.ofStudio(studioId).queryKey, list),
    onError: () => queryClient.invalidateQueries({ queryKey: recipeQueries.ofStudio(studioId).queryKey }),
  })
}
