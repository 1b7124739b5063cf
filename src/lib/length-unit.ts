import { useSyncExternalStore } from 'react'
import { type LengthUnit, METRES_PER_FOOT, METRES_PER_INCH, feetAndInches } from '#shared/units/length.ts'

export { LENGTH_UNITS, type LengthUnit, METRES_PER_FOOT, METRES_PER_INCH, lengthLabel } from '#shared/units/length.ts'

const KEY = 'sconce:length-unit'

function kept(): LengthUnit {
  try {
    return localStorage.getItem(KEY) === 'ft' ? 'ft' : 'm'
  } catch {
    return 'm'
  }
}

let unit: LengthUnit | null = null
const listeners = new Set<() => void>()

/** The unit chosen on this device; metres until somebody chooses. */
export function lengthUnit(): LengthUnit {
  unit ??= kept()
  return unit
}

/** Chooses the unit for every page of this device. */
export function chooseLengthUnit(next: LengthUnit): void {
  unit = next
  try {
    localStorage.setItem(KEY, next)
  } catch {
    // No room on this device: the choice holds as long as this page is open.
  }
  for (const listener of listeners) listener()
}

function subscribe(listener: () => void): () => void {
  const handleOtherPage = (event: StorageEvent) => {
    if (event.key !== KEY && event.key !== null) return
    unit = null
    listener()
  }
  listeners.add(listener)
  window.addEventListener('storage', handleOtherPage)
  return () => {
    listeners.delete(listener)
    window.removeEventListener('storage', handleOtherPage)
  }
}

/** The unit chosen on this device, kept up to date. */
export function useLengthUnit(): LengthUnit {
  return useSyncExternalStore(subscribe, lengthUnit)
}

/** For a field: centimetres, or tenths of an inch: "1.95", `6' 4.8"`. `parseLength` reads it back. */
export function lengthText(metres: number, own: LengthUnit): string {
  if (own === 'm') return String(Number(metres.toFixed(2)))
  const { isNegative, feet, inches } = feetAndInches(metres, 10)
  const parts = [...(feet === 0 && inches > 0 ? [] : [`${feet}'`]), ...(inches > 0 ? [`${inches}"`] : [])]
  return `${isNegative ? '-' : ''}${parts.join(' ')}`
}

const VULGAR: Readonly<Record<string, string>> = { '½': '1/2', '¼': '1/4', '¾': '3/4' }
const NUMBER = String.raw`(\d+\s+\d+\/\d+|\d+\/\d+|\d+\.?\d*|\.\d+)`
const METRIC = new RegExp(`^${NUMBER}\\s*(mm|cm|m)$`)
const FEET = new RegExp(`^${NUMBER}\\s*(?:'|ft|feet|foot)\\s*(?:${NUMBER}\\s*(?:"|in|inch|inches)?)?$`)
const INCHES = new RegExp(`^${NUMBER}\\s*(?:"|in|inch|inches)$`)
const PLAIN = new RegExp(`^${NUMBER}$`)
const PER_UNIT: Readonly<Record<string, number>> = { mm: 0.001, cm: 0.01, m: 1 }

/** "5", "5.5", "1/2", "6 1/2"; a division by nothing is no number. */
function amount(text: string | undefined): number {
  if (text === undefined) return 0
  return text.split(/\s+/).reduce((sum, part) => {
    const [over, under] = part.split('/')
    return sum + Number(over) / (under === undefined ? 1 : Number(under))
  }, 0)
}

/**
 * A length as people type it, in metres: `1.5`, `1,5 m`, `150 cm`, `5' 6"`, `5 ft 6 1/2 in`, `5.5 ft`, `66"`, `−2′ 3″`. A
 * bare number is in the unit of this device. Undefined when it is no length.
 */
export function parseLength(text: string, own: LengthUnit): number | undefined {
  const plain = text
    .trim()
    .toLowerCase()
    .replace(/[½¼¾]/g, (sign) => ` ${VULGAR[sign] ?? ''}`)
    .replace(/[′’‘]{2}|''|[″“”]/g, '"')
    .replace(/[′’‘]/g, "'")
    .replace(/,/g, '.')
    .replace(/^[−–-]\s*/, '-')
    .replace(/\s+/g, ' ')
    .trim()
  const isNegative = plain.startsWith('-')
  const body = plain.replace(/^[+-]\s*/, '')
  const metres = metresOf(body, own)
  if (metres === undefined || !Number.isFinite(metres)) return undefined
  return isNegative && metres !== 0 ? -metres : metres
}

function metresOf(body: string, own: LengthUnit): number | undefined {
  const bare = PLAIN.exec(body)
  if (bare) return amount(bare[1]) * (own === 'm' ? 1 : METRES_PER_FOOT)
  const metric = METRIC.exec(body)
  if (metric) return amount(metric[1]) * (PER_UNIT[metric[2] ?? ''] ?? 1)
  const inches = INCHES.exec(body)
  if (inches) return amount(inches[1]) * METRES_PER_INCH
  const feet = FEET.exec(body)
  if (feet) return amount(feet[1]) * METRES_PER_FOOT + amount(feet[2]) * METRES_PER_INCH
  return undefined
}
