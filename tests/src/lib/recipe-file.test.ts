import { describe, expect, it } from 'vitest'
import { recipeText, toRecipe } from '#shared/domain/recipes/recipe.ts'
import { readRecipeFile, recipeLights } from '#src/lib/recipe-file.ts'
import { light, whole } from '#tests/support/lighting-sample.ts'

const at = { at: [1, 2, 1] as [number, number, number], aim: [0, 1.5, 0] as [number, number, number] }
const recipe = toRecipe(
  whole({
    lights: [
      light(1, { purpose: 'main', ...at }),
      light(2, { purpose: 'rim', ...at }),
      light(3, { purpose: 'rim', ...at }),
    ],
  }),
)

describe('readRecipeFile', () => {
  it('reads what was saved', async () => {
    const file = new File([recipeText(recipe)], 'Sample.recipe.json')
    expect(await readRecipeFile(file)).toEqual({ recipe, problem: null })
  })

  it('does not open what is too large, and says when a file cannot be opened', async () => {
    const unread = { size: 3 * 1024 * 1024, text: () => Promise.reject(new Error('not to be read')) } as unknown as File
    expect((await readRecipeFile(unread)).problem).toContain('too large')
    const gone = { size: 10, text: () => Promise.reject(new Error('gone')) } as unknown as File
    expect((await readRecipeFile(gone)).problem).toContain('cannot be opened')
  })
})

describe('recipeLights', () => {
  it('counts lights and names their purposes once', () => {
    expect(recipeLights(recipe)).toBe('3 lights: main, rim')
    expect(recipeLights({ ...recipe, lights: [] })).toBe('0 lights')
  })
})
