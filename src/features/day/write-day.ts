import { useMemo } from 'react'
import type { ShotState } from '#shared/domain/day/schema.ts'
import { wellFormed } from '#shared/domain/text.ts'
import { type ShotId, shotIdSchema } from '#shared/ids.ts'
import { upsertItem } from '#shared/realtime/collection.ts'
import { dayShots, ticks } from '#shared/realtime/documents.ts'
import { useDoc, useShootContext } from '#src/realtime/shoot-realtime.tsx'

/** How long a word why, a note or frame numbers may be. */
export const WHY_MAX = 300
export const NOTE_MAX = 2000
export const FRAMES_MAX = 200

export type DayWriter = {
  setState: (shotId: ShotId, state: ShotState, why?: string) => void
  setNote: (shotId: ShotId, note: string, frames: string) => void
  setTick: (shotId: ShotId, key: string, done: boolean) => void
}

/** Writes what happens into the day's document, as this person, now. */
export function useDayWriter(name: string): DayWriter {
  const doc = useDoc('day')
  const { userId } = useShootContext()
  return useMemo(
    () => ({
      setState(shotId, state, why) {
        const atMs = Date.now()
        const event = {
          state,
          atMs,
          by: userId,
          name,
          ...(why === undefined || why.trim() === '' ? {} : { why: wellFormed(why).slice(0, WHY_MAX) }),
        }
        upsertItem(doc, dayShots, {
          id: shotIdSchema.parse(shotId),
          event,
          ...(state === 'under way' ? { startedAtMs: atMs } : state === 'waiting' ? { startedAtMs: null } : {}),
        })
      },
      setNote(shotId, note, frames) {
        upsertItem(doc, dayShots, { id: shotId, note: note.slice(0, NOTE_MAX), frames: frames.slice(0, FRAMES_MAX) })
      },
      setTick(shotId, key, done) {
        upsertItem(doc, ticks, { id: tickId(shotId, key), done, by: userId, atMs: Date.now() })
      },
    }),
    [doc, userId, name],
  )
}

export function tickId(shotId: string, key: string): string {
  return `${shotId}:${key}`
}
