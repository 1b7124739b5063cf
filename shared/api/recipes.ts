import { z } from 'zod'
import { recipeIdSchema } from '#shared/ids.ts'
import { lineSchema } from '#shared/domain/text.ts'
import { LENGTH_UNITS } from '#shared/units/length.ts'
import { recipeSchema } from '#shared/domain/recipes/schema.ts'

/** Recipes a studio may keep. */
export const MOST_RECIPES = 200
/** Most bytes all of them may have as JSON: every list of them carries all. */
export const RECIPES_MAX_BYTES = 8 * 1024 * 1024

export const recipeNameSchema = lineSchema(80)

/**
 * GET /api/studios/:studioId/recipes and, read through a shoot, GET /api/shoots/:shootId/recipes → all, by name.
 * POST …/recipes { recipe } keeps one (what it holds is checked by the verb, which says what is wrong in a sentence);
 * PATCH { name } and DELETE …/recipes/:recipeId. Each answers with the whole list.
 */
export const keepRecipeSchema = z.object({ recipe: z.unknown() })
export const renameRecipeSchema = z.object({ name: recipeNameSchema })

export const keptRecipeSchema = z.object({
  id: recipeIdSchema,
  name: z.string(),
  /** Who kept it; null when they are gone. */
  by: z.string().nullable(),
  atMs: z.number(),
  /** Null where what is kept cannot be read; `problem` says why. */
  recipe: recipeSchema.nullable(),
  problem: z.string().nullable(),
})
export type KeptRecipe = z.infer<typeof keptRecipeSchema>

export const recipesSchema = z.object({ recipes: z.array(keptRecipeSchema) })
export type Recipes = z.infer<typeof recipesSchema>

export const PAPERS = ['A4', 'Letter'] as const
export type Paper = (typeof PAPERS)[number]

/** Pictures a recipe sheet may carry, and the most bytes of one. */
export const MOST_SHEET_FRAMES = 8
export const SHEET_FRAME_MAX_BYTES = 6 * 1024 * 1024

/**
 * POST /api/shoots/:shootId/setups/:setupId/recipe-sheet, multipart: `sheet` is this as JSON, `frames` are pictures
 * (JPEG, PNG, WebP) in the order of their captions. The answer is application/pdf.
 */
export const recipeSheetSchema = z.object({
  paper: z.enum(PAPERS),
  unit: z.enum(LENGTH_UNITS),
  captions: z.array(z.string().max(120)).max(MOST_SHEET_FRAMES).default([]),
})
export type RecipeSheetInput = z.infer<typeof recipeSheetSchema>
