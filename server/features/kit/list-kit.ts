import type { StudioId } from '#shared/ids.ts'
import type { KitItem } from '#shared/api/kit.ts'
import { requireStudio } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { loadKit } from './kit-rows.ts'

/** A studio's kit, by name. @throws SIGNED_OUT, NOT_FOUND */
export async function listKit(ctx: Ctx, studioId: StudioId): Promise<{ kit: KitItem[] }> {
  await requireStudio(ctx, studioId, 'studio.read')
  return { kit: await loadKit(ctx.db, studioId) }
}
