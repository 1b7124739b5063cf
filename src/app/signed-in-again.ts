import { useQueryClient } from '@tanstack/react-query'
import { useNavigate } from 'react-router-dom'

/** An address inside Sconce, or the start page: a letter cannot send anybody elsewhere. */
export function safePath(to: string | null): string {
  return to !== null && /^\/(?![/\\])/.test(to) ? to : '/'
}

/** Forgets what the service worker would answer without a signal: it may be for the person of before. Never rejects. */
export async function forgetAnswers(): Promise<void> {
  // Not on pages over plain http, nor in some private windows.
  if ('caches' in globalThis) await caches.delete('sconce-data').catch(() => false)
}

/** Goes on as the person who has just signed in: nothing of who was here before stays. */
export function useGoOn(): (to: string | null) => void {
  const queryClient = useQueryClient()
  const navigate = useNavigate()
  return (to) => {
    void forgetAnswers().then(() => {
      // An invitation that has just been used is not asked for again.
      queryClient.removeQueries({ predicate: ({ queryKey }) => queryKey[0] !== 'invitations' })
      void navigate(safePath(to), { replace: true })
    })
  }
}
