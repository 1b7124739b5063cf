import { describe, expect, it } from 'vitest'
import { FACE_COLOURS, colourOf, initialsOf } from '#shared/domain/people/face.ts'

describe('initialsOf', () => {
  it.each([
    ['Maren Holt', 'MH'],
    ['  odile   van der Berg ', 'OB'],
    ['Ines', 'I'],
    ['élodie ångström', 'ÉÅ'],
    ['(Jo) O’Neil', 'JO'],
    ['ßara', 'ß'],
    ['3rd Hand', '3H'],
    ['… !', '?'],
    ['', '?'],
  ])('makes of "%s" %s', (name, initials) => {
    expect(initialsOf(name)).toBe(initials)
  })
})

/** WCAG 2.2, relative luminance and contrast ratio. */
function contrastWithWhite(colour: string): number {
  const linear = [1, 3, 5].map((at) => {
    const part = parseInt(colour.slice(at, at + 2), 16) / 255
    return part <= 0.04045 ? part / 12.92 : ((part + 0.055) / 1.055) ** 2.4
  })
  const luminance = 0.2126 * (linear[0] ?? 0) + 0.7152 * (linear[1] ?? 0) + 0.0722 * (linear[2] ?? 0)
  return 1.05 / (luminance + 0.05)
}

describe('FACE_COLOURS', () => {
  it('holds at least 8 different colours, most of them not led by red', () => {
    expect(new Set(FACE_COLOURS).size).toBeGreaterThanOrEqual(8)
    const red = FACE_COLOURS.filter(
      (c) => parseInt(c.slice(1, 3), 16) > Math.max(parseInt(c.slice(3, 5), 16), parseInt(c.slice(5, 7), 16)),
    )
    expect(red.length).toBeLessThanOrEqual(FACE_COLOURS.length / 2)
  })

  it.each(FACE_COLOURS)('carries white text at 4.5 to 1 or more: %s', (colour) => {
    expect(contrastWithWhite(colour)).toBeGreaterThanOrEqual(4.5)
  })
})

describe('colourOf', () => {
  it('is always the same colour for a person', () => {
    expect(colourOf('user-1')).toBe(colourOf('user-1'))
  })

  it('uses every colour over a thousand people', () => {
    const seen = new Set(Array.from({ length: 1000 }, (_, i) => colourOf(`user-${i}`)))
    expect(seen.size).toBe(FACE_COLOURS.length)
  })
})
