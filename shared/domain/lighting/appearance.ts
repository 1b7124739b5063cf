import { converter, modeLab65, modeLrgb, modeRgb, useMode } from 'culori/fn'
import type { Appearance, SitterPlace } from './schema.ts'

/** Skin by its individual typology angle, from the lightest: the bounds of Chardon, Cretois and Hourseau (1991). */
export const SKIN_STEPS = [
  { words: 'very light', fromDeg: 55, typicalDeg: 60 },
  { words: 'light', fromDeg: 41, typicalDeg: 48 },
  { words: 'intermediate', fromDeg: 28, typicalDeg: 34 },
  { words: 'tan', fromDeg: 10, typicalDeg: 18 },
  { words: 'brown', fromDeg: -30, typicalDeg: -12 },
  { words: 'dark', fromDeg: -90, typicalDeg: -45 },
] as const

/** The word for a typology angle, degrees. */
export function skinWord(itaDeg: number): string {
  return SKIN_STEPS.find((step) => itaDeg > step.fromDeg)?.words ?? 'dark'
}

/** A small even number from an id: what tells one sitter's face from another's. */
export function seedOf(id: string): number {
  let h = 2166136261
  for (let i = 0; i < id.length; i++) h = Math.imul(h ^ id.charCodeAt(i), 16777619)
  return (h >>> 0) % 9973
}

const STYLES = ['short', 'knot', 'bob', 'curls', 'long', 'cropped'] as const
const HAIR_COLOURS = ['#2a1c14', '#17110d', '#4a2f1c', '#6b4526', '#3a2318', '#8a6a44'] as const

/** How somebody looks of whom nothing is written: a guess that stays the same for the same sitter. */
export function guessedAppearance(place: Pick<SitterPlace, 'id' | 'sitterId'>): Appearance {
  const seed = seedOf(place.sitterId ?? place.id)
  return {
    skinItaDeg: SKIN_STEPS[(seed >> 3) % SKIN_STEPS.length]?.typicalDeg ?? 34,
    hair: STYLES[seed % STYLES.length] ?? 'short',
    hairColour: HAIR_COLOURS[(seed >> 1) % HAIR_COLOURS.length] ?? '#2a1c14',
    cut: 'jumper',
    face: null,
    garmentColour: null,
  }
}

useMode(modeRgb)
useMode(modeLab65)
useMode(modeLrgb)
const toRgb = converter('lrgb')

/** Linear sRGB reflectance of `#rrggbb`. */
export function reflectedRgb(colour: string): [number, number, number] {
  const rgb = toRgb(colour)
  return rgb ? [rgb.r, rgb.g, rgb.b] : [0.18, 0.18, 0.18]
}

/**
 * Linear sRGB reflectance of skin of a typology angle, degrees. L* = 50 + b*·tan(ITA) by its definition; b* and a* run
 * through common values of light to dark skin (from memory).
 */
export function skinRgb(itaDeg: number): [number, number, number] {
  const t = Math.min(1, Math.max(0, (itaDeg + 60) / 120))
  const b = 12.5 + 8 * Math.sin(Math.PI * Math.min(1, t + 0.08)) + 4 * t
  const l = Math.min(80, Math.max(22, 50 + b * Math.tan((itaDeg * Math.PI) / 180)))
  const a = 10 + 4 * Math.sin(Math.PI * t) + 1.5 * t
  const rgb = toRgb({ mode: 'lab65', l, a, b })
  const most = (value: number) => Math.min(0.85, Math.max(0.012, value))
  return [most(rgb.r), most(rgb.g), most(rgb.b)]
}
