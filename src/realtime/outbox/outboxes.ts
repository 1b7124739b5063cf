import { writeUnsent } from '../unsent-accounts.ts'
import { type Outbox, createOutbox } from './outbox.ts'
import { memoryOutboxStore, openOutboxStore, outboxName } from './outbox-store.ts'
import { preparePicture } from './prepare-picture.ts'
import { sendUpload } from './send-upload.ts'

/** By database name; they live as long as the page: leaving a screen does not stop what is being sent. */
const outboxes = new Map<string, Outbox>()
/** People who have signed out: a screen of theirs that is drawn once more must not make a database anew. */
const signedOut = new Set<string>()

/** The one outbox of a person in a shoot. */
export function outboxOf(userId: string, shootId: string): Outbox {
  const name = outboxName(userId, shootId)
  const known = outboxes.get(name)
  if (known) return known
  const made = createOutbox({
    shootId,
    store: signedOut.has(userId) ? Promise.resolve(memoryOutboxStore()) : openOutboxStore(name),
    send: sendUpload,
    prepare: preparePicture,
    now: Date.now,
    random: Math.random,
    onCount: (count) => writeUnsent(name, count),
  })
  outboxes.set(name, made)
  const wakeWhenSeen = () => {
    if (document.visibilityState === 'visible') made.wake()
  }
  window.addEventListener('online', made.wake)
  window.addEventListener('pageshow', made.wake)
  document.addEventListener('visibilitychange', wakeWhenSeen)
  return made
}

/** Stops sending for a person who signs out; what was still waiting is about to be forgotten. */
export function closeOutboxes(userId: string): void {
  signedOut.add(userId)
  for (const [name, outbox] of outboxes) {
    if (!name.startsWith(`rt:${userId}:`)) continue
    outbox.destroy()
    outboxes.delete(name)
  }
}

/** This person is signed in (again): pictures are kept on the device from now on. */
export function allowOutboxes(userId: string): void {
  if (!signedOut.delete(userId)) return
  // Made while nothing could be kept.
  for (const name of outboxes.keys()) if (name.startsWith(`rt:${userId}:`)) outboxes.delete(name)
}
