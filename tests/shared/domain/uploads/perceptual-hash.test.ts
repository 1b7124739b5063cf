import { describe, expect, it } from 'vitest'
import { perceptualHash } from '#shared/domain/uploads/perceptual-hash.ts'

const grey = (of: (column: number, row: number) => number) =>
  Uint8Array.from({ length: 72 }, (_, at) => of(at % 9, Math.floor(at / 9)))

describe('perceptualHash', () => {
  it('is all ones where every row gets brighter and all zeros where it gets darker', () => {
    expect(perceptualHash(grey((column) => column * 20))).toBe('ffffffffffffffff')
    expect(perceptualHash(grey((column) => 200 - column * 20))).toBe('0000000000000000')
  })

  it('puts the first difference of a row into the high bit', () => {
    expect(perceptualHash(grey((column, row) => (row === 0 && column > 0 ? 1 : 0)))).toBe('8000000000000000')
  })

  it('does not change with brightness', () => {
    const picture = (column: number, row: number) => ((column * 37 + row * 91) % 120) + 10
    expect(perceptualHash(grey((column, row) => picture(column, row) + 50))).toBe(perceptualHash(grey(picture)))
  })

  it('wants exactly 9 × 8 pixels', () => {
    expect(() => perceptualHash(new Uint8Array(64))).toThrow(RangeError)
  })
})
