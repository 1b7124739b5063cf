import { useSyncExternalStore } from 'react'
import { subscribeUnsent, unsentOnDevice } from './unsent-accounts.ts'

/** Own edits and pictures that only this device holds, live, in all pages; of everybody who uses it without an id. */
export function useUnsentOnDevice(userId?: string): number {
  return useSyncExternalStore(subscribeUnsent, () => unsentOnDevice(userId))
}
