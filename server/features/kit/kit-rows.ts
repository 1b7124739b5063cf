import { and, asc, desc, eq, sql } from 'drizzle-orm'
import type { KitItemId, StudioId } from '#shared/ids.ts'
import { KIT_ITEMS_MAX, type KitItem, kitItemSchema } from '#shared/api/kit.ts'
import type { Ctx } from '#server/context.ts'
import type { Db, Tx } from '#server/db/client.ts'
import { kitItem } from '#server/db/schema/studios.ts'
import { AppError } from '#server/errors.ts'
import { announceToStudio } from '#server/features/studios/studio-rows.ts'

/** A studio's kit as it stands: the newest version of each item, without what was removed, by name. */
export async function loadKit(db: Db | Tx, studioId: StudioId): Promise<KitItem[]> {
  const newest = db
    .selectDistinctOn([kitItem.id])
    .from(kitItem)
    .where(eq(kitItem.studioId, studioId))
    .orderBy(asc(kitItem.id), desc(kitItem.version))
    .as('newest')
  const rows = await db
    .select()
    .from(newest)
    .where(sql`${newest.removedAt} is null`)
  return rows
    .map(({ id, version, input }) => kitItemSchema.parse({ ...input, id, version }))
    .sort((a, b) => a.name.localeCompare(b.name, 'en', { numeric: true }) || (a.id < b.id ? -1 : 1))
}

export type NewestKitItem = { item: KitItem; isRemoved: boolean }

/** The newest version of an item of this studio, removed or not. */
export async function findKitItem(tx: Tx, studioId: StudioId, id: KitItemId): Promise<NewestKitItem | undefined> {
  const [row] = await tx
    .select()
    .from(kitItem)
    .where(and(eq(kitItem.studioId, studioId), eq(kitItem.id, id)))
    .orderBy(desc(kitItem.version))
    .limit(1)
  return (
    row && { item: kitItemSchema.parse({ ...row.input, id, version: row.version }), isRemoved: row.removedAt !== null }
  )
}

/** That so many items still go into a kit. @throws CONFLICT */
export function requireRoom(has: number, more: number): void {
  if (has + more > KIT_ITEMS_MAX)
    throw new AppError(
      'CONFLICT',
      `The kit room holds ${KIT_ITEMS_MAX} items, as many as it can; ${has} are there. Nothing was changed; remove what nobody lights with any more.`,
    )
}

/** Tells everyone who has one of the studio's shoots open that its kit changed. */
export async function announceKit(ctx: Ctx, studioId: StudioId): Promise<void> {
  await announceToStudio(ctx, studioId, (shootId) => [
    ['shoots', shootId, 'kit'],
    ['studios', studioId, 'kit'],
  ])
}
