import type { ShootId } from '#shared/ids.ts'
import type { Versions } from '#shared/api/versions.ts'
import { requireShoot } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { loadVersions, storeVersion } from './version-rows.ts'

/**
 * Keeps board and plan as they stand under a name; the answer is the whole list.
 *
 * @throws SIGNED_OUT, NOT_FOUND, FORBIDDEN; CONFLICT when the shoot has as many versions as it may
 */
export async function keepVersion(ctx: Ctx, { shootId, name }: { shootId: ShootId; name: string }): Promise<Versions> {
  const { actor } = await requireShoot(ctx, shootId, 'versions.write')
  await storeVersion(ctx, { shootId, userId: actor.userId, name, takingBack: null })
  return { versions: await loadVersions(ctx.db, shootId) }
}
