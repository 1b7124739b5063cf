import { randomUUID } from 'node:crypto'
import type { z } from 'zod'
import { type ShootId, commentIdSchema } from '#shared/ids.ts'
import type { Comments, commentInputSchema } from '#shared/api/comments.ts'
import { wellFormed } from '#shared/domain/text.ts'
import { requireShoot } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { comment } from '#server/db/schema/comments.ts'
import { loadComments } from './comment-rows.ts'

/** Says something about a frame, look, shot or setup. @throws SIGNED_OUT, NOT_FOUND */
export async function addComment(
  ctx: Ctx,
  input: z.output<typeof commentInputSchema> & { shootId: ShootId },
): Promise<Comments> {
  const { actor } = await requireShoot(ctx, input.shootId, 'comments.write')
  await ctx.db.insert(comment).values({
    ...input,
    text: wellFormed(input.text),
    id: commentIdSchema.parse(randomUUID()),
    userId: actor.userId,
    at: ctx.now(),
  })
  ctx.documents.announce(input.shootId, [['shoots', input.shootId, 'comments']])
  return loadComments(ctx.db, input.shootId)
}
