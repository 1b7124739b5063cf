import { describe, expect, it } from 'vitest'
import { briefSchema } from '#shared/domain/shoots/schema.ts'
import { changeOf, parseCoordinates, problemOf, toValues } from '#src/features/shoots/brief-fields.ts'

const brief = briefSchema.parse({
  title: 'Leaf, Brass & Star',
  zone: 'Europe/London',
  signOffByMs: Date.parse('2027-10-08T17:00Z'),
  location: { name: 'Tarn Fell Observatory', latitude: 54.601, longitude: -3.134, parking: 'By the gate' },
  rooms: [],
  deliverables: [],
})

describe('parseCoordinates', () => {
  it.each([
    ['54.601, -3.134', 54.601, -3.134],
    ['54.601 −3.134', 54.601, -3.134],
    ['54.601° N, 3.134° W', 54.601, -3.134],
    ['33.9 S; 18.4 E', -33.9, 18.4],
  ])('reads “%s”', (text, latitude, longitude) => {
    expect(parseCoordinates(text)).toEqual({ latitude, longitude })
  })

  it.each(['', '54.601', 'up the hill', '91, 0', '0, 181'])('is undefined for “%s”', (text) => {
    expect(parseCoordinates(text)).toBeUndefined()
  })
})

describe('toValues', () => {
  it('shows the deadline on the clock of the shoot, and coordinates as they are typed', () => {
    expect(toValues(brief)).toMatchObject({ signOffBy: '2027-10-08T18:00', coordinates: '54.601, -3.134', date: '' })
  })
})

describe('changeOf', () => {
  it('takes one field of the location and keeps the others', () => {
    expect(changeOf('coordinates', '55, -3', brief)).toEqual({
      kind: 'location',
      location: { ...brief.location, latitude: 55, longitude: -3 },
    })
  })

  it('reads the deadline on the clock of the shoot', () => {
    expect(changeOf('signOffBy', '2027-12-08T18:00', brief)).toEqual({
      kind: 'brief',
      patch: { signOffByMs: Date.parse('2027-12-08T18:00Z') },
    })
  })

  it('takes an emptied date away', () => {
    expect(changeOf('date', '', brief)).toEqual({ kind: 'brief', patch: { date: null } })
  })
})

describe('problemOf', () => {
  it('asks for a title and for coordinates that are a place', () => {
    expect(problemOf('title', ' ')).toBe('A shoot needs a title.')
    expect(problemOf('coordinates', 'up the hill')).toContain('latitude and longitude')
    expect(problemOf('coordinates', '')).toBeNull()
  })

  it('counts what is too long', () => {
    expect(problemOf('client', 'x'.repeat(121))).toBe('At most 120 characters; this has 121.')
  })
})
