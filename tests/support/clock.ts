/** A clock that stands until it is moved. */
export type Clock = { now: () => Date; advanceMs: (ms: number) => void }

export function clockAt(start = '2026-12-01T09:00:00Z'): Clock {
  let atMs = Date.parse(start)
  return { now: () => new Date(atMs), advanceMs: (ms) => void (atMs += ms) }
}
