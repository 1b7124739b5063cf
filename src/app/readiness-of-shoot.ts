import type { SignOffs } from '#shared/api/sign-off.ts'
import { redCautions } from '#shared/domain/lighting/cautions.ts'
import { orderProblem } from '#shared/domain/order/problem.ts'
import { schedule } from '#shared/domain/order/schedule.ts'
import { type Readiness, type ReadinessInput, readinessOf } from '#shared/domain/shoots/readiness.ts'
import { standingsOf } from '#src/features/sign-off/use-look-standings.ts'

/** The lamps of a shoot from what is on this device and the answers on record. */
export function readinessOfShoot({
  plan,
  signOffs,
  ...rest
}: Pick<ReadinessInput, 'plan' | 'frames' | 'dayShots'> & { signOffs: SignOffs | undefined }): Readiness[] {
  const standings = signOffs ? [...standingsOf(plan, signOffs)] : []
  return readinessOf({
    ...rest,
    plan,
    signOffs: new Map(standings.map(([lookId, { state }]) => [lookId, state.kind])),
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
