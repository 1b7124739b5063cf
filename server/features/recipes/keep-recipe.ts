import { randomUUID } from 'node:crypto'
import { count, eq, sql } from 'drizzle-orm'
import { type StudioId, recipeIdSchema } from '#shared/ids.ts'
import { MOST_RECIPES, RECIPES_MAX_BYTES, type Recipes } from '#shared/api/recipes.ts'
import { checkRecipe } from '#shared/domain/recipes/read-recipe.ts'
import { requireStudio } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { audit } from '#server/db/audit.ts'
import { withTransaction } from '#server/db/client.ts'
import { recipe } from '#server/db/schema/studios.ts'
import { AppError } from '#server/errors.ts'
import { lockStudio } from '#server/features/studios/studio-rows.ts'
import { announceRecipes, loadRecipes } from './recipe-rows.ts'

/**
 * Keeps a recipe in the studio under its own name. `content` is what JSON held; unknown fields are left out.
 *
 * @throws SIGNED_OUT, NOT_FOUND; BAD_REQUEST with what is wrong and where; CONFLICT when the studio has as many, or as much, as it may
 */
export async function keepRecipe(
  ctx: Ctx,
  { studioId, content }: { studioId: StudioId; content: unknown },
): Promise<Recipes> {
  const { actor } = await requireStudio(ctx, studioId, 'recipes.write')
  const read = checkRecipe(content)
  if (!read.recipe) throw new AppError('BAD_REQUEST', read.problem)
  const { name } = read.recipe
  await withTransaction(ctx.db, async (tx) => {
    await lockStudio(tx, studioId)
    const [kept] = await tx
      .select({ number: count(), bytes: sql`coalesce(sum(octet_length(${recipe.content}::text)), 0)`.mapWith(Number) })
      .from(recipe)
      .where(eq(recipe.studioId, studioId))
    if ((kept?.number ?? 0) >= MOST_RECIPES)
      throw new AppError(
        'CONFLICT',
        `The studio keeps ${MOST_RECIPES} recipes, as many as it can. Nothing was changed; remove one that nobody needs, or save this one as a file.`,
      )
    if ((kept?.bytes ?? 0) + JSON.stringify(read.recipe).length > RECIPES_MAX_BYTES)
      throw new AppError(
        'CONFLICT',
        `The studio’s recipes take ${RECIPES_MAX_BYTES / 1024 / 1024} MB, as much as they can. Nothing was changed; remove one that nobody needs, or save this one as a file.`,
      )
    const id = recipeIdSchema.parse(randomUUID())
    const at = ctx.now()
    await tx.insert(recipe).values({ id, studioId, name, content: read.recipe, createdBy: actor.userId, createdAt: at })
    await audit(tx, { studioId, userId: actor.userId, what: 'recipe.kept', subject: id, at })
  })
  await announceRecipes(ctx, studioId)
  return { recipes: await loadRecipes(ctx.db, studioId) }
}
