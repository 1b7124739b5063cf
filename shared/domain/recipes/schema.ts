import { z } from 'zod'
import { lightSchema, propSchema, setupSchema, sitterPlaceSchema } from '#shared/domain/lighting/schema.ts'
import { lineSchema, proseSchema } from '#shared/domain/text.ts'

/**
 * A recipe: a setup with everything in it, written so that somebody else can rebuild it. It names no shoot, sitter or
 * look. Numbers of the kit travel with it; their ids say where they came from and need not be known where it is used.
 */
export const RECIPE_FORMAT = 'sconce recipe'
/** Raised when a recipe written before could not be read any more. What is only added has a default instead. */
export const RECIPE_VERSION = 1

/** A larger file is no recipe: what keeps one in the studio carries no more. */
export const RECIPE_MAX_BYTES = 1024 * 1024
/** No number of a recipe is larger, above or below zero; what nobody could have meant is refused. */
export const RECIPE_MOST_NUMBER = 10_000_000
/** Most parts of a recipe, by kind. */
export const RECIPE_MOST = { lights: 60, places: 40, props: 100 } as const

const own = { id: true, setupId: true } as const

export const recipeSchema = z.object({
  format: z.literal(RECIPE_FORMAT),
  version: z.literal(RECIPE_VERSION),
  name: lineSchema(80),
  note: proseSchema(2000).default(''),
  setup: setupSchema.omit({ id: true, name: true, note: true, rank: true }),
  lights: z.array(lightSchema.omit(own)).max(RECIPE_MOST.lights),
  places: z
    .array(sitterPlaceSchema.omit({ ...own, sitterId: true, lookId: true }))
    .max(RECIPE_MOST.places)
    .default([]),
  props: z.array(propSchema.omit(own)).max(RECIPE_MOST.props).default([]),
})
export type Recipe = z.infer<typeof recipeSchema>
