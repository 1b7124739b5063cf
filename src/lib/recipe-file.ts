import { type RecipeRead, readRecipe, recipeTooLarge } from '#shared/domain/recipes/read-recipe.ts'
import { recipeFileName, recipeText } from '#shared/domain/recipes/recipe.ts'
import type { Recipe } from '#shared/domain/recipes/schema.ts'
import { saveFile } from './save-file.ts'

/** Reads a recipe from a file somebody chose; one that is too large is not opened. */
export async function readRecipeFile(file: File): Promise<RecipeRead> {
  const tooLarge = recipeTooLarge(file.size)
  if (tooLarge !== null) return { recipe: null, problem: tooLarge }
  try {
    return readRecipe(await file.text())
  } catch {
    return { recipe: null, problem: 'This file cannot be opened. Nothing was changed; choose it again.' }
  }
}

/** Hands a recipe to the browser's downloads, as JSON. */
export function saveRecipe(recipe: Recipe): void {
  saveFile(recipeFileName(recipe.name), recipeText(recipe))
}

/** "4 lights: main, fill, rim". */
export function recipeLights({ lights }: Recipe): string {
  const number = `${lights.length} ${lights.length === 1 ? 'light' : 'lights'}`
  const purposes = [...new Set(lights.map((light) => light.purpose))]
  return purposes.length === 0 ? number : `${number}: ${purposes.join(', ')}`
}
