import { useQuery } from '@tanstack/react-query'
import { useMemo } from 'react'
import type { SignOff, SignOffs } from '#shared/api/sign-off.ts'
import type { Plan, PlannedLook } from '#shared/domain/plan/read-plan.ts'
import { fingerprintOf, freezeLook } from '#shared/domain/sign-off/fingerprint.ts'
import type { FrozenLook } from '#shared/domain/sign-off/schema.ts'
import { type SignOffState, signOffState } from '#shared/domain/sign-off/state.ts'
import { useShoot } from '#src/realtime/shoot-realtime.tsx'
import { usePlan } from '#src/realtime/use-plan.ts'
import { signOffQueries } from './queries.ts'

/** A look as it is on this screen, and where it stands with the client. */
export type LookStanding = {
  planned: PlannedLook
  frozen: FrozenLook
  fingerprint: string
  state: SignOffState<SignOff>
  /** Answers to this look, newest first. */
  history: SignOff[]
  /** Pictures that are not on the server yet and so not part of this version. */
  picturesOnWay: number
}

export type LookStandings = { standings: ReadonlyMap<string, LookStanding>; isKnown: boolean; error: Error | null }

/** Pictures on their way are looked for again while there are any. */
const LOOK_AGAIN_MS = 15_000

/** Every look of the plan with its state, worked out from what is on the screen and the answers on record. */
export function standingsOf(plan: Plan, { signOffs, current }: SignOffs): Map<string, LookStanding> {
  const hashes = new Map(
    current.flatMap(({ pictures }) => pictures.map(({ uploadId, sha256 }) => [String(uploadId), sha256] as const)),
  )
  return new Map(
    [...plan.looks].map(([lookId, planned]) => {
      const frozen = freezeLook(planned, hashes)
      const history = signOffs.filter((answer) => answer.lookId === lookId)
      const picturesOnWay = planned.look.pictureIds.filter((id) => !hashes.has(id)).length
      return [
        lookId,
        {
          planned,
          frozen,
          fingerprint: fingerprintOf(frozen),
          state: signOffState(history, frozen),
          history,
          picturesOnWay,
        },
      ]
    }),
  )
}

const NONE: ReadonlyMap<string, LookStanding> = new Map()

/** Where every look stands with the client, live. Empty until the server has answered once. */
export function useLookStandings(): LookStandings {
  const plan = usePlan()
  const { id } = useShoot()
  const { data, error } = useQuery({
    ...signOffQueries.ofShoot(id),
    refetchInterval: ({ state }) =>
      state.data !== undefined &&
      [...standingsOf(plan, state.data).values()].some(({ picturesOnWay }) => picturesOnWay > 0) &&
      LOOK_AGAIN_MS,
  })
  const standings = useMemo(() => (data ? standingsOf(plan, data) : NONE), [plan, data])
  return { standings, isKnown: data !== undefined, error }
}
