import { eq } from 'drizzle-orm'
import type { RecipeId, StudioId } from '#shared/ids.ts'
import type { Recipes } from '#shared/api/recipes.ts'
import { requireStudio } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { audit } from '#server/db/audit.ts'
import { withTransaction } from '#server/db/client.ts'
import { recipe } from '#server/db/schema/studios.ts'
import { announceRecipes, loadRecipes, requireRecipe } from './recipe-rows.ts'

/** Gives a recipe another name; setups made by it keep theirs. @throws SIGNED_OUT, NOT_FOUND (studio or recipe) */
export async function renameRecipe(
  ctx: Ctx,
  { studioId, recipeId, name }: { studioId: StudioId; recipeId: RecipeId; name: string },
): Promise<Recipes> {
  const { actor } = await requireStudio(ctx, studioId, 'recipes.write')
  await withTransaction(ctx.db, async (tx) => {
    await requireRecipe(tx, studioId, recipeId)
    await tx.update(recipe).set({ name }).where(eq(recipe.id, recipeId))
    await audit(tx, { studioId, userId: actor.userId, what: 'recipe.renamed', subject: recipeId, at: ctx.now() })
  })
  await announceRecipes(ctx, studioId)
  return { recipes: await loadRecipes(ctx.db, studioId) }
}
