import { describe, expect, it } from 'vitest'
import { fromWallTime, toWallTime } from '#src/lib/zoned.ts'

// Offsets and changes of the clocks: IANA time zone database; Europe/London changes on the last Sundays of March and October at 01:00 UTC.
describe('fromWallTime', () => {
  it.each([
    ['2027-10-08T18:00', 'Europe/London', '2027-10-08T17:00Z'],
    ['2027-12-08T18:00', 'Europe/London', '2027-12-08T18:00Z'],
    ['2027-10-08T18:00', 'Asia/Kathmandu', '2027-10-08T12:15Z'],
    ['2027-10-08T01:00', 'Pacific/Auckland', '2027-10-07T12:00Z'],
    ['2027-01-08T00:30', 'America/St_Johns', '2027-01-08T04:00Z'],
  ])('reads %s in %s as %s', (wallTime, zone, instant) => {
    expect(fromWallTime(wallTime, zone)).toBe(Date.parse(instant))
  })

  it('reads a time that spring skips as the one an hour later', () => {
    const atMs = fromWallTime('2027-03-28T01:30', 'Europe/London')
    expect(toWallTime(atMs ?? 0, 'Europe/London')).toBe('2027-03-28T02:30')
  })

  it('reads a time that autumn has twice as the first', () => {
    expect(fromWallTime('2027-10-31T01:30', 'Europe/London')).toBe(Date.parse('2027-10-31T00:30Z'))
  })

  it.each(['', '2027-10-08', '2027-13-08T18:00'])('is null for “%s”', (text) => {
    expect(fromWallTime(text, 'Europe/London')).toBeNull()
  })
})

describe('toWallTime', () => {
  it('undoes fromWallTime at every hour of a year', () => {
    const zone = 'Europe/London'
    for (let atMs = Date.parse('2027-01-01T00:00Z'); atMs < Date.parse('2028-01-01T00:00Z'); atMs += 7 * 3_600_000) {
      const back = fromWallTime(toWallTime(atMs, zone), zone)
      expect(toWallTime(back ?? 0, zone)).toBe(toWallTime(atMs, zone))
    }
  })
})
