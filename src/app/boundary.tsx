import { useQueryErrorResetBoundary } from '@tanstack/react-query'
import { Component, type ReactNode } from 'react'
import { useLocation } from 'react-router-dom'
import { ErrorView } from './error-view.tsx'

/**
 * Shows what went wrong in place of what is below; going to another address tries again. In a frame every address is a
 * screen of its own; around everything, frames and what they hold open (documents, undo) outlast a change of address.
 */
export function Boundary({ inFrame = false, children }: { inFrame?: boolean; children: ReactNode }) {
  const { reset } = useQueryErrorResetBoundary()
  const { pathname } = useLocation()
  return (
    <Catcher key={inFrame ? pathname : 'all'} at={pathname} inFrame={inFrame} onCatch={reset}>
      {children}
    </Catcher>
  )
}

type CatcherProps = { at: string; inFrame: boolean; onCatch: () => void; children: ReactNode }
type CatcherState = { at: string; error: unknown; hasFailed: boolean }

class Catcher extends Component<CatcherProps, CatcherState> {
  override state: CatcherState = { at: this.props.at, error: undefined, hasFailed: false }

  static getDerivedStateFromError(error: unknown): Partial<CatcherState> {
    return { error, hasFailed: true }
  }

  static getDerivedStateFromProps({ at }: CatcherProps, state: CatcherState): Partial<CatcherState> | null {
    return at === state.at ? null : { at, error: undefined, hasFailed: false }
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
