const ASKED = 'sconce:stay-stored'
let hasAsked = false

/**
 * Asks the browser, once on every device of somebody who edits, not to throw away what is kept here when it runs out of
 * room. Silently does without where there is no such thing.
 */
export function askToStayStored(): void {
  if (hasAsked) return
  hasAsked = true
  try {
    if (localStorage.getItem(ASKED) !== null) return
    localStorage.setItem(ASKED, '1')
  } catch {
    return
  }
  const storage = navigator.storage as StorageManager | undefined
  void storage?.persist?.().catch(() => false)
}
