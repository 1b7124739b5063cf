import { useQuery } from '@tanstack/react-query'
import { Link } from 'react-router-dom'
import { ApiError } from '#src/lib/api.ts'
import { useShoot } from '#src/realtime/shoot-realtime.tsx'
import { buttonClass } from '#src/ui/button.tsx'
import { Empty } from '#src/ui/empty.tsx'
import { Waiting } from '#src/ui/waiting.tsx'
import { boardQueries } from '../../queries.ts'
import { usePastBoard } from '../../versions/use-past-board.ts'
import { BoardView } from '../board-screen.tsx'
import { VersionBand } from './version-band.tsx'

const NOTHING_DONE = { canUndo: false, canRedo: false }

/** The board as a kept version has it: everything to be seen, nothing to be changed. */
export function BoardVersionScreen({ versionId }: { versionId: string }) {
  const shoot = useShoot()
  const { data, error } = useQuery({
    ...boardQueries.version(shoot.id, versionId),
    throwOnError: (thrown, { state }) => state.data === undefined && !isNotFound(thrown),
  })
  if (data) return <PastBoard versionId={versionId} />
  if (!error) return <Waiting />
  return (
    <Empty
      title="This version is not here"
      action={
        <Link to={`/shoots/${shoot.id}/board`} className={buttonClass('primary')}>
          Back to the board
        </Link>
      }
    >
      {error.message}
    </Empty>
  )
}

function isNotFound(error: unknown): boolean {
  return error instanceof ApiError && error.code === 'NOT_FOUND'
}

function PastBoard({ versionId }: { versionId: string }) {
  const { version, ...board } = usePastBoard(versionId)
  return (
    <div className="flex h-full flex-col">
      <VersionBand kept={version} />
      <div className="min-h-0 flex-1">
        <BoardView {...board} mayWrite={false} undo={NOTHING_DONE} />
      </div>
    </div>
  )
}
