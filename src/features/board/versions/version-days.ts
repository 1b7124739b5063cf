import type { Version } from '#shared/api/versions.ts'
import { shortDate } from '#src/lib/format.ts'
import { toWallTime } from '#src/lib/zoned.ts'

/** Above so many, a list is easier to read day by day. */
const LONG = 8

/** `title` is null for the one group of a short list. */
export type VersionDay = { date: string; title: string | null; versions: Version[] }

/** Versions in their order, newest first; a long list by days of the shoot's zone. */
export function versionDays(versions: readonly Version[], zone: string): VersionDay[] {
  if (versions.length <= LONG) return versions.length === 0 ? [] : [{ date: '', title: null, versions: [...versions] }]
  const days = new Map<string, VersionDay>()
  for (const version of versions) {
    const date = toWallTime(version.atMs, zone).slice(0, 10)
    const day = days.get(date) ?? { date, title: shortDate(date), versions: [] }
    days.set(date, day)
    day.versions.push(version)
  }
  return [...days.values()]
}

/** A name to begin with, "Board of Thu 14 Oct", that no version has. */
export function proposedName(versions: readonly Version[], civilDate: string): string {
  const names = new Set(versions.map(({ name }) => name))
  const name = `Board of ${shortDate(civilDate)}`
  for (let number = 2; names.has(name); number++) {
    const next = `${name}, ${number}`
    if (!names.has(next)) return next
  }
  return name
}
