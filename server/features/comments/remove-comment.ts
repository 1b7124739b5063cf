import { and, eq } from 'drizzle-orm'
import type { CommentId, ShootId } from '#shared/ids.ts'
import type { Comments } from '#shared/api/comments.ts'
import { requireShoot } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { comment } from '#server/db/schema/comments.ts'
import { AppError } from '#server/errors.ts'
import { loadComments } from './comment-rows.ts'

/** Takes back one's own comment; one that is gone already is no error. @throws SIGNED_OUT, NOT_FOUND; FORBIDDEN for somebody else's */
export async function removeComment(
  ctx: Ctx,
  { shootId, commentId }: { shootId: ShootId; commentId: CommentId },
): Promise<Comments> {
  const { actor } = await requireShoot(ctx, shootId, 'comments.write')
  const here = and(eq(comment.id, commentId), eq(comment.shootId, shootId))
  const gone = await ctx.db
    .delete(comment)
    .where(and(here, eq(comment.userId, actor.userId)))
    .returning({ id: comment.id })
  if (gone.length === 0) {
    const [others] = await ctx.db.select({ id: comment.id }).from(comment).where(here)
    if (others)
      throw new AppError(
        'FORBIDDEN',
        'This comment is somebody else’s, so it stays. Only who wrote it can take it back.',
      )
  }
  ctx.documents.announce(shootId, [['shoots', shootId, 'comments']])
  return loadComments(ctx.db, shootId)
}
