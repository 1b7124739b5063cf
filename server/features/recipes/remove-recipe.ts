import { and, eq } from 'drizzle-orm'
import type { RecipeId, StudioId } from '#shared/ids.ts'
import type { Recipes } from '#shared/api/recipes.ts'
import { requireStudio } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { audit } from '#server/db/audit.ts'
import { withTransaction } from '#server/db/client.ts'
import { recipe } from '#server/db/schema/studios.ts'
import { announceRecipes, loadRecipes } from './recipe-rows.ts'

/** Takes a recipe out of the studio; setups made by it stay. One that is gone already is no error. @throws SIGNED_OUT, NOT_FOUND */
export async function removeRecipe(
  ctx: Ctx,
  { studioId, recipeId }: { studioId: StudioId; recipeId: RecipeId },
): Promise<Recipes> {
  const { actor } = await requireStudio(ctx, studioId, 'recipes.write')
  await withTransaction(ctx.db, async (tx) => {
    const gone = await tx
      .delete(recipe)
      .where(and(eq(recipe.studioId, studioId), eq(recipe.id, recipeId)))
      .returning({ id: recipe.id })
    if (gone.length === 0) return
    await audit(tx, { studioId, userId: actor.userId, what: 'recipe.removed', subject: recipeId, at: ctx.now() })
  })
  await announceRecipes(ctx, studioId)
  return { recipes: await loadRecipes(ctx.db, studioId) }
}
