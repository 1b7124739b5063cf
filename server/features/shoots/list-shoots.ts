import { and, eq } from 'drizzle-orm'
import type { ShootId, UploadId } from '#shared/ids.ts'
import type { Role } from '#shared/access/roles.ts'
import type { ShootCard } from '#shared/api/shoots.ts'
import type { Frame } from '#shared/domain/board/schema.ts'
import type { Plan } from '#shared/domain/plan/read-plan.ts'
import { readAll } from '#shared/realtime/collection.ts'
import { frames as framesOf } from '#shared/realtime/documents.ts'
import { requireUser } from '#server/access/require.ts'
import type { Ctx } from '#server/context.ts'
import { shoot, shootMember } from '#server/db/schema/shoots.ts'
import { readShootPlan } from '#server/features/plan/read-shoot-plan.ts'
import { loadReadiness } from './readiness-rows.ts'

const PICTURES_ON_A_CARD = 3

/**
 * The shoots a person has a role in: those to come soonest first, then those without a date, then those that are over,
 * the latest first. A shoot's day counts in its own zone.
 *
 * @throws SIGNED_OUT
 */
export async function listShoots(ctx: Ctx): Promise<{ shoots: ShootCard[] }> {
  const { userId } = requireUser(ctx)
  const rows = await ctx.db
    .select({
      id: shoot.id,
      studioId: shoot.studioId,
      date: shoot.date,
      zone: shoot.zone,
      role: shootMember.role,
      createdAt: shoot.createdAt,
    })
    .from(shootMember)
    .innerJoin(shoot, and(eq(shoot.id, shootMember.shootId), eq(shootMember.userId, userId)))
  const now = ctx.now()
  const sorted = rows
    .map((row) => ({ ...row, rank: row.date === null ? 1 : row.date >= civilDateIn(row.zone, now) ? 0 : 2 }))
    .sort((a, b) => a.rank - b.rank || byDate(a, b) || b.createdAt.getTime() - a.createdAt.getTime())
  const shoots: ShootCard[] = []
  // One after another: a person with many shoots must not take all database connections for their list.
  for (const row of sorted) shoots.push(await cardOf(ctx, row))
  return { shoots }
}

function byDate(a: { rank: number; date: string | null }, b: { date: string | null }): number {
  const order = (a.date ?? '').localeCompare(b.date ?? '')
  return a.rank === 2 ? -order : order
}

/** `YYYY-MM-DD` of an instant in a zone. */
function civilDateIn(zone: string, at: Date): string {
  return new Intl.DateTimeFormat('sv-SE', { timeZone: zone }).format(at)
}

async function cardOf(
  ctx: Ctx,
  row: Pick<ShootCard, 'id' | 'studioId' | 'date'> & { id: ShootId; role: Role },
): Promise<ShootCard> {
  const [plan, frames] = await Promise.all([
    readShootPlan(ctx, row.id),
    ctx.documents.read(row.id, 'board', (doc) => readAll(doc, framesOf).items),
  ])
  const { title, location } = plan.brief
  return {
    id: row.id,
    studioId: row.studioId,
    title,
    role: row.role,
    date: row.date,
    place: location.name || location.address,
    shots: plan.shots.size,
    pictures: picturesOf(plan, frames),
    readiness: await loadReadiness(ctx, row.id, plan, frames),
  }
}

/** Pictures of the first shots, then whatever else hangs on the board. */
function picturesOf(plan: Plan, frames: ReadonlyMap<string, Frame>): UploadId[] {
  const covers = plan.days.flatMap((day) => day.shots).flatMap(({ cover }) => (cover ? [cover] : []))
  const pictures = [...covers, ...frames.values()].flatMap(({ picture }) =>
    picture.state === 'stored' ? [picture.uploadId] : [],
  )
  return [...new Set(pictures)].slice(0, PICTURES_ON_A_CARD)
}
