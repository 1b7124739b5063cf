import { clockLabel } from '#shared/domain/order/clock.ts'
import type { DaySchedule, ScheduledShot } from '#shared/domain/order/schedule-types.ts'
import { changeWords } from './words.ts'

type Span = { startMin: number; endMin: number }

/** A stretch of the day as it is drawn: pictures, what lies between them, the meal, and waiting for a fixed time. */
export type Segment = Span &
  (
    | { kind: 'shot'; scheduled: ScheduledShot }
    | { kind: 'change'; tone: 'glow' | 'draft'; words: string; scheduled: ScheduledShot }
    | { kind: 'meal' }
    | { kind: 'wait'; words: string; scheduled: ScheduledShot }
  )

/** The day from lights-on to wrap without gaps; stretches of no minutes are left out. */
export function segmentsOf(day: DaySchedule): Segment[] {
  let at = day.lightsOnMin
  return day.shots.flatMap((scheduled): Segment[] => {
    const segments: Segment[] = []
    if (scheduled.mealBefore) {
      segments.push({ kind: 'meal', ...scheduled.mealBefore })
      at = scheduled.mealBefore.endMin
    }
    const { changeover } = scheduled
    const readyMin = scheduled.startMin - changeover.holdWaitMin
    const tone = changeover.setMove ? 'draft' : 'glow'
    if (readyMin > at)
      segments.push({ kind: 'change', tone, words: changeWords(changeover), scheduled, startMin: at, endMin: readyMin })
    if (scheduled.startMin > Math.max(at, readyMin)) {
      const words = `Wait until ${clockLabel(scheduled.startMin)}`
      segments.push({ kind: 'wait', words, scheduled, startMin: Math.max(at, readyMin), endMin: scheduled.startMin })
    }
    segments.push({ kind: 'shot', scheduled, startMin: scheduled.startMin, endMin: scheduled.endMin })
    at = scheduled.endMin
    return segments
  })
}

/** Tops of labels beside the day, none over another: each as near to its place as those above it allow. Pixels. */
export function spreadLabels(wantedPx: readonly number[], heightPx: number): number[] {
  let bottom = 0
  return wantedPx.map((wanted) => {
    const top = Math.max(wanted, bottom)
    bottom = top + heightPx
    return top
  })
}
