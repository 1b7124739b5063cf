import { forgetPerson } from './local-cache.ts'
import { allowOutboxes, closeOutboxes } from './outbox/outboxes.ts'

const CHANNEL = 'sconce:sign-out'

/** Calls back when this person has signed out, in whatever tab: an open document would block the deletion of its cache. */
export function listenForSignOut(userId: string, onSignOut: () => void): () => void {
  allowOutboxes(userId)
  if (!('BroadcastChannel' in window)) return () => undefined
  const channel = new BroadcastChannel(CHANNEL)
  channel.onmessage = (event: MessageEvent<unknown>) => {
    if (event.data !== userId) return
    closeOutboxes(userId)
    onSignOut()
  }
  return () => channel.close()
}

/**
 * Signs out of this device: the session ends on the server, other tabs let go, then everything of this person is
 * forgotten here. Ask first when `unsentOnDevice` is not zero; leave the shoot's screen before calling.
 */
export async function signOutOfDevice(userId: string, endSession: () => Promise<void>): Promise<void> {
  await endSession()
  if ('BroadcastChannel' in window) {
    const channel = new BroadcastChannel(CHANNEL)
    channel.postMessage(userId)
    channel.close()
  }
  closeOutboxes(userId)
  await forgetPerson(userId)
}
