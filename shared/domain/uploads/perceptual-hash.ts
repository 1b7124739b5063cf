/** Size of the grey picture that `perceptualHash` wants: nine columns give eight differences a row. */
export const HASH_INPUT = { widthPx: 9, heightPx: 8 } as const

/**
 * Difference hash of a picture, 64 bits as 16 hexadecimal digits, row by row, high bit first: a bit is 1 where a pixel
 * is darker than its right neighbour. Nearly equal pictures differ in few bits.
 *
 * @param grey 72 bytes, 9 × 8, row by row.
 */
export function perceptualHash(grey: Uint8Array): string {
  const { widthPx, heightPx } = HASH_INPUT
  if (grey.length !== widthPx * heightPx) throw new RangeError('a perceptual hash is made of 9 × 8 grey pixels')
  let hash = ''
  for (let row = 0; row < heightPx; row++) {
    let bits = 0
    for (let column = 0; column < widthPx - 1; column++) {
      const at = row * widthPx + column
      bits = (bits << 1) | ((grey[at] ?? 0) < (grey[at + 1] ?? 0) ? 1 : 0)
    }
    hash += bits.toString(16).padStart(2, '0')
  }
  return hash
}
