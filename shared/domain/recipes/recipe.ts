import { lightIdSchema, placeIdSchema, propIdSchema, setupIdSchema } from '#shared/ids.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { RECIPE_FORMAT, RECIPE_VERSION, type Recipe } from './schema.ts'

/**
 * The recipe of a setup. It has all of it but ids of setup, sitters and looks and its place among the setups; a setup
 * with more parts than a recipe may have makes one that `readRecipe` refuses.
 */
export function toRecipe(whole: WholeSetup): Recipe {
  const { id: _id, name, note, rank: _rank, ...setup } = whole.setup
  return {
    format: RECIPE_FORMAT,
    version: RECIPE_VERSION,
    name,
    note,
    setup,
    lights: whole.lights.map(({ id: _light, setupId: _of, ...light }) => light),
    places: whole.places.map(({ id: _place, setupId: _of, sitterId: _who, lookId: _what, ...place }) => place),
    props: whole.props.map(({ id: _prop, setupId: _of, ...prop }) => prop),
  }
}

/** What a setup gets where a recipe is used. */
export type RecipeUse = {
  /** A new version 4 UUID at every call. */
  newId: () => string
  /** Fractional key among the setups of the shoot. */
  rank?: string
  /** Name in the shoot; the recipe's own when missing. */
  name?: string
}

/**
 * A new setup by a recipe: equal to the one the recipe was made of, but for ids, sitters and looks (none) and its place
 * among the setups. Parts keep their order: where it follows ids, the new ones are handed out in theirs.
 */
export function fromRecipe(recipe: Recipe, { newId, rank = 'a0', name = recipe.name }: RecipeUse): WholeSetup {
  const setupId = setupIdSchema.parse(newId())
  const ids = (parts: readonly unknown[]) => parts.map(() => newId().toLowerCase()).sort()
  const lightIds = ids(recipe.lights)
  const placeIds = ids(recipe.places)
  const propIds = ids(recipe.props)
  return {
    setup: { ...recipe.setup, id: setupId, name, note: recipe.note, rank },
    lights: recipe.lights.map((light, index) => ({ ...light, id: lightIdSchema.parse(lightIds[index]), setupId })),
    places: recipe.places.map((place, index) => ({
      ...place,
      id: placeIdSchema.parse(placeIds[index]),
      setupId,
      sitterId: null,
      lookId: null,
    })),
    props: recipe.props.map((prop, index) => ({ ...prop, id: propIdSchema.parse(propIds[index]), setupId })),
  }
}

/** A recipe as the text of a file, to be read by `readRecipe`, and by people. */
export function recipeText(recipe: Recipe): string {
  return `${JSON.stringify(recipe, null, 2)}\n`
}

/** Name of the file a recipe is saved as. */
export function recipeFileName(name: string): string {
  return `${name.trim() || 'Setup'}.recipe.json`
}
