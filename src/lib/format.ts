const LOCALE = 'en-GB'

/** A civil date as an instant that `Intl` in UTC prints unchanged. */
function asUtc(civilDate: string): Date {
  return new Date(`${civilDate}T12:00:00Z`)
}

function civil(civilDate: string, options: Intl.DateTimeFormatOptions): string {
  return new Intl.DateTimeFormat(LOCALE, { ...options, timeZone: 'UTC' }).format(asUtc(civilDate)).replace(',', '')
}

/** "Thu 14 Oct" */
export function shortDate(civilDate: string): string {
  return civil(civilDate, { weekday: 'short', day: 'numeric', month: 'short' })
}

/** "14 Oct 2027" */
export function civilShort(civilDate: string): string {
  return civil(civilDate, { day: 'numeric', month: 'short', year: 'numeric' })
}

/** "Thursday 14 October 2027" */
export function longDate(civilDate: string): string {
  return civil(civilDate, { weekday: 'long', day: 'numeric', month: 'long', year: 'numeric' })
}

/** The parts of a date set large: day of the month, and "Oct, Thu". */
export function dateParts(civilDate: string): { day: string; rest: string; year: string } {
  return {
    day: civil(civilDate, { day: 'numeric' }),
    rest: `${civil(civilDate, { month: 'short' })}, ${civil(civilDate, { weekday: 'short' })}`,
    year: civil(civilDate, { year: 'numeric' }),
  }
}

/** "Fri 8 Oct, 18:00" in a zone; the browser's when none is given. */
export function shortInstant(atMs: number, zone?: string): string {
  const parts = new Intl.DateTimeFormat(LOCALE, {
    weekday: 'short',
    day: 'numeric',
    month: 'short',
    hour: '2-digit',
    minute: '2-digit',
    hourCycle: 'h23',
    ...(zone === undefined ? {} : { timeZone: zone }),
  })
  const part = new Map(parts.formatToParts(atMs).map(({ type, value }) => [type, value]))
  return `${part.get('weekday')} ${part.get('day')} ${part.get('month')}, ${part.get('hour')}:${part.get('minute')}`
}

/** The zone this browser keeps. */
export function browserZone(): string {
  return Intl.DateTimeFormat().resolvedOptions().timeZone || 'UTC'
}

/** Every zone this browser knows, with one that must be among them. */
export function zones(including: string): string[] {
  const known = Intl.supportedValuesOf('timeZone')
  return known.includes(including) ? known : [including, ...known]
}

/** "3 people", "1 person". */
export function count(number: number, one: string, many = `${one}s`): string {
  return `${number} ${number === 1 ? one : many}`
}

/** Today's civil date where this browser is, `YYYY-MM-DD`. */
export function today(): string {
  const now = new Date()
  return `${now.getFullYear()}-${String(now.getMonth() + 1).padStart(2, '0')}-${String(now.getDate()).padStart(2, '0')}`
}
