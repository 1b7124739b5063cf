import type { ShootId, VersionId } from '#shared/ids.ts'
import { VERSION_NAME_MAX, type Versions } from '#shared/api/versions.ts'
import { requireShoot } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { getVersionRow, loadVersions, storeVersion } from './version-rows.ts'

/**
 * Keeps board and plan as they stand under a name of its own, because a version is about to be taken back: so that
 * everybody else can take that back. The taking back is an edit of whoever asks, in their browser.
 *
 * @throws SIGNED_OUT, NOT_FOUND, FORBIDDEN; CONFLICT when the shoot has as many versions as it may
 */
export async function beginTakeBack(
  ctx: Ctx,
  { shootId, versionId }: { shootId: ShootId; versionId: VersionId },
): Promise<Versions> {
  const { actor } = await requireShoot(ctx, shootId, 'versions.write')
  const { name } = await getVersionRow(ctx.db, shootId, versionId)
  await storeVersion(ctx, { shootId, userId: actor.userId, name: nameBefore(name), takingBack: name })
  return { versions: await loadVersions(ctx.db, shootId) }
}

/** "Before taking back ‘First idea’", cut to the length of a name. */
function nameBefore(name: string): string {
  const room = VERSION_NAME_MAX - 'Before taking back ‘’'.length
  const words = name.length <= room ? name : `${name.slice(0, room - 1).replace(/[\uD800-\uDBFF]$/, '')}…`
  return `Before taking back ‘${words}’`
}
