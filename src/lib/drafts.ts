/** What was typed and not taken by the server yet, kept on this device by person and place. */
const PREFIX = 'sconce:draft:'

export type Draft = Readonly<Record<string, string>>

export function readDraft(userId: string, place: string): Draft {
  try {
    const kept: unknown = JSON.parse(localStorage.getItem(`${PREFIX}${userId}:${place}`) ?? '{}')
    if (typeof kept !== 'object' || kept === null) return {}
    return Object.fromEntries(
      Object.entries(kept).filter((entry): entry is [string, string] => typeof entry[1] === 'string'),
    )
  } catch {
    return {}
  }
}

export function keepDraft(userId: string, place: string, draft: Draft): void {
  try {
    if (Object.keys(draft).length === 0) localStorage.removeItem(`${PREFIX}${userId}:${place}`)
    else localStorage.setItem(`${PREFIX}${userId}:${place}`, JSON.stringify(draft))
  } catch {
    // No room on this device: the words stay on the screen as long as it is open.
  }
}

export function forgetDrafts(userId: string): void {
  try {
    for (const key of Object.keys(localStorage)) if (key.startsWith(`${PREFIX}${userId}:`)) localStorage.removeItem(key)
  } catch {
    // Nothing could be kept here in the first place.
  }
}
