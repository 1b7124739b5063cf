import { queryOptions } from '@tanstack/react-query'
import { api } from '#src/lib/api.ts'
import { kitListSchema } from '#shared/api/kit.ts'
import { recipesSchema } from '#shared/api/recipes.ts'

export const lightingQueries = {
  /** The studio's kit as this shoot may read it. */
  kit: (shootId: string) =>
    queryOptions({
      queryKey: ['shoots', shootId, 'kit'],
      queryFn: ({ signal }) => api(`/shoots/${shootId}/kit`, { response: kitListSchema, signal }),
    }),
  /** The studio's recipes as this shoot may read them. */
  recipes: (shootId: string) =>
    queryOptions({
      queryKey: ['shoots', shootId, 'recipes'],
      queryFn: ({ signal }) => api(`/shoots/${shootId}/recipes`, { response: recipesSchema, signal }),
    }),
  /** What a recipe sheet shows of a setup, computed here when it is asked for, and not kept. */
  sheetPictures: (setupId: string, frames: () => Promise<SheetPicture[]>) =>
    queryOptions({ queryKey: ['sheet-pictures', setupId], queryFn: frames, gcTime: 0, retry: false }),
}

/** A picture of the setup computed from its numbers, as it goes onto paper. */
export type SheetPicture = { caption: string; blob: Blob }
