import { useEffect, useMemo, useSyncExternalStore } from 'react'
import { patchItem, readAll } from '#shared/realtime/collection.ts'
import { frames } from '#shared/realtime/documents.ts'
import { useDoc, useMayWrite, useShootContext } from '../shoot-realtime.tsx'
import type { Outbox, OutboxItem } from './outbox.ts'
import { outboxOf } from './outboxes.ts'

/** What a picture's way to the server writes into a document: never undone with a person's own steps. */
const SETTLE_ORIGIN = Object.freeze({ kind: 'picture-settled' as const })

export type OutboxView = Pick<Outbox, 'add' | 'retry' | 'giveUp'> & { items: readonly OutboxItem[] }

/** The open shoot's pictures on their way to the server, with progress, and how to add to them. */
export function useOutbox(): OutboxView {
  const { shoot, userId } = useShootContext()
  const outbox = outboxOf(userId, shoot.id)
  const items = useSyncExternalStore(outbox.items.subscribe, outbox.items.get)
  return useMemo(() => ({ items, add: outbox.add, retry: outbox.retry, giveUp: outbox.giveUp }), [items, outbox])
}

/** Address of a picture on this device while it is not on the server yet. */
export function useLocalPicture(uploadId: string): string | undefined {
  const { shoot, userId } = useShootContext()
  const { items } = outboxOf(userId, shoot.id)
  return useSyncExternalStore(items.subscribe, () => items.get().find((item) => item.uploadId === uploadId)?.localUrl)
}

/**
 * Writes what became of each picture into the frames that show it: state, palette, exposure. Stands once above all
 * screens of the shoot, so that it does not matter which one is open when a picture arrives.
 */
export function useSettlePictures(): void {
  const { shoot, userId } = useShootContext()
  const doc = useDoc('board')
  const mayWrite = useMayWrite('board')
  const shootId = shoot.id
  useEffect(() => {
    // What is settled meanwhile is heard by whoever listens next.
    if (!mayWrite) return
    return outboxOf(userId, shootId).onSettled((uploadId, settled) => {
      for (const frame of readAll(doc, frames).items.values()) {
        if (frame.picture.uploadId !== uploadId) continue
        const { why: _why, ...picture } = frame.picture
        if (settled.state === 'stored') {
          const { palette, exposure, widthPx, heightPx } = settled.upload
          patchItem(
            doc,
            frames,
            frame.id,
            {
              picture: { ...picture, state: 'stored', widthPx, heightPx },
              ...(frame.palette.length === 0 ? { palette } : {}),
              ...(frame.exposure === '' ? { exposure } : {}),
            },
            SETTLE_ORIGIN,
          )
        } else {
          const why = settled.state === 'refused' ? { why: settled.why.slice(0, 300) } : {}
          patchItem(doc, frames, frame.id, { picture: { ...picture, state: settled.state, ...why } }, SETTLE_ORIGIN)
        }
      }
    })
  }, [userId, shootId, doc, mayWrite])
}
