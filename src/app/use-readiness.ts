import { useQuery } from '@tanstack/react-query'
import { useEffect, useMemo, useState } from 'react'
import type { Readiness } from '#shared/domain/shoots/readiness.ts'
import { dayShots, frames } from '#shared/realtime/documents.ts'
import { signOffQueries } from '#src/features/sign-off/queries.ts'
import { useShoot } from '#src/realtime/shoot-realtime.tsx'
import { useItems } from '#src/realtime/use-items.ts'
import { usePlan } from '#src/realtime/use-plan.ts'
import type { readinessOfShoot as ReadinessOfShoot } from './readiness-of-shoot.ts'

/** Light and order are worked out by a good deal of code: it comes after the screen itself. */
const computation = () => import('./readiness-of-shoot.ts')

/** The lamps of the open shoot, live; none for a moment, until the way to work them out has come. */
export function useReadiness(): readonly Readiness[] {
  const plan = usePlan()
  const boardFrames = useItems('board', frames)
  const events = useItems('day', dayShots)
  const { data: signOffs } = useQuery(signOffQueries.ofShoot(useShoot().id))
  const [compute, setCompute] = useState<typeof ReadinessOfShoot | null>(null)
  useEffect(() => {
    let isShown = true
    computation().then(
      ({ readinessOfShoot }) => isShown && setCompute(() => readinessOfShoot),
      // Not fetched for want of a signal: the sections are there without their lamps.
      () => undefined,
    )
    return () => {
      isShown = false
    }
  }, [])
  return useMemo(
    () => compute?.({ plan, frames: boardFrames, dayShots: events, signOffs }) ?? [],
    [compute, plan, boardFrames, events, signOffs],
  )
}
