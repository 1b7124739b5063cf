import { DateTime } from 'luxon'
import { useEffect, useState } from 'react'

const EVERY_MS = 10_000

/** The present instant, ms; renewed every ten seconds and when the page is looked at again. */
export function useNow(): number {
  const [nowMs, setNowMs] = useState(() => Date.now())
  useEffect(() => {
    const renew = () => setNowMs(Date.now())
    const timer = setInterval(renew, EVERY_MS)
    document.addEventListener('visibilitychange', renew)
    return () => {
      clearInterval(timer)
      document.removeEventListener('visibilitychange', renew)
    }
  }, [])
  return nowMs
}

/** An instant as minutes since midnight of a civil date in a zone; whole days before and after go on counting. */
export function minuteOfDay(atMs: number, date: string, zone: string): number {
  return DateTime.fromMillis(atMs).diff(DateTime.fromISO(date, { zone }), 'minutes').minutes
}

/** Today's civil date in a zone. */
export function civilDate(atMs: number, zone: string): string {
  return DateTime.fromMillis(atMs, { zone }).toISODate() ?? ''
}
