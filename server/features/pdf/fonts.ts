import { createRequire } from 'node:module'
import { Font } from '@react-pdf/renderer'
import { wellFormed } from '#shared/domain/text.ts'

// A .woff2 cannot be embedded; each .woff is one subset, so that a family is a stack of them, looked through sign by sign.
const fileOf = (name: string) => createRequire(import.meta.url).resolve(name)
const subset = (family: string, part: string, weight: number) =>
  fileOf(`@fontsource/${family}/files/${family}-${part}-${weight}-normal.woff`)

const FAMILIES = {
  Text: { 400: subset('instrument-sans', 'latin', 400), 600: subset('instrument-sans', 'latin', 600) },
  'Text ext': { 400: subset('instrument-sans', 'latin-ext', 400), 600: subset('instrument-sans', 'latin-ext', 600) },
  Title: { 600: subset('playfair-display', 'latin', 600) },
  'Title ext': { 600: subset('playfair-display', 'latin-ext', 600) },
  'Title cyrillic': { 600: subset('playfair-display', 'cyrillic', 600) },
  // Thirds, arrows, and the scripts that the two of the design lack.
  Signs: {
    400: fileOf('dejavu-fonts-ttf/ttf/DejaVuSans.ttf'),
    600: fileOf('dejavu-fonts-ttf/ttf/DejaVuSans-Bold.ttf'),
  },
} as const

/** What people operate and read. */
export const TEXT_FONT = ['Text', 'Text ext', 'Signs']
/** Titles, with lining figures. */
export const TITLE_FONT = ['Title', 'Title ext', 'Title cyrillic', 'Signs']

type Checked = { hasGlyphForCodePoint: (codePoint: number) => boolean }
/** The renderer's types leave out what its fonts can be asked. */
function canBeAsked(font: object): font is Checked {
  return 'hasGlyphForCodePoint' in font && typeof font.hasGlyphForCodePoint === 'function'
}

let loading: Promise<readonly Checked[]> | undefined

async function load(): Promise<readonly Checked[]> {
  for (const [family, files] of Object.entries(FAMILIES)) {
    Font.register({
      family,
      fonts: Object.entries(files).map(([weight, src]) => ({ src, fontWeight: Number(weight) })),
    })
  }
  // Names are not to be parted; what is longer than a column has to be.
  Font.registerHyphenationCallback((word) => (word.length <= 22 ? [word] : (word.match(/.{1,11}/gsu) ?? [word])))
  const checked: Checked[] = []
  for (const fontFamily of TEXT_FONT) {
    await Font.load({ fontFamily, fontWeight: 400 })
    const { data } = Font.getFont({ fontFamily, fontWeight: 400 }) ?? {}
    if (data && canBeAsked(data)) checked.push(data)
  }
  return checked
}

/** Stands for a sign that no font has. */
const UNKNOWN = '□'

/**
 * Makes the fonts known to the renderer, once; gives back what makes any text printable: signs that no font has become
 * □, what only steers the signs beside it (joiners, variation, direction) goes, and so do control characters.
 */
export async function loadFonts(): Promise<(text: string) => string> {
  loading ??= load()
  const fonts = await loading
  return (text) =>
    [...wellFormed(text).normalize('NFC')]
      .map((sign) => {
        if (sign === '\n') return sign
        if (/[\p{Cc}\u2028\u2029]/u.test(sign)) return ' '
        if (/[\p{Cf}\p{Variation_Selector}\u{1F3FB}-\u{1F3FF}]/u.test(sign)) return ''
        const codePoint = sign.codePointAt(0) ?? 0
        return fonts.some((font) => font.hasGlyphForCodePoint(codePoint)) ? sign : UNKNOWN
      })
      .join('')
}
