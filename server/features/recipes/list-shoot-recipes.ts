import { eq } from 'drizzle-orm'
import type { ShootId } from '#shared/ids.ts'
import type { Recipes } from '#shared/api/recipes.ts'
import { requireShoot } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { shoot } from '#server/db/schema/shoots.ts'
import { loadRecipes } from './recipe-rows.ts'

/** The recipes of the studio a shoot belongs to, read through the shoot by anybody with a role in it. @throws SIGNED_OUT, NOT_FOUND */
export async function listShootRecipes(ctx: Ctx, shootId: ShootId): Promise<Recipes> {
  await requireShoot(ctx, shootId, 'recipes.read')
  const [row] = await ctx.db.select({ studioId: shoot.studioId }).from(shoot).where(eq(shoot.id, shootId))
  return { recipes: row ? await loadRecipes(ctx.db, row.studioId) : [] }
}
