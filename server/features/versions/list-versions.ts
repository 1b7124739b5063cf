import type { ShootId } from '#shared/ids.ts'
import type { Versions } from '#shared/api/versions.ts'
import { requireShoot } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { loadVersions } from './version-rows.ts'

/** A shoot's kept versions, newest first. @throws SIGNED_OUT, NOT_FOUND */
export async function listVersions(ctx: Ctx, shootId: ShootId): Promise<Versions> {
  await requireShoot(ctx, shootId, 'versions.read')
  return { versions: await loadVersions(ctx.db, shootId) }
}
