import { describe, expect, it } from 'vitest'
import { converter } from 'culori'
import {
  SKIN_STEPS,
  guessedAppearance,
  reflectedRgb,
  seedOf,
  skinRgb,
  skinWord,
} from '#shared/domain/lighting/appearance.ts'
import { appearanceSchema, sitterPlaceSchema } from '#shared/domain/lighting/schema.ts'
import { id } from '#tests/support/lighting-sample.ts'

describe('skinWord', () => {
  it('parts the scale where Chardon et al. (1991) do', () => {
    const words = [56, 54, 42, 40, 29, 27, 11, 9, -29, -31].map(skinWord)
    expect(words).toEqual([
      'very light',
      'light',
      'light',
      'intermediate',
      'intermediate',
      'tan',
      'tan',
      'brown',
      'brown',
      'dark',
    ])
  })
})

describe('skinRgb', () => {
  it('has the typology angle it was asked for: atan((L* − 50)/b*)', () => {
    const lab = converter('lab65')
    for (const { typicalDeg } of SKIN_STEPS) {
      const [r, g, b] = skinRgb(typicalDeg)
      const { l, b: yellow } = lab({ mode: 'lrgb', r, g, b })
      expect(Math.abs((Math.atan2(l - 50, yellow) * 180) / Math.PI - typicalDeg)).toBeLessThan(1.5)
      expect(r).toBeGreaterThan(g)
      expect(g).toBeGreaterThan(b)
    }
  })

  it('goes from light to dark without a break', () => {
    let last = Infinity
    for (let ita = 80; ita >= -70; ita -= 1) {
      const [, g] = skinRgb(ita)
      expect(g).toBeLessThanOrEqual(last + 1e-9)
      last = g
    }
  })
})

describe('guessedAppearance', () => {
  it('is valid and stays the same for the same sitter at another place', () => {
    const place = (n: number) =>
      sitterPlaceSchema.parse({ id: id(n), setupId: id(1), sitterId: id(77), at: [0, 0], eyeHeightM: 1.5 })
    expect(guessedAppearance(place(1))).toEqual(guessedAppearance(place(2)))
    for (let n = 0; n < 60; n++) {
      const guess = guessedAppearance({ ...place(n), sitterId: null })
      expect(appearanceSchema.parse(guess)).toEqual(guess)
    }
  })
})

describe('seedOf and reflectedRgb', () => {
  it('are plain functions of their text', () => {
    expect(seedOf('a')).toBe(seedOf('a'))
    expect(seedOf('a')).not.toBe(seedOf('b'))
    expect(reflectedRgb('#ffffff')).toEqual([1, 1, 1])
    // #808080 is .2159 linear (IEC 61966-2-1).
    expect(reflectedRgb('#808080')[0]).toBeCloseTo(0.2159, 4)
  })
})
