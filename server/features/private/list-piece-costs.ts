import { asc, eq } from 'drizzle-orm'
import type { ShootId } from '#shared/ids.ts'
import type { PieceCosts } from '#shared/api/private.ts'
import { requireShoot } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { pieceCost } from '#server/db/schema/private.ts'

/** What the pieces of a shoot cost, in minor units with a currency, and their sizes; for those who plan. @throws SIGNED_OUT, NOT_FOUND, FORBIDDEN */
export async function listPieceCosts(ctx: Ctx, shootId: ShootId): Promise<PieceCosts> {
  await requireShoot(ctx, shootId, 'piece-costs.read')
  const rows = await ctx.db
    .select()
    .from(pieceCost)
    .where(eq(pieceCost.shootId, shootId))
    .orderBy(asc(pieceCost.pieceId))
  return {
    pieces: rows.map((row) => ({
      pieceId: row.pieceId,
      cost: toMoney(row.costMinor, row.costCurrency),
      deposit: toMoney(row.depositMinor, row.depositCurrency),
      size: row.size,
    })),
  }
}

function toMoney(minor: number | null, currency: string | null): { minor: number; currency: string } | null {
  return minor === null || currency === null ? null : { minor, currency }
}
