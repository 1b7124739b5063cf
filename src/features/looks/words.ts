import type { Piece, Sitter } from '#shared/domain/looks/schema.ts'
import type { Plan } from '#shared/domain/plan/read-plan.ts'
import { deltaE2000, labOf } from '#shared/domain/board/colour.ts'
import { shortDate } from '#src/lib/format.ts'

/** "09:00" of minutes since midnight; past midnight the clock begins again. */
export function clockOf(minutes: number): string {
  return `${String(Math.floor(minutes / 60) % 24).padStart(2, '0')}:${String(minutes % 60).padStart(2, '0')}`
}

/** Minutes since midnight of "09:00"; null when it is no time. */
export function minutesOf(clock: string): number | null {
  const match = /^(\d{1,2}):(\d{2})/.exec(clock)
  return match?.[1] && match[2] ? Number(match[1]) * 60 + Number(match[2]) : null
}

/** "here 09:00 to 15:00 · 40 min in the chair" */
export function sitterLine({ hours, chairMin }: Sitter): string {
  const here = hours === null ? 'here all day' : `here ${clockOf(hours[0])} to ${clockOf(hours[1])}`
  return chairMin > 0 ? `${here} · ${chairMin} min in the chair` : here
}

/** Whom they play, or who they are. */
export function sitterTitle(sitter: Sitter | null): string {
  return sitter ? sitter.character || sitter.name : 'Without a sitter'
}

const OPEN_STATUSES: readonly Piece['status'][] = ['to buy', 'to make', 'idea']

/** Whether somebody still has to do something before it can be worn, or it is late going back. */
export function isPieceDue(piece: Piece, today: string): boolean {
  return OPEN_STATUSES.includes(piece.status) || isLate(piece, today)
}

export function isLate({ dueBack, status }: Piece, today: string): boolean {
  return dueBack !== null && status !== 'returned' && dueBack < today
}

/** "Sat 16 Oct", with "late" when the day is over and the piece is not back. */
export function backBy(piece: Piece, today: string): string {
  if (piece.dueBack === null) return ''
  return isLate(piece, today) ? `${shortDate(piece.dueBack)}, late` : shortDate(piece.dueBack)
}

/** Pieces that need somebody first, then by the day they go back, then by name. */
export function byUrgency(today: string): (a: Piece, b: Piece) => number {
  return (a, b) =>
    Number(isPieceDue(b, today)) - Number(isPieceDue(a, today)) ||
    (a.dueBack ?? '9999').localeCompare(b.dueBack ?? '9999') ||
    a.name.localeCompare(b.name)
}

/** Below this a garment and the wall behind it run into each other in a picture; common practice, no source. */
const MERGES_BELOW = 6

/** "Close to the colour of the dome (ΔE 4): it may merge"; empty when it stands out from every set it is seen in. */
export function mergeWarning(piece: Piece, plan: Plan): string {
  const lab = piece.colour === null ? null : labOf(piece.colour)
  if (!lab) return ''
  for (const { set, looks } of plan.shots.values()) {
    if (!set?.colour || !looks.some(({ look }) => look.pieceIds.includes(piece.id))) continue
    const wall = labOf(set.colour)
    const apart = wall ? deltaE2000(lab, wall) : Infinity
    if (apart < MERGES_BELOW)
      return `Close to the colour of “${set.name}” (ΔE ${apart.toFixed(0)}): it may merge with it`
  }
  return ''
}

/** Civil date of an instant on a zone's calendar, `YYYY-MM-DD`. */
export function civilDateIn(zone: string, atMs: number): string {
  const parts = new Intl.DateTimeFormat('en-CA', { timeZone: zone, year: 'numeric', month: '2-digit', day: '2-digit' })
  return parts.format(atMs)
}

/** "120.00 GBP" of minor units; currencies without them (yen) come out whole. */
export function moneyWords({ minor, currency }: { minor: number; currency: string }): string {
  const digits = currencyDigits(currency)
  return `${(minor / 10 ** digits).toFixed(digits)} ${currency}`
}

/** Digits behind the point of a currency, as the browser knows it. */
export function currencyDigits(currency: string): number {
  try {
    return new Intl.NumberFormat('en-GB', { style: 'currency', currency }).resolvedOptions().maximumFractionDigits ?? 2
  } catch {
    return 2
  }
}
