import type { z } from 'zod'
import type { PieceId, ShootId } from '#shared/ids.ts'
import type { PieceCosts, pieceCostInputSchema } from '#shared/api/private.ts'
import { requireShoot } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { pieceCost } from '#server/db/schema/private.ts'
import { listPieceCosts } from './list-piece-costs.ts'

export type SetPieceCost = z.output<typeof pieceCostInputSchema> & { shootId: ShootId; pieceId: PieceId }

/** Writes down what a piece costs, its deposit and its size; money in minor units with a currency. @throws SIGNED_OUT, NOT_FOUND, FORBIDDEN */
export async function setPieceCost(
  ctx: Ctx,
  { shootId, pieceId, cost, deposit, size }: SetPieceCost,
): Promise<PieceCosts> {
  await requireShoot(ctx, shootId, 'piece-costs.write')
  const values = {
    costMinor: cost?.minor ?? null,
    costCurrency: cost?.currency ?? null,
    depositMinor: deposit?.minor ?? null,
    depositCurrency: deposit?.currency ?? null,
    size,
  }
  await ctx.db
    .insert(pieceCost)
    .values({ shootId, pieceId, ...values })
    .onConflictDoUpdate({ target: [pieceCost.shootId, pieceCost.pieceId], set: values })
  ctx.documents.announce(shootId, [['shoots', shootId, 'piece-costs']])
  return listPieceCosts(ctx, shootId)
}
