import { forgetPerson } from './local-cache.ts'
import { closeOutboxes } from './outbox/outboxes.ts'

const CHANNEL = 'sconce:sign-out'

/** Calls back when another tab signs this person out: an open document would block the deletion of its cache. */
export function listenForSignOut(userId: string, onSignOut: () => void): () => void {
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
 * Signs out of this device: other tabs let go, the session ends on the server, then everything of this person is
 * forgotten here. Ask first when `unsentOnDevice` is not zero; leave the shoot's screen before calling.
 */
export async function signOutOfDevice(userId: string, endSession: () => Promise<void>): Promise<void> {
  if ('BroadcastChannel' in window) {
    const channel = new BroadcastChannel(CHANNEL)
    channel.postMessage(userId)
    channel.close()
  }
  await endSession()
  closeOutboxes(userId)
  await forgetPerson(userId)
}
