import { readFileSync } from 'node:fs'
import { fileURLToPath } from 'node:url'
import { describe, expect, it } from 'vitest'

const css = readFileSync(fileURLToPath(new URL('../../../src/styles/app.css', import.meta.url)), 'utf8')
const tokens = new Map(
  [...css.matchAll(/--color-([\w-]+):\s*(#[0-9a-f]{6})/gi)].map(([, name = '', value = '']) => [name, value]),
)

/** Relative luminance of an sRGB colour. WCAG 2.2, definition of "relative luminance". */
function luminance(hex: string): number {
  const channel = (at: number) => {
    const value = Number.parseInt(hex.slice(at, at + 2), 16) / 255
    return value <= 0.04045 ? value / 12.92 : ((value + 0.055) / 1.055) ** 2.4
  }
  return 0.2126 * channel(1) + 0.7152 * channel(3) + 0.0722 * channel(5)
}

function contrast(a: string, b: string): number {
  const [light = 0, dark = 0] = [luminance(colour(a)), luminance(colour(b))].sort((x, y) => y - x)
  return (light + 0.05) / (dark + 0.05)
}

function colour(name: string): string {
  const value = name.startsWith('#') ? name : tokens.get(name)
  if (value === undefined) throw new Error(`no token ${name}`)
  return value
}

const PAPERS = ['ground', 'paper', 'print', 'tag']

/** [text, on], 4.5: WCAG 2.2, 1.4.3. */
const TEXT: [string, string][] = [
  ...PAPERS.flatMap((on): [string, string][] =>
    ['ink', 'ink-soft', 'ink-faint', 'glow-ink', 'velvet', 'bottle', 'draft'].map((text) => [text, on]),
  ),
  ['ink', 'surround'],
  ['ink-soft', 'surround'],
  ...['glow-wash', 'velvet-wash', 'bottle-wash', 'draft-wash'].map((on): [string, string] => ['ink', on]),
  ['glow-ink', 'glow-wash'],
  ['glow-deep', 'glow-wash'],
  ['velvet', 'velvet-wash'],
  ['bottle', 'bottle-wash'],
  ['draft', 'draft-wash'],
  ['#ffffff', 'velvet'],
  ['#ffffff', 'velvet-deep'],
  ...['night', 'night-2', 'night-3'].flatMap((on): [string, string][] => [
    ['bone', on],
    ['bone-soft', on],
    ['glow-lit', on],
  ]),
  ['#1f1508', 'glow-lit'],
]

/** [edge or sign, on], 3: WCAG 2.2, 1.4.11; also large text, 1.4.3. */
const EDGES: [string, string][] = [
  ...PAPERS.map((on): [string, string] => ['edge', on]),
  ...['ground', 'paper', 'print', 'surround'].map((on): [string, string] => ['ink-faint', on]),
  ...['ground', 'paper', 'print', 'surround'].map((on): [string, string] => ['draft', on]),
  ['glow', 'paper'],
  ['glow', 'ground'],
  ['night-edge', 'night'],
  ['night-edge', 'night-2'],
  ['glow', 'night'],
]

describe('app.css', () => {
  it('names every colour as six hexadecimal digits', () => {
    expect(tokens.size).toBeGreaterThanOrEqual(27)
  })

  it.each(TEXT)('keeps %s readable on %s, at least 4.5 to 1', (text, on) => {
    expect(contrast(text, on)).toBeGreaterThanOrEqual(4.5)
  })

  it.each(EDGES)('keeps %s to be seen on %s, at least 3 to 1', (edge, on) => {
    expect(contrast(edge, on)).toBeGreaterThanOrEqual(3)
  })

  it('measures black on white as 21 to 1', () => {
    expect(contrast('#000000', '#ffffff')).toBeCloseTo(21, 5)
  })
})
