import { randomUUID } from 'node:crypto'
import type { z } from 'zod'
import { type ShootId, dayIdSchema, shootIdSchema } from '#shared/ids.ts'
import type { createShootSchema } from '#shared/api/shoots.ts'
import { type DocumentKind, DOCUMENT_KINDS } from '#shared/realtime/documents.ts'
import { firstContent } from '#shared/realtime/first-content.ts'
import { requireStudio } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { audit } from '#server/db/audit.ts'
import { withTransaction } from '#server/db/client.ts'
import { location, shoot, shootMember } from '#server/db/schema/shoots.ts'

/**
 * Starts a shoot in a studio: whoever starts it is its photographer, and its five documents get their first content
 * in the same transaction: `contents` where given (encoded once, never rebuilt), else one empty day. `date` is the
 * first day's civil date in `zone`.
 *
 * @throws SIGNED_OUT, NOT_FOUND (no such studio for this person)
 */
export async function createShoot(
  ctx: Ctx,
  input: z.output<typeof createShootSchema>,
  contents: Partial<Record<DocumentKind, Uint8Array>> = {},
): Promise<{ id: ShootId }> {
  const { actor } = await requireStudio(ctx, input.studioId, 'shoots.create')
  const id = shootIdSchema.parse(randomUUID())
  const at = ctx.now()
  const first = firstContent({ id: dayIdSchema.parse(randomUUID()), date: input.date }, Math.random)
  await withTransaction(ctx.db, async (tx) => {
    const { studioId, title, date, zone } = input
    await tx.insert(shoot).values({ id, studioId, title, date, zone, createdBy: actor.userId, createdAt: at })
    await tx.insert(location).values({ shootId: id })
    await tx.insert(shootMember).values({ shootId: id, userId: actor.userId, role: 'photographer', createdAt: at })
    for (const kind of DOCUMENT_KINDS) await ctx.documents.create(tx, id, kind, contents[kind] ?? first[kind])
    await audit(tx, { shootId: id, studioId, userId: actor.userId, what: 'shoot.created', at })
  })
  return { id }
}
