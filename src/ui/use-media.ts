import { useCallback, useSyncExternalStore } from 'react'

/** Whether a media query holds, kept up to date. Where there is no screen (tests) it does not. */
export function useMedia(query: string): boolean {
  const subscribe = useCallback(
    (listener: () => void) => {
      if (typeof window.matchMedia !== 'function') return () => undefined
      const list = window.matchMedia(query)
      list.addEventListener('change', listener)
      return () => list.removeEventListener('change', listener)
    },
    [query],
  )
  return useSyncExternalStore(
    subscribe,
    () => typeof window.matchMedia === 'function' && window.matchMedia(query).matches,
  )
}

/** Narrow enough for the bottom bar; the same width as the style sheets' `md`. */
export function useIsPhone(): boolean {
  return useMedia('(max-width: 767.98px)')
}
