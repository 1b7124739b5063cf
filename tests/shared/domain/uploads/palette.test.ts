import { differenceCiede2000, modeLab65, modeRgb, useMode } from 'culori/fn'
import { describe, expect, it } from 'vitest'
import { paletteOf } from '#shared/domain/uploads/palette.ts'

useMode(modeRgb)
useMode(modeLab65)
const apart = differenceCiede2000()

/** Pixels of each colour, so many of each. */
function pixels(...parts: (readonly [colour: string, count: number])[]): Uint8Array {
  return Uint8Array.from(
    parts.flatMap(([colour, count]) => {
      const value = Number.parseInt(colour.slice(1), 16)
      const rgb = [value >> 16, (value >> 8) & 255, value & 255]
      return Array.from({ length: count }, () => rgb).flat()
    }),
  )
}

describe('paletteOf', () => {
  it('gives the colours of a picture, most of it first', () => {
    const found = paletteOf(pixels(['#23304a', 300], ['#8e6a22', 500], ['#d9d4c8', 200]), 5)
    expect(found).toHaveLength(3)
    const wanted = ['#8e6a22', '#23304a', '#d9d4c8']
    wanted.forEach((colour, index) => expect(apart(found[index] ?? '#000000', colour)).toBeLessThan(1))
  })

  it('never gives more than it is asked for', () => {
    const many = ['#c22020', '#2a56b0', '#2f8a45', '#f0d22e', '#e0781c', '#6b3a86', '#141414', '#fbfbfb'].map(
      (colour) => [colour, 100] as const,
    )
    expect(paletteOf(pixels(...many), 5)).toHaveLength(5)
  })

  it('merges colours that look the same in a swatch', () => {
    expect(paletteOf(pixels(['#8e6a22', 500], ['#8f6b24', 400], ['#23304a', 300]), 5)).toHaveLength(2)
  })

  it('keeps a small accent and drops noise', () => {
    const found = paletteOf(pixels(['#808080', 950], ['#c22020', 48], ['#2f8a45', 2]), 5)
    expect(found).toHaveLength(2)
    expect(apart(found[1] ?? '#000000', '#c22020')).toBeLessThan(1)
  })

  it('gives the same palette for the same pixels, in whatever order they come', () => {
    const a = [
      ['#23304a', 30],
      ['#8e6a22', 50],
      ['#d9d4c8', 20],
      ['#27503f', 25],
    ] as const
    expect(paletteOf(pixels(...a), 5)).toEqual(paletteOf(pixels(...[...a].reverse()), 5))
  })

  it('is empty for no pixels', () => {
    expect(paletteOf(new Uint8Array(), 5)).toEqual([])
  })
})
