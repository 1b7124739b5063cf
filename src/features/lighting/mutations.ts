import { useMutation, useQueryClient } from '@tanstack/react-query'
import { type Paper, recipesSchema } from '#shared/api/recipes.ts'
import { recipeFileName } from '#shared/domain/recipes/recipe.ts'
import type { Recipe } from '#shared/domain/recipes/schema.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import type { LengthUnit } from '#shared/units/length.ts'
import { api, apiFile } from '#src/lib/api.ts'
import { saveFile } from '#src/lib/save-file.ts'
import { useShoot } from '#src/realtime/shoot-realtime.tsx'
import { type SheetPicture, lightingQueries } from './queries.ts'

/** Keeps a recipe in the studio of this shoot; the answer is the whole list. */
export function useKeepRecipe() {
  const { id, studioId } = useShoot()
  const queryClient = useQueryClient()
  return useMutation({
    mutationFn: (recipe: Recipe) =>
      api(`/studios/${studioId}/recipes`, { method: 'POST', body: { recipe }, response: recipesSchema }),
    meta: { shown: true },
    onSuccess: (list) => queryClient.setQueryData(lightingQueries.recipes(id).queryKey, list),
  })
}

export type SheetRequest = { whole: WholeSetup; paper: Paper; unit: LengthUnit; pictures: readonly SheetPicture[] }

/** Has the recipe sheet made and hands it to the browser's downloads. It changes nothing. */
export function useRecipeSheet() {
  const { id } = useShoot()
  return useMutation({
    mutationFn: async ({ whole, paper, unit, pictures }: SheetRequest) => {
      const body = new FormData()
      body.set('sheet', JSON.stringify({ paper, unit, captions: pictures.map(({ caption }) => caption.slice(0, 120)) }))
      pictures.forEach(({ blob }, index) => body.append('frames', blob, `frame-${index + 1}`))
      const at = `/shoots/${id}/setups/${whole.setup.id}/recipe-sheet`
      const pdf = await apiFile(at, { method: 'POST', body })
      saveFile(recipeFileName(whole.setup.name).replace(/\.json$/, '.pdf'), pdf)
    },
    meta: { shown: true },
  })
}
