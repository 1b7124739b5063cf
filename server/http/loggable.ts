/**
 * An error as it may stand in a log. A failed query carries its parameters in its message, which are people's words
 * and addresses; only the statement and the database's own reason are kept.
 */
export function loggable(error: unknown): {
  message: string
  code?: string
  query?: string
  stack?: string | undefined
} {
  if (!(error instanceof Error)) return { message: typeof error }
  const code = 'code' in error && typeof error.code === 'string' ? { code: error.code } : {}
  if ('query' in error && typeof error.query === 'string') {
    const { message, stack, ...reason } = loggable(error.cause)
    return { message, ...code, ...reason, query: error.query, stack }
  }
  return { message: error.message, ...code, stack: error.stack }
}
