/** Dark colours for a person's disc and pointer, told apart by hue; white text on each has a contrast of at least 4.5. */
export const FACE_COLOURS: readonly string[] = [
  '#27503f',
  '#2f4f70',
  '#5b1e2c',
  '#6b4a12',
  '#4d3a78',
  '#1f6066',
  '#8f4a0c',
  '#7a2f62',
  '#4a5a1e',
  '#37474f',
]

/** One or two capital letters for a name: first and last word, or a question mark when it holds no letter or figure. */
export function initialsOf(name: string): string {
  const words = name
    .normalize('NFC')
    .split(/[\s\u00a0]+/u)
    .flatMap((word) => /[\p{L}\p{N}]/u.exec(word)?.[0] ?? [])
  const first = words[0]
  if (first === undefined) return '?'
  const last = words.length > 1 ? (words[words.length - 1] ?? '') : ''
  return `${capital(first)}${capital(last)}`
}

/** Upper case of one letter, itself when that would be several (ß). */
function capital(letter: string): string {
  const upper = letter.toUpperCase()
  return [...upper].length === [...letter].length ? upper : letter
}

/** A person's colour, `#rrggbb`: always the same one for an id (FNV-1a over its UTF-16 units). */
export function colourOf(userId: string): string {
  let hash = 0x811c9dc5
  for (let i = 0; i < userId.length; i++) hash = Math.imul(hash ^ userId.charCodeAt(i), 0x01000193) >>> 0
  return FACE_COLOURS[hash % FACE_COLOURS.length] ?? '#37474f'
}
