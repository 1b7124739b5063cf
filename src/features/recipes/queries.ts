import { queryOptions } from '@tanstack/react-query'
import { recipesSchema } from '#shared/api/recipes.ts'
import { api } from '#src/lib/api.ts'

export const recipeQueries = {
  ofStudio: (studioId: string) =>
    queryOptions({
      queryKey: ['studios', studioId, 'recipes'],
      queryFn: ({ signal }) => api(`/studios/${studioId}/recipes`, { response: recipesSchema, signal }),
    }),
}
