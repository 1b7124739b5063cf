import { differenceCiede2000, modeLab65, modeRgb, parseHex, useMode } from 'culori/fn'

// The difference converts through Lab; the tree-shaken culori knows only the spaces that are registered.
useMode(modeRgb)
useMode(modeLab65)

/** Plain names of cloth and paint with a typical sRGB value each; common practice, no source. */
const WORDS: readonly (readonly [word: string, colour: string])[] = [
  ['black', '#141414'],
  ['charcoal', '#36383b'],
  ['grey', '#808080'],
  ['light grey', '#c4c4c4'],
  ['white', '#fbfbfb'],
  ['ivory', '#efe9d8'],
  ['cream', '#f4e6bd'],
  ['sand', '#cdb48c'],
  ['tan', '#b08a5b'],
  ['brown', '#6b4326'],
  ['dark brown', '#3a2116'],
  ['ochre', '#b07d22'],
  ['brass', '#8e6a22'],
  ['mustard', '#c79a1c'],
  ['yellow', '#f0d22e'],
  ['orange', '#e0781c'],
  ['rust', '#a2461f'],
  ['red', '#c22020'],
  ['deep red', '#6a1722'],
  ['pink', '#e79aae'],
  ['purple', '#6b3a86'],
  ['lilac', '#b79fd0'],
  ['navy', '#1e2a4a'],
  ['blue', '#2a56b0'],
  ['light blue', '#92bbe0'],
  ['slate', '#5f7080'],
  ['teal', '#1c7276'],
  ['bottle green', '#1c4a36'],
  ['green', '#2f8a45'],
  ['olive', '#6a6a2c'],
  ['light green', '#a9cf9a'],
]

const difference = differenceCiede2000()

/** The plain word nearest to a colour by ΔE 2000, with the colour: `#8E6A22` → `brass (#8e6a22)`. */
export function colourWords(colour: string): string {
  const hex = colour.toLowerCase()
  const wanted = parseHex(hex)
  if (!wanted) return hex
  let best = ''
  let least = Infinity
  for (const [word, sample] of WORDS) {
    const apart = difference(wanted, sample)
    if (apart < least) {
      least = apart
      best = word
    }
  }
  return `${best} (${hex})`
}
