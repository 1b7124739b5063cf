import type { Brief, Location } from '#shared/domain/shoots/schema.ts'
import { zoneSchema } from '#shared/domain/shoots/schema.ts'
import { fromWallTime, toWallTime } from '#src/lib/zoned.ts'
import type { BriefChange } from './mutations.ts'

/** The brief's single fields as they are typed. */
export const BRIEF_FIELDS = [
  'title',
  'client',
  'idea',
  'usage',
  'date',
  'zone',
  'signOffBy',
  'place',
  'address',
  'coordinates',
  'parking',
  'access',
] as const
export type BriefField = (typeof BRIEF_FIELDS)[number]
export type BriefValues = Record<BriefField, string>

export function toValues(brief: Brief): BriefValues {
  const { location } = brief
  return {
    title: brief.title,
    client: brief.client,
    idea: brief.idea,
    usage: brief.usage,
    date: brief.date ?? '',
    zone: brief.zone,
    signOffBy: brief.signOffByMs === null ? '' : toWallTime(brief.signOffByMs, brief.zone),
    place: location.name,
    address: location.address,
    coordinates:
      location.latitude === null || location.longitude === null ? '' : `${location.latitude}, ${location.longitude}`,
    parking: location.parking,
    access: location.access,
  }
}

/** Reads "54.601, -3.134", with or without degree signs and compass letters. Undefined when it is no place on earth. */
export function parseCoordinates(text: string): { latitude: number; longitude: number } | undefined {
  const match = /^\s*([+-−]?\d+(?:\.\d+)?)\s*°?\s*([NS])?\s*[,;\s]\s*([+-−]?\d+(?:\.\d+)?)\s*°?\s*([EW])?\s*$/iu.exec(
    text,
  )
  if (!match) return undefined
  const signed = (digits: string, letter: string | undefined) =>
    Number(digits.replace('−', '-')) * (letter && /[SW]/i.test(letter) ? -1 : 1)
  const latitude = signed(match[1] ?? '', match[2])
  const longitude = signed(match[3] ?? '', match[4])
  return Math.abs(latitude) <= 90 && Math.abs(longitude) <= 180 ? { latitude, longitude } : undefined
}

const LONGEST: Readonly<Record<BriefField, number>> = {
  title: 120,
  client: 120,
  idea: 4000,
  usage: 1000,
  date: 10,
  zone: 64,
  signOffBy: 16,
  place: 120,
  address: 400,
  coordinates: 60,
  parking: 500,
  access: 1000,
}

/** What is wrong with a value, in a sentence; null when nothing is. */
export function problemOf(field: BriefField, value: string): string | null {
  if (value.length > LONGEST[field]) return `At most ${LONGEST[field]} characters; this has ${value.length}.`
  switch (field) {
    case 'title':
      return value.trim() === '' ? 'A shoot needs a title.' : null
    case 'zone':
      return zoneSchema.safeParse(value).success ? null : 'This time zone is not known; use a name like Europe/London.'
    case 'coordinates':
      return value.trim() === '' || parseCoordinates(value)
        ? null
        : 'Write latitude and longitude in degrees, like 54.601, -3.134.'
    default:
      return null
  }
}

function inLocation(location: Location, field: BriefField, value: string): Location {
  switch (field) {
    case 'place':
      return { ...location, name: value }
    case 'coordinates': {
      const at = parseCoordinates(value)
      return { ...location, latitude: at?.latitude ?? null, longitude: at?.longitude ?? null }
    }
    default:
      return { ...location, [field]: value }
  }
}

/** The change that takes one field to the server. */
export function changeOf(field: BriefField, value: string, brief: Brief): BriefChange {
  switch (field) {
    case 'date':
      return { kind: 'brief', patch: { date: value === '' ? null : value } }
    case 'signOffBy':
      return { kind: 'brief', patch: { signOffByMs: fromWallTime(value, brief.zone) } }
    case 'title':
    case 'client':
    case 'idea':
    case 'usage':
    case 'zone':
      return { kind: 'brief', patch: { [field]: value } }
    case 'place':
    case 'address':
    case 'coordinates':
    case 'parking':
    case 'access':
      return { kind: 'location', location: inLocation(brief.location, field, value) }
  }
}
