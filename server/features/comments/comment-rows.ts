import { asc, eq } from 'drizzle-orm'
import type { ShootId } from '#shared/ids.ts'
import type { Comments } from '#shared/api/comments.ts'
import { initialsOf } from '#shared/domain/people/face.ts'
import type { Db, Tx } from '#server/db/client.ts'
import { user } from '#server/db/schema/auth.ts'
import { comment } from '#server/db/schema/comments.ts'

/** All comments of a shoot, oldest first; who left it keeps their name here. */
export async function loadComments(db: Db | Tx, shootId: ShootId): Promise<Comments> {
  const rows = await db
    .select({
      id: comment.id,
      subject: comment.subject,
      subjectId: comment.subjectId,
      userId: comment.userId,
      name: user.name,
      text: comment.text,
      at: comment.at,
    })
    .from(comment)
    .innerJoin(user, eq(user.id, comment.userId))
    .where(eq(comment.shootId, shootId))
    .orderBy(asc(comment.at), asc(comment.id))
  return { comments: rows.map(({ at, ...row }) => ({ ...row, initials: initialsOf(row.name), atMs: at.getTime() })) }
}
