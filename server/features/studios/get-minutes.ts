import type { StudioId } from '#shared/ids.ts'
import type { Minutes } from '#shared/domain/plan/minutes.ts'
import { requireStudio } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { loadMinutes } from './minutes-rows.ts'

/** A studio's own minutes for the actions of a changeover. @throws SIGNED_OUT, NOT_FOUND */
export async function getMinutes(ctx: Ctx, studioId: StudioId): Promise<Minutes> {
  await requireStudio(ctx, studioId, 'studio.read')
  return loadMinutes(ctx.db, studioId)
}
