import type { StudioId } from '#shared/ids.ts'
import type { Minutes } from '#shared/domain/plan/minutes.ts'
import { requireStudio } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { minutesDefault } from '#server/db/schema/studios.ts'
import { announceToStudio } from './studio-rows.ts'

/** Sets a studio's own minutes; the running orders of its shoots count with them from then. @throws SIGNED_OUT, NOT_FOUND */
export async function setMinutes(
  ctx: Ctx,
  { studioId, minutes }: { studioId: StudioId; minutes: Minutes },
): Promise<Minutes> {
  await requireStudio(ctx, studioId, 'minutes.write')
  const updatedAt = ctx.now()
  await ctx.db
    .insert(minutesDefault)
    .values({ studioId, minutes, updatedAt })
    .onConflictDoUpdate({ target: minutesDefault.studioId, set: { minutes, updatedAt } })
  await announceToStudio(ctx, studioId, (shootId) => [
    ['shoots', shootId],
    ['studios', studioId, 'minutes'],
  ])
  return minutes
}
