import { and, eq } from 'drizzle-orm'
import type { ShootId, StudioId, UserId } from '#shared/ids.ts'
import {
  type Role,
  type ShootAction,
  type StudioAction,
  type StudioRole,
  canInShoot,
  canInStudio,
} from '#shared/access/roles.ts'
import type { Actor, Ctx } from '#server/context.ts'
import type { Db, Tx } from '#server/db/client.ts'
import { shootMember } from '#server/db/schema/shoots.ts'
import { studioMember } from '#server/db/schema/studios.ts'
import { AppError } from '#server/errors.ts'

/** Who asks. @throws SIGNED_OUT */
export function requireUser(ctx: Ctx): Actor {
  if (!ctx.actor)
    throw new AppError('SIGNED_OUT', 'You are not signed in. Sign in and try again; what you typed is still here.')
  return ctx.actor
}

/** A person's role in a shoot, or null. */
export async function findRole(db: Db | Tx, shootId: ShootId, userId: UserId): Promise<Role | null> {
  const [member] = await db
    .select({ role: shootMember.role })
    .from(shootMember)
    .where(and(eq(shootMember.shootId, shootId), eq(shootMember.userId, userId)))
  return member?.role ?? null
}

/** A person's role in a studio, or null. */
export async function findStudioRole(db: Db | Tx, studioId: StudioId, userId: UserId): Promise<StudioRole | null> {
  const [member] = await db
    .select({ role: studioMember.role })
    .from(studioMember)
    .where(and(eq(studioMember.studioId, studioId), eq(studioMember.userId, userId)))
  return member?.role ?? null
}

/**
 * That the person may do this in the shoot.
 *
 * @throws SIGNED_OUT; NOT_FOUND for who has no role in it (to them it does not exist); FORBIDDEN for a role without the right.
 */
export async function requireShoot(
  ctx: Ctx,
  shootId: ShootId,
  action: ShootAction,
): Promise<{ actor: Actor; role: Role }> {
  const actor = requireUser(ctx)
  const role = await findRole(ctx.db, shootId, actor.userId)
  if (!role) throw new AppError('NOT_FOUND', 'There is no such shoot, or you do not belong to it.')
  if (!canInShoot(role, action)) {
    throw new AppError(
      'FORBIDDEN',
      `As ${role} of this shoot you may not do this. Nothing was changed; ask its photographer.`,
    )
  }
  return { actor, role }
}

/**
 * That the person may do this in the studio.
 *
 * @throws SIGNED_OUT; NOT_FOUND for who does not belong to it; FORBIDDEN for a member without the right.
 */
export async function requireStudio(
  ctx: Ctx,
  studioId: StudioId,
  action: StudioAction,
): Promise<{ actor: Actor; role: StudioRole }> {
  const actor = requireUser(ctx)
  const role = await findStudioRole(ctx.db, studioId, actor.userId)
  if (!role) throw new AppError('NOT_FOUND', 'There is no such studio, or you do not belong to it.')
  if (!canInStudio(role, action)) {
    throw new AppError('FORBIDDEN', 'Only an owner of the studio may do this. Nothing was changed; ask one of them.')
  }
  return { actor, role }
}
