import { randomUUID } from 'node:crypto'
import { type KitItemId, type StudioId, kitItemIdSchema } from '#shared/ids.ts'
import type { KitImportRow, KitItem } from '#shared/api/kit.ts'
import type { KitInput } from '#shared/domain/kit/schema.ts'
import { requireStudio } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { withTransaction } from '#server/db/client.ts'
import { kitItem } from '#server/db/schema/studios.ts'
import { AppError } from '#server/errors.ts'
import { lockStudio } from '#server/features/studios/studio-rows.ts'
import { announceKit, loadKit, requireRoom } from './kit-rows.ts'

/** Rows a statement: PostgreSQL takes 65,535 parameters. */
const CHUNK = 1000

/**
 * Writes the agreed rows of a file: new items, and new versions of items that are there; all of them or none. Meter
 * readings that name a new item of the same file get its real id.
 *
 * @throws SIGNED_OUT, NOT_FOUND; BAD_REQUEST when a row is there twice; CONFLICT when an item was changed or taken out since the file was looked at, or the kit is full
 */
export async function importKit(
  ctx: Ctx,
  { studioId, rows }: { studioId: StudioId; rows: readonly KitImportRow[] },
): Promise<{ kit: KitItem[] }> {
  const { actor } = await requireStudio(ctx, studioId, 'kit.write')
  if (new Set(rows.map(({ id }) => id)).size !== rows.length)
    throw new AppError('BAD_REQUEST', 'One item stands there twice. Nothing was written; choose the file again.')
  const newIds = new Map(
    rows.flatMap(({ id, version }) => (version === null ? [[id, kitItemIdSchema.parse(randomUUID())] as const] : [])),
  )
  await withTransaction(ctx.db, async (tx) => {
    await lockStudio(tx, studioId)
    const stored = new Map((await loadKit(tx, studioId)).map((item) => [item.id, item]))
    requireRoom(stored.size, newIds.size)
    const at = ctx.now()
    const values = rows.map(({ id, version, input }) => {
      if (version !== null && stored.get(id)?.version !== version)
        throw new AppError(
          'CONFLICT',
          `Somebody changed “${input.name}” or took it out while you looked at the file. Nothing was written; choose the file again to see what it would change now.`,
        )
      return {
        id: newIds.get(id) ?? id,
        version: (version ?? 0) + 1,
        studioId,
        input: withIds(input, newIds),
        createdBy: actor.userId,
        createdAt: at,
      }
    })
    for (let from = 0; from < values.length; from += CHUNK)
      await tx.insert(kitItem).values(values.slice(from, from + CHUNK))
  })
  await announceKit(ctx, studioId)
  return { kit: await loadKit(ctx.db, studioId) }
}

function withIds(input: KitInput, newIds: ReadonlyMap<KitItemId, KitItemId>): KitInput {
  if (input.body.kind !== 'unit') return input
  const metered = input.body.numbers.metered.map((entry) => ({
    ...entry,
    modifierKitId: entry.modifierKitId && (newIds.get(entry.modifierKitId) ?? entry.modifierKitId),
  }))
  return { ...input, body: { kind: 'unit', numbers: { ...input.body.numbers, metered } } }
}
