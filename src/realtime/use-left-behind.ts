import { useMemo, useSyncExternalStore } from 'react'
import { type LeftBehind, leftBehind } from './left-behind.ts'
import { subscribeUnsent } from './unsent-accounts.ts'

/** What this person has in a shoot that can no longer be sent, live; see `leftBehind`. */
export function useLeftBehind(
  userId: string,
  shootId: string,
  epochs: Readonly<Record<string, number>> | null,
): readonly LeftBehind[] {
  // As text, which is equal as long as nothing changes.
  const text = useSyncExternalStore(subscribeUnsent, () => JSON.stringify(leftBehind(userId, shootId, epochs)))
  return useMemo(() => JSON.parse(text) as LeftBehind[], [text])
}
