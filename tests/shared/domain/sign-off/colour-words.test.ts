import { describe, expect, it } from 'vitest'
import { colourWords } from '#shared/domain/sign-off/colour-words.ts'

describe('colourWords', () => {
  it.each([
    ['#000000', 'black (#000000)'],
    ['#FFFFFF', 'white (#ffffff)'],
    ['#ff0000', 'red (#ff0000)'],
    ['#23304a', 'navy (#23304a)'],
    ['#8E6A22', 'brass (#8e6a22)'],
    ['#1f5a42', 'bottle green (#1f5a42)'],
  ])('names %s as %s', (colour, words) => {
    // From memory: what a person would call them.
    expect(colourWords(colour)).toBe(words)
  })

  it('gives back what is no colour', () => {
    expect(colourWords('ochre')).toBe('ochre')
  })
})
