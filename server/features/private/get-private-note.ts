import { eq } from 'drizzle-orm'
import type { ShootId } from '#shared/ids.ts'
import { requireShoot } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { privateNote } from '#server/db/schema/private.ts'

/** The photographer's own note of a shoot; empty when there is none. @throws SIGNED_OUT, NOT_FOUND, FORBIDDEN */
export async function getPrivateNote(ctx: Ctx, shootId: ShootId): Promise<{ text: string }> {
  await requireShoot(ctx, shootId, 'private-notes.read')
  const [row] = await ctx.db
    .select({ text: privateNote.text })
    .from(privateNote)
    .where(eq(privateNote.shootId, shootId))
  return { text: row?.text ?? '' }
}
