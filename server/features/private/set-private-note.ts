import type { ShootId } from '#shared/ids.ts'
import { requireShoot } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { privateNote } from '#server/db/schema/private.ts'

/** Replaces the photographer's own note of a shoot. @throws SIGNED_OUT, NOT_FOUND, FORBIDDEN */
export async function setPrivateNote(
  ctx: Ctx,
  { shootId, text }: { shootId: ShootId; text: string },
): Promise<{ text: string }> {
  await requireShoot(ctx, shootId, 'private-notes.write')
  await ctx.db
    .insert(privateNote)
    .values({ shootId, text })
    .onConflictDoUpdate({ target: privateNote.shootId, set: { text } })
  ctx.documents.announce(shootId, [['shoots', shootId, 'private-note']])
  return { text }
}
