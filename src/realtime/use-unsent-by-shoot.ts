import { useMemo, useSyncExternalStore } from 'react'
import { subscribeUnsent, unsentByCache } from './unsent-accounts.ts'

/** What of a shoot is on this device only, and goes to the server when the shoot is opened. */
export type UnsentOfShoot = { changes: number; pictures: number }

/** By shoot id; what was put aside is left out, because it is never sent. */
export function unsentByShoot(userId: string): Record<string, UnsentOfShoot> {
  const shoots: Record<string, UnsentOfShoot> = {}
  for (const [cache, { edits }] of unsentByCache(`rt:${userId}:`)) {
    const [, , shootId, kind, epoch] = cache.split(':')
    if (shootId === undefined || epoch === 'aside') continue
    const shoot = (shoots[shootId] ??= { changes: 0, pictures: 0 })
    shoot[kind === 'outbox' ? 'pictures' : 'changes'] += edits
  }
  return shoots
}

/** What this person has on this device only, live, in all pages. */
export function useUnsentByShoot(userId: string): Readonly<Record<string, UnsentOfShoot>> {
  // As text, which is equal as long as nothing changes.
  const text = useSyncExternalStore(subscribeUnsent, () => JSON.stringify(unsentByShoot(userId)))
  return useMemo(() => JSON.parse(text) as Record<string, UnsentOfShoot>, [text])
}
