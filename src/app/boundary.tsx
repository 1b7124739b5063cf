import { useQueryErrorResetBoundary } from '@tanstack/react-query'
import { Component, type ReactNode } from 'react'
import { useLocation } from 'react-router-dom'
import { ErrorView } from './error-view.tsx'

/** Shows what went wrong in place of a screen; going to another address tries again. */
export function Boundary({ inFrame = false, children }: { inFrame?: boolean; children: ReactNode }) {
  const { reset } = useQueryErrorResetBoundary()
  const { pathname } = useLocation()
  return (
    <Catcher key={pathname} inFrame={inFrame} onCatch={reset}>
      {children}
    </Catcher>
  )
}

type CatcherProps = { inFrame: boolean; onCatch: () => void; children: ReactNode }

class Catcher extends Component<CatcherProps, { error: unknown; hasFailed: boolean }> {
  override state = { error: undefined, hasFailed: false }

  static getDerivedStateFromError(error: unknown) {
    return { error, hasFailed: true }
  }

  // Queries that failed are asked again by whatever is shown next.
  override componentDidCatch() {
    this.props.onCatch()
  }

  override render() {
    return this.state.hasFailed ? (
      <ErrorView error={this.state.error} inFrame={this.props.inFrame} />
    ) : (
      this.props.children
    )
  }
}
