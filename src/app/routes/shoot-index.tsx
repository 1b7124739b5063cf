import { Navigate } from 'react-router-dom'

/** A shoot opens on its board. */
export function Component() {
  return <Navigate to="board" replace />
}
