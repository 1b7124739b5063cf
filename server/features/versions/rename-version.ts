import { eq } from 'drizzle-orm'
import type { ShootId, VersionId } from '#shared/ids.ts'
import type { Versions } from '#shared/api/versions.ts'
import { requireShoot } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { keptVersion } from '#server/db/schema/realtime.ts'
import { announceVersions, getVersionRow, loadVersions } from './version-rows.ts'

/** Gives a kept version another name. @throws SIGNED_OUT, NOT_FOUND, FORBIDDEN */
export async function renameVersion(
  ctx: Ctx,
  { shootId, versionId, name }: { shootId: ShootId; versionId: VersionId; name: string },
): Promise<Versions> {
  await requireShoot(ctx, shootId, 'versions.write')
  await getVersionRow(ctx.db, shootId, versionId)
  await ctx.db.update(keptVersion).set({ name }).where(eq(keptVersion.id, versionId))
  announceVersions(ctx, shootId)
  return { versions: await loadVersions(ctx.db, shootId) }
}
