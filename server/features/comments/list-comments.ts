import type { ShootId } from '#shared/ids.ts'
import type { Comments } from '#shared/api/comments.ts'
import { requireShoot } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { loadComments } from './comment-rows.ts'

/** All comments of a shoot, oldest first. @throws SIGNED_OUT, NOT_FOUND */
export async function listComments(ctx: Ctx, shootId: ShootId): Promise<Comments> {
  await requireShoot(ctx, shootId, 'comments.read')
  return loadComments(ctx.db, shootId)
}
