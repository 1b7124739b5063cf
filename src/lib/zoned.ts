/** Minutes a zone's clock is ahead of UTC at an instant. */
function offsetMin(atMs: number, zone: string): number {
  const parts = new Intl.DateTimeFormat('en-GB', {
    timeZone: zone,
    year: 'numeric',
    month: 'numeric',
    day: 'numeric',
    hour: 'numeric',
    minute: 'numeric',
    second: 'numeric',
    hourCycle: 'h23',
  })
  const part = new Map(parts.formatToParts(atMs).map(({ type, value }) => [type, Number(value)]))
  const of = (type: Intl.DateTimeFormatPartTypes) => part.get(type) ?? 0
  const asUtc = Date.UTC(of('year'), of('month') - 1, of('day'), of('hour'), of('minute'), of('second'))
  return Math.round((asUtc - Math.floor(atMs / 1000) * 1000) / 60_000)
}

/** "2027-10-08T18:00" on a zone's clock, for a control that knows no zones. */
export function toWallTime(atMs: number, zone: string): string {
  return new Date(atMs + offsetMin(atMs, zone) * 60_000).toISOString().slice(0, 16)
}

/**
 * The instant at which a zone's clock shows "2027-10-08T18:00", ms since 1970 UTC. A time that the clocks skip in
 * spring is read as the time an hour later; one they show twice in autumn as the first. Null when it is no time.
 */
export function fromWallTime(wallTime: string, zone: string): number | null {
  const asUtcMs = Date.parse(`${wallTime}:00Z`)
  if (!/^\d{4}-\d{2}-\d{2}T\d{2}:\d{2}$/.test(wallTime) || Number.isNaN(asUtcMs)) return null
  const before = asUtcMs - offsetMin(asUtcMs - 86_400_000, zone) * 60_000
  const after = asUtcMs - offsetMin(asUtcMs + 86_400_000, zone) * 60_000
  const fits = [before, after].sort((a, b) => a - b).find((atMs) => toWallTime(atMs, zone) === wallTime)
  return fits ?? before
}
