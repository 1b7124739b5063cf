import { eq } from 'drizzle-orm'
import type { ShootId, StudioId } from '#shared/ids.ts'
import type { Ctx } from '#server/context.ts'
import { shoot } from '#server/db/schema/shoots.ts'

/** Tells everyone who has one of the studio's shoots open that these query keys changed; call it after the commit. */
export async function announceToStudio(ctx: Ctx, studioId: StudioId, keysOf: (shootId: ShootId) => readonly (readonly string[])[]): Promise<void> {
  const shoots = await ctx.db.select({ id: shoot.id }).from(shoot).where(eq(shoot.studioId, studioId))
  for (const { id } of shoots) ctx.documents.announce(id, keysOf(id))
}
