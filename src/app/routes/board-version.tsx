import { useParams } from 'react-router-dom'
import { BoardVersionScreen } from '#src/features/board/components/versions/board-version-screen.tsx'

export function Component() {
  const { versionId = '' } = useParams()
  return <BoardVersionScreen key={versionId} versionId={versionId} />
}
