import { and, asc, eq } from 'drizzle-orm'
import type { RecipeId, StudioId } from '#shared/ids.ts'
import type { KeptRecipe } from '#shared/api/recipes.ts'
import { checkRecipe } from '#shared/domain/recipes/read-recipe.ts'
import type { Ctx } from '#server/context.ts'
import type { Db, Tx } from '#server/db/client.ts'
import { user } from '#server/db/schema/auth.ts'
import { recipe } from '#server/db/schema/studios.ts'
import { AppError } from '#server/errors.ts'
import { announceToStudio } from '#server/features/studios/studio-rows.ts'

/** A studio's recipes by name; one that cannot be read is named with the reason. */
export async function loadRecipes(db: Db | Tx, studioId: StudioId): Promise<KeptRecipe[]> {
  const rows = await db
    .select({ id: recipe.id, name: recipe.name, content: recipe.content, at: recipe.createdAt, by: user.name })
    .from(recipe)
    .leftJoin(user, eq(user.id, recipe.createdBy))
    .where(eq(recipe.studioId, studioId))
    .orderBy(asc(recipe.createdAt), asc(recipe.id))
  return rows
    .map(({ id, name, content, at, by }) => {
      const read = checkRecipe(content)
      return { id, name, by, atMs: at.getTime(), ...read, recipe: read.recipe && { ...read.recipe, name } }
    })
    .sort((a, b) => a.name.localeCompare(b.name, 'en', { numeric: true }))
}

/** That the recipe is one of the studio's. @throws NOT_FOUND */
export async function requireRecipe(tx: Tx, studioId: StudioId, id: RecipeId): Promise<void> {
  const [row] = await tx
    .select({ id: recipe.id })
    .from(recipe)
    .where(and(eq(recipe.studioId, studioId), eq(recipe.id, id)))
  if (!row)
    throw new AppError('NOT_FOUND', 'This recipe is not kept any more. Nothing was changed; look at the list again.')
}

/** Tells everyone who has one of the studio's shoots open that its recipes changed; call it after the commit. */
export async function announceRecipes(ctx: Ctx, studioId: StudioId): Promise<void> {
  await announceToStudio(ctx, studioId, (shootId) => [
    ['shoots', shootId, 'recipes'],
    ['studios', studioId, 'recipes'],
  ])
}
