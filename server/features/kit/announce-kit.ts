import type { StudioId } from '#shared/ids.ts'
import type { Ctx } from '#server/context.ts'
import { announceToStudio } from '#server/features/studios/announce-to-studio.ts'

/** Tells everyone who has one of the studio's shoots open that its kit changed. */
export async function announceKit(ctx: Ctx, studioId: StudioId): Promise<void> {
  await announceToStudio(ctx, studioId, (shootId) => [['shoots', shootId, 'kit'], ['studios', studioId, 'kit']])
}
