import type { SignOffs } from '#shared/api/sign-off.ts'
import { fingerprintOf, freezeLook } from '#shared/domain/sign-off/fingerprint.ts'
import type { ShootId } from '#shared/ids.ts'
import { requireShoot } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { readLookVersions } from './look-version-rows.ts'
import { listAnswers } from './sign-off-rows.ts'

/** The complete history of a shoot's answers, newest first, and every look as the server sees it now. */
export async function listSignOffs(ctx: Ctx, shootId: ShootId): Promise<SignOffs> {
  await requireShoot(ctx, shootId, 'sign-off.read')
  const { looks, pictureHashes } = await readLookVersions(ctx, shootId)
  return {
    signOffs: await listAnswers(ctx.db, shootId),
    current: [...looks.values()].map((planned) => {
      const frozen = freezeLook(planned, pictureHashes)
      return {
        lookId: planned.look.id,
        fingerprint: fingerprintOf(frozen),
        frozen,
        pictures: planned.look.pictureIds.flatMap((uploadId) => {
          const sha256 = pictureHashes.get(uploadId)
          return sha256 === undefined ? [] : [{ uploadId, sha256 }]
        }),
      }
    }),
  }
}
