import type { SetupId, ShootId } from '#shared/ids.ts'
import { lightingPart } from '#shared/realtime/plan-parts.ts'
import { requireShoot } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { AppError } from '#server/errors.ts'

/** That the person may read the shoot's lighting, and that it has this setup. @throws SIGNED_OUT, NOT_FOUND (shoot or setup) */
export async function requireSetup(
  ctx: Ctx,
  { shootId, setupId }: { shootId: ShootId; setupId: SetupId },
): Promise<void> {
  await requireShoot(ctx, shootId, 'brief.read')
  const isThere = await ctx.documents.read(shootId, 'lighting', (doc) => lightingPart(doc).setups.has(setupId))
  if (!isThere)
    throw new AppError(
      'NOT_FOUND',
      'This setup is not in the shoot any more. No sheet was made; look at the list again.',
    )
}
