import type { StudioId } from '#shared/ids.ts'
import type { Recipes } from '#shared/api/recipes.ts'
import { requireStudio } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { loadRecipes } from './recipe-rows.ts'

/** A studio's recipes, by name. @throws SIGNED_OUT, NOT_FOUND */
export async function listRecipes(ctx: Ctx, studioId: StudioId): Promise<Recipes> {
  await requireStudio(ctx, studioId, 'studio.read')
  return { recipes: await loadRecipes(ctx.db, studioId) }
}
