import type { Frame } from '#shared/domain/board/schema.ts'
import { redCautions } from '#shared/domain/lighting/cautions.ts'
import { orderProblem } from '#shared/domain/order/problem.ts'
import { schedule } from '#shared/domain/order/schedule.ts'
import type { Plan } from '#shared/domain/plan/read-plan.ts'
import { type Readiness, readinessOf } from '#shared/domain/shoots/readiness.ts'
import { freezeLook } from '#shared/domain/sign-off/fingerprint.ts'
import { signOffState } from '#shared/domain/sign-off/state.ts'
import type { ShootId } from '#shared/ids.ts'
import { readAll } from '#shared/realtime/collection.ts'
import { dayShots } from '#shared/realtime/documents.ts'
import type { Ctx } from '#server/context.ts'
import { readLookVersions } from '#server/features/sign-off/look-version-rows.ts'
import { listAnswers } from '#server/features/sign-off/sign-off-rows.ts'

/** The lamps of a shoot as every screen of it shows them. The caller has seen to access. */
export async function loadReadiness(
  ctx: Ctx,
  shootId: ShootId,
  plan: Plan,
  frames: ReadonlyMap<string, Frame>,
): Promise<Readiness[]> {
  const [versions, answers, happened] = await Promise.all([
    readLookVersions(ctx, shootId),
    listAnswers(ctx.db, shootId),
    ctx.documents.read(shootId, 'day', (doc) => readAll(doc, dayShots).items),
  ])
  const signOffs = new Map(
    [...versions.looks].map(([lookId, look]) => {
      const history = answers.filter((answer) => answer.lookId === lookId)
      return [lookId, signOffState(history, freezeLook(look, versions.pictureHashes)).kind]
    }),
  )
  return readinessOf({
    plan,
    frames,
    signOffs,
    dayShots: happened,
    redCautions,
    schedule: (dayId) => {
      const problem = orderProblem(plan, dayId)
      const { broken, wrapMin } = schedule(
        problem,
        problem.shots.map(({ id }) => id),
      )
      return { broken: broken.map(({ words }) => words), wrapMin }
    },
  })
}
