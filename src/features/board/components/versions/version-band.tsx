import { useQuery } from '@tanstack/react-query'
import { useState } from 'react'
import { Link, useNavigate } from 'react-router-dom'
import { canInShoot } from '#shared/access/roles.ts'
import type { Version } from '#shared/api/versions.ts'
import { shortInstant } from '#src/lib/format.ts'
import { useShoot } from '#src/realtime/shoot-realtime.tsx'
import { Button, buttonClass } from '#src/ui/button.tsx'
import { boardQueries } from '../../queries.ts'
import { TakeBackDialog } from './take-back-dialog.tsx'

/** Above a board that is looked at as it stood: which, and the two ways on. */
export function VersionBand({ kept }: { kept: Version }) {
  const shoot = useShoot()
  const navigate = useNavigate()
  const { data } = useQuery(boardQueries.versions(shoot.id))
  const [takingBack, setTakingBack] = useState(false)
  // It may have another name since.
  const version = data?.versions.find(({ id }) => id === kept.id) ?? kept
  const board = `/shoots/${shoot.id}/board`
  return (
    <section
      aria-label="Kept version"
      className="no-print flex flex-none flex-wrap items-center gap-x-3 gap-y-2 border-b border-glow bg-glow-wash px-6 py-2 max-md:px-[18px]"
    >
      <p role="status" className="min-w-0 flex-1 text-sm max-md:basis-full">
        You are looking at <b className="font-semibold">“{version.name}”</b>, kept by {version.by} on{' '}
        {shortInstant(version.atMs, shoot.brief.zone)}
      </p>
      {canInShoot(shoot.role, 'versions.write') && (
        <Button variant="primary" size="small" onClick={() => setTakingBack(true)}>
          Take it back
        </Button>
      )}
      <Link to={board} className={buttonClass('plain', 'small')}>
        Back to the board
      </Link>
      {takingBack && (
        <TakeBackDialog
          version={version}
          onClose={() => setTakingBack(false)}
          onTakenBack={() => void navigate(board)}
        />
      )}
    </section>
  )
}
