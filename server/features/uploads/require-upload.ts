import type { ShootId } from '#shared/ids.ts'
import { requireShoot } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'

/** Whether a file may be sent at all: asked before its bytes are read, so that nobody else can fill our memory. */
export async function requireUpload(ctx: Ctx, shootId: ShootId): Promise<void> {
  await requireShoot(ctx, shootId, 'uploads.write')
}
