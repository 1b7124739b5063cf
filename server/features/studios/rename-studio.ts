import { eq } from 'drizzle-orm'
import type { StudioId } from '#shared/ids.ts'
import type { Studio } from '#shared/api/studios.ts'
import { requireStudio } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { studio } from '#server/db/schema/studios.ts'
import { getStudio } from './studio-rows.ts'

/** Gives a studio another name. @throws SIGNED_OUT, NOT_FOUND, FORBIDDEN */
export async function renameStudio(
  ctx: Ctx,
  { studioId, name }: { studioId: StudioId; name: string },
): Promise<Studio> {
  const { role } = await requireStudio(ctx, studioId, 'studio.write')
  await ctx.db.update(studio).set({ name }).where(eq(studio.id, studioId))
  return getStudio(ctx.db, studioId, role)
}
