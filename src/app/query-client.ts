import { MutationCache, QueryCache, QueryClient } from '@tanstack/react-query'
import { ApiError } from '#src/lib/api.ts'
import { toast } from '#src/ui/toast.ts'

/** A mutation whose screen shows its refusal itself says `meta: { shown: true }`; every other refusal becomes a message. */
export function createQueryClient(onSignedOut: () => void): QueryClient {
  const handleError = (error: unknown, isShown: boolean) => {
    if (isShown) return
    if (error instanceof ApiError && error.code === 'SIGNED_OUT') onSignedOut()
    else toast.error(wordsFor(error))
  }
  return new QueryClient({
    queryCache: new QueryCache({
      // The first answer's failure is the screen's to show; a later one must not pass unseen, except for lack of signal, which the save sign tells.
      onError: (error, query) =>
        handleError(error, !isSignedOut(error) && (query.state.data === undefined || isAway(error))),
    }),
    mutationCache: new MutationCache({
      onError: (error, _variables, _context, mutation) => handleError(error, mutation.meta?.['shown'] === true),
    }),
    defaultOptions: {
      queries: {
        staleTime: 10_000,
        retry: (failures, error) => failures < 2 && navigator.onLine && !(error instanceof ApiError && !isAway(error)),
        networkMode: 'always',
        // What was shown meanwhile may have come from this device.
        refetchOnReconnect: 'always',
      },
      mutations: { networkMode: 'always' },
    },
  })
}

function isSignedOut(error: unknown): boolean {
  return error instanceof ApiError && error.code === 'SIGNED_OUT'
}

function isAway(error: unknown): boolean {
  return error instanceof ApiError && (error.code === 'OFFLINE' || error.code === 'STARTING')
}

/** A refusal in a sentence. */
export function wordsFor(error: unknown): string {
  return error instanceof ApiError
    ? error.message
    : 'Something on this page went wrong. What you typed is still here; load the page again if it stays.'
}
