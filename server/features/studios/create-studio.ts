import { randomUUID } from 'node:crypto'
import type { z } from 'zod'
import { kitItemIdSchema, studioIdSchema } from '#shared/ids.ts'
import type { Studio, studioInputSchema } from '#shared/api/studios.ts'
import { STARTER_KIT } from '#shared/domain/kit/starter.ts'
import { DEFAULT_MINUTES } from '#shared/domain/plan/minutes.ts'
import { requireUser } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { audit } from '#server/db/audit.ts'
import { withTransaction } from '#server/db/client.ts'
import { kitItem, minutesDefault, studio, studioMember } from '#server/db/schema/studios.ts'

/** Makes a studio of the person who asks: its owner, a starter kit to change, and the common minutes. @throws SIGNED_OUT */
export async function createStudio(ctx: Ctx, input: z.output<typeof studioInputSchema>): Promise<Studio> {
  const actor = requireUser(ctx)
  const id = studioIdSchema.parse(randomUUID())
  const at = ctx.now()
  await withTransaction(ctx.db, async (tx) => {
    await tx.insert(studio).values({ id, name: input.name, createdAt: at })
    await tx.insert(studioMember).values({ studioId: id, userId: actor.userId, role: 'owner', createdAt: at })
    await tx.insert(minutesDefault).values({ studioId: id, minutes: DEFAULT_MINUTES, updatedAt: at })
    await tx.insert(kitItem).values(
      STARTER_KIT.map((item) => ({
        id: kitItemIdSchema.parse(randomUUID()),
        version: 1,
        studioId: id,
        input: item,
        createdBy: actor.userId,
        createdAt: at,
      })),
    )
    await audit(tx, { studioId: id, userId: actor.userId, what: 'studio.created', at })
  })
  return { id, name: input.name, role: 'owner', people: 1 }
}
