import { minus } from './geometry.ts'
import type { Light, LightPurpose, Point } from './schema.ts'

/** Third stops as cameras and meters print them, from 2^(−1/2) up: index 3 is f/1. Labels, not values. */
const NOMINAL_F_NUMBERS = [
  '0.7',
  '0.8',
  '0.9',
  '1',
  '1.1',
  '1.2',
  '1.4',
  '1.6',
  '1.8',
  '2',
  '2.2',
  '2.5',
  '2.8',
  '3.2',
  '3.5',
  '4',
  '4.5',
  '5',
  '5.6',
  '6.3',
  '7.1',
  '8',
  '9',
  '10',
  '11',
  '13',
  '14',
  '16',
  '18',
  '20',
  '22',
  '25',
  '29',
  '32',
  '36',
  '40',
  '45',
  '51',
  '57',
  '64',
  '72',
  '81',
  '90',
  '102',
  '114',
  '128',
] as const
const INDEX_OF_F1 = 3

const THIRDS = ['', '⅓', '⅔'] as const

/** Label of an exact f-number on the nominal third-stop series: 11.3137 → "f/11". Zero or less reads "no light". */
export function fNumberLabel(fNumber: number): string {
  if (!(fNumber > 0)) return 'no light'
  const label = NOMINAL_F_NUMBERS[Math.round(6 * Math.log2(fNumber)) + INDEX_OF_F1]
  return label === undefined ? `f/${fNumber < 1 ? fNumber.toFixed(2) : Math.round(fNumber)}` : `f/${label}`
}

/** Power as a fraction of full, on thirds of a stop: "full", "1/8", "1/8 + ⅓". Without any it is "no power". */
export function powerLabel(power: number): string {
  if (!(power > 0)) return 'no power'
  const thirds = Math.min(0, Math.round(3 * Math.log2(power)))
  const whole = Math.floor(thirds / 3)
  const rest = THIRDS[thirds - 3 * whole] ?? ''
  const base = whole === 0 ? 'full' : `1/${2 ** -whole}`
  return rest === '' ? base : `${base} + ${rest}`
}

/** Stops on thirds with a sign: "0", "−2", "+⅔", "−1⅓". */
export function stopsLabel(stops: number): string {
  const thirds = Math.round(stops * 3)
  if (thirds === 0) return '0'
  const whole = Math.floor(Math.abs(thirds) / 3)
  const rest = THIRDS[Math.abs(thirds) % 3] ?? ''
  return `${thirds < 0 ? '−' : '+'}${whole === 0 ? '' : whole}${rest}`
}

/** Metres to one decimal: "1.6 m". */
export function metresLabel(metres: number): string {
  return `${(Math.round(metres * 10) / 10).toFixed(1)} m`
}

const PURPOSE_WORDS: Readonly<Record<LightPurpose, string>> = {
  main: 'Main',
  fill: 'Fill',
  background: 'Background light',
  rim: 'Rim',
  accent: 'Accent',
}

/** What a light is for, as a sentence begins: "Main", "Background light". */
export function purposeWord(purpose: LightPurpose): string {
  return PURPOSE_WORDS[purpose]
}

/**
 * Where a point stands about the sitter, sides as the camera sees them: "in front", "camera left", "back right",
 * "behind". Both in metres; heights are left out. Straight above or on the sitter is "overhead".
 */
export function sideOf(at: Point, sitter: Point): string {
  const [x, , z] = minus(at, sitter)
  if (Math.hypot(x, z) < 0.15) return 'overhead'
  const turnDeg = (Math.atan2(Math.abs(x), z) * 180) / Math.PI
  const side = x < 0 ? 'left' : 'right'
  if (turnDeg < 20) return 'in front'
  if (turnDeg <= 110) return `camera ${side}`
  return turnDeg < 165 ? `back ${side}` : 'behind'
}

/** A name in the middle of a sentence: "60 cm softbox", "full warm +81". */
export function inSentence(name: string): string {
  const second = name.charAt(1)
  return second === second.toUpperCase() && second !== second.toLowerCase()
    ? name
    : name.charAt(0).toLowerCase() + name.slice(1)
}

/** What a light is made of and set to: "Small flash · 90 cm octa · full warm · 1/4". */
export function lightSummary(light: Light): string {
  const parts = [light.unit.name]
  if (light.modifier) parts.push(inSentence(light.modifier.name))
  for (const gel of light.gels) parts.push(inSentence(gel.name))
  parts.push(powerLabel(light.power))
  return parts.join(' · ')
}
