/**
 * Words that are typed but not yet taken over by what keeps them. The save sign counts them as unsaved, and a page that
 * is hidden or goes away takes them over first.
 */
const held = new Set<() => void>()
const listeners = new Set<() => void>()

function tell(): void {
  for (const listener of listeners) listener()
}

/** Says that something waits; `takeOver` is called when the page goes away. Returns how to say that it no longer does. */
export function holdTyping(takeOver: () => void): () => void {
  held.add(takeOver)
  tell()
  return () => {
    if (held.delete(takeOver)) tell()
  }
}

export const typingStore = {
  subscribe(listener: () => void): () => void {
    listeners.add(listener)
    return () => listeners.delete(listener)
  },
  isTyping: (): boolean => held.size > 0,
}

/** Takes over what is typed everywhere: the page, or what keeps the words, goes away. An error of one field stops no other. */
export function takeAllOver(): void {
  for (const takeOver of [...held]) {
    try {
      takeOver()
    } catch (error) {
      reportError(error)
    }
  }
}

if (typeof window !== 'undefined') {
  window.addEventListener('pagehide', takeAllOver)
  document.addEventListener('visibilitychange', () => {
    if (document.visibilityState === 'hidden') takeAllOver()
  })
}
