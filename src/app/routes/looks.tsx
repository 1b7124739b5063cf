import { useMemo } from 'react'
import { LooksScreen } from '#src/features/looks/components/looks-screen.tsx'
import { useLookStandings } from '#src/features/sign-off/use-look-standings.ts'

export function Component() {
  const { standings } = useLookStandings()
  const signOffs = useMemo(() => new Map([...standings].map(([lookId, { state }]) => [lookId, state])), [standings])
  return <LooksScreen signOffs={signOffs} />
}
