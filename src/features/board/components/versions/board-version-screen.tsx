import { usePastBoard } from '../../versions/use-past-board.ts'
import { BoardView } from '../board-screen.tsx'
import { VersionBand } from './version-band.tsx'

const NOTHING_DONE = { canUndo: false, canRedo: false }

/** The board as a kept version has it: everything to be seen, nothing to be changed. */
export function BoardVersionScreen({ versionId }: { versionId: string }) {
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
