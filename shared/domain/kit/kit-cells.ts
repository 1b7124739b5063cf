import type { Metered, UnitNumbers } from './schema.ts'

/** What a cell says, or a sentence about why it cannot be read. */
export type Read<Value> = { ok: true; value: Value } | { ok: false; message: string }

const good = <Value>(value: Value): Read<Value> => ({ ok: true, value })
const bad = (message: string): Read<never> => ({ ok: false, message })

/** The beginning of a cell, between quotation marks, for a sentence about it. */
export function quoted(cell: string): string {
  const line = cell.replace(/\s+/g, ' ').trim()
  return `“${line.length > 40 ? `${line.slice(0, 40)}…` : line}”`
}

/** A number as people and spreadsheets write it: "1.5", "1,5", "−2", "12 000", "1e-7". */
export function readNumber(cell: string): Read<number> {
  const plain = cell.slice(0, 60).replace(/[−–]/g, '-').replace(/\s/g, '')
  const point = plain.includes('.') ? plain : plain.replace(',', '.')
  const value = /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i.test(point) ? Number(point) : Number.NaN
  return cell.length <= 60 && Number.isFinite(value) ? good(value) : bad(`${quoted(cell)} is not a number`)
}

/** "yes" or "no", and what spreadsheets make of them. */
export function readYesOrNo(cell: string): Read<boolean> {
  const word = cell.slice(0, 10).trim().toLowerCase()
  if (['yes', 'y', 'true', '1'].includes(word)) return good(true)
  if (['no', 'n', 'false', '0'].includes(word)) return good(false)
  return bad(`${quoted(cell)} is neither yes nor no`)
}

/** "1/128" or "128": the denominator. */
export function readPower(cell: string): Read<number> {
  const match = /^\s*(?:1\s*\/\s*)?(\d{1,6})\s*$/.exec(cell.slice(0, 40))
  return match && cell.length <= 40 ? good(Number(match[1])) : bad(`${quoted(cell)} is not a power such as 1/128`)
}

/** One of a few words, whatever the case. */
export function readOneOf(cell: string, words: readonly string[]): Read<string> {
  const word = cell.slice(0, 60).trim().toLowerCase()
  const found = words.find((candidate) => candidate === word)
  return found === undefined ? bad(`${quoted(cell)} is none of: ${words.join(', ')}`) : good(found)
}

/** "24 mm: 28 m; 50 mm: 42 m", in the order of the table. */
export function zoomCell(zoom: UnitNumbers['zoom']): string {
  return zoom.map(({ focalMm, guideNumberM }) => `${focalMm} mm: ${guideNumberM} m`).join('; ')
}

/** Reads what `zoomCell` writes; units may be left out, and settings may stand on lines of their own. */
export function readZoom(cell: string): Read<UnitNumbers['zoom']> {
  const zoom: UnitNumbers['zoom'] = []
  for (const part of cell.split(/[;\n\r]+/)) {
    if (part.trim() === '') continue
    const [focal = '', guide = '', ...rest] = part.split(':')
    const focalMm = readNumber(focal.replace(/\s*mm\s*$/, ''))
    const guideNumberM = readNumber(guide.replace(/\s*m\s*$/, ''))
    if (rest.length > 0 || !focalMm.ok || !guideNumberM.ok)
      return bad(`${quoted(part)} is not a zoom setting such as 50 mm: 42 m`)
    zoom.push({ focalMm: focalMm.value, guideNumberM: guideNumberM.value })
  }
  return good(zoom)
}

const BARE = 'bare'
const NO_ZOOM = 'no zoom'

function escaped(text: string): string {
  return text.replace(/[\\|]/g, '\\$&').replace(/\n/g, '\\n').replace(/\r/g, '\\r')
}

function unescaped(text: string): string {
  return text.replace(/\\([\s\S])/g, (_, char: string) => (char === 'n' ? '\n' : char === 'r' ? '\r' : char))
}

/** Splits at bars that no backslash stands before, and takes away the one space beside each bar. */
function parts(line: string): string[] {
  const found = [...`${line}|`.matchAll(/((?:\\[\s\S]|[^\\|])*)\|/g)].map(([, part = '']) => part)
  return found.map((part, index) => {
    const begun = index === 0 ? part : part.replace(/^ /, '')
    return index === found.length - 1 ? begun : begun.replace(/ $/, '')
  })
}

type NameOf = (modifierKitId: string) => string | undefined
type IdOf = (name: string) => Metered['modifierKitId'] | undefined

/**
 * Meter readings, one a line: "90 cm octa | 50 mm | 41.2 m | f/8 at 2 m, …". A modifier that has no name of its own in
 * the kit stands there by its id, "#…".
 */
export function meteredCell(metered: readonly Metered[], nameOf: NameOf): string {
  return metered
    .map(({ modifierKitId, zoomMm, guideNumberM, source }) => {
      const name = modifierKitId === null ? BARE : nameOf(modifierKitId)
      const own = name === undefined ? `#${modifierKitId}` : escaped(name)
      const isTaken = modifierKitId !== null && name !== undefined && (own === BARE || own.startsWith('#'))
      return [
        isTaken ? `\\${own}` : own,
        zoomMm === null ? NO_ZOOM : `${zoomMm} mm`,
        `${guideNumberM} m`,
        escaped(source),
      ].join(' | ')
    })
    .join('\n')
}

/** Reads what `meteredCell` writes. `parseId` takes an id that stands there itself. */
export function readMetered(
  cell: string,
  idOf: IdOf,
  parseId: (id: string) => Metered['modifierKitId'] | undefined,
): Read<Metered[]> {
  const metered: Metered[] = []
  for (const line of cell.split(/\r\n|\n|\r/)) {
    if (line.trim() === '') continue
    const [what = '', zoom = '', guide = '', source = ''] = parts(line)
    const name = what.trim()
    const modifierKitId =
      name === BARE ? null : name.startsWith('#') ? parseId(name.slice(1)) : idOf(unescaped(name).trim())
    if (modifierKitId === undefined) return bad(`there is no modifier ${quoted(name)} in the kit or in this file`)
    const zoomMm =
      zoom.trim() === NO_ZOOM || zoom.trim() === '' ? good(null) : readNumber(zoom.replace(/\s*mm\s*$/, ''))
    const guideNumberM = readNumber(guide.replace(/\s*m\s*$/, ''))
    if (!zoomMm.ok || !guideNumberM.ok)
      return bad(`${quoted(line)} is not a reading such as 90 cm octa | 50 mm | 41.2 m | f/8 at 2 m`)
    metered.push({ modifierKitId, zoomMm: zoomMm.value, guideNumberM: guideNumberM.value, source: unescaped(source) })
  }
  return good(metered)
}
