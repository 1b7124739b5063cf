import { describe, expect, it } from 'vitest'
import {
  depthLabel,
  listed,
  offWords,
  provenanceOf,
  sizeLabel,
  smallLabel,
  underWords,
  whiteWords,
} from '#src/features/lighting/reading-words.ts'
import { FULL_WARM, OCTA, light, unit } from '#tests/support/lighting-sample.ts'

describe('whiteWords', () => {
  it('names steps from the white balance, warmer above it', () => {
    expect([0, 12, -60, 130, -9.9].map(whiteWords)).toEqual([
      'as white as the camera is set',
      'a little warmer than the camera is set',
      'clearly cooler than the camera is set',
      'much warmer than the camera is set',
      'as white as the camera is set',
    ])
  })
})

describe('underWords', () => {
  it('counts stops on thirds, one of them in the singular', () => {
    expect([2, 1, 1 / 3, -2 / 3, -1.34, 0.1].map((stops) => underWords(stops, 'the main'))).toEqual([
      '2 stops under the main',
      '1 stop under the main',
      '⅓ stop under the main',
      '⅔ stop over the main',
      '1⅓ stops over the main',
      'level with the main',
    ])
  })
})

describe('offWords', () => {
  it('says to a tenth what is over or under the wish', () => {
    expect([0.08, -2.31, 0.04, -1].map(offWords)).toEqual([
      '+0.1 stop off',
      '−2.3 stops off',
      'as wished',
      '−1.0 stop off',
    ])
  })
})

describe('lengths', () => {
  it('stay readable when they are short, in both units', () => {
    // An inch is 25.4 mm, a foot 0.3048 m (NIST SP 811).
    expect([smallLabel(0.03, 'm'), smallLabel(0.0254, 'ft')]).toEqual(['30 mm', '1.0″'])
    expect([depthLabel(0.178, 'm'), depthLabel(1.42, 'm'), depthLabel(0.178, 'ft')]).toEqual([
      '18 cm',
      '1.4 m',
      '0′ 7″',
    ])
    expect([sizeLabel(1.2, 0.9, 'm'), sizeLabel(1.2192, 0.9144, 'ft')]).toEqual(['1.2 × 0.9 m', '4′ 0″ × 3′ 0″'])
  })
})

describe('provenanceOf', () => {
  const published = unit(undefined, { guideNumberM: { value: 40, from: 'published', source: 'maker' } })
  it('is assumed as soon as one number of the chain is', () => {
    const bare = light(1, { purpose: 'main', at: [0, 2, 2], aim: [0, 1.5, 0], unit: published })
    expect(provenanceOf(bare, { measured: null })).toBe('published')
    expect(
      provenanceOf({ ...bare, modifier: light(2, { ...bare, modifier: OCTA }).modifier }, { measured: null }),
    ).toBe('assumed')
  })
  it('is measured where a meter read head and modifier together, unless a gel before it is a guess', () => {
    const octa = light(1, { purpose: 'main', at: [0, 2, 2], aim: [0, 1.5, 0], modifier: OCTA })
    expect(provenanceOf(octa, { measured: 'f/5.6 at 2 m' })).toBe('measured')
    expect(provenanceOf(light(1, { ...octa, gels: [FULL_WARM] }), { measured: 'f/5.6 at 2 m' })).toBe('assumed')
  })
})

describe('listed', () => {
  it('joins names as people do', () => {
    expect([listed(['main']), listed(['main', 'rim']), listed(['main', 'fill', 'rim'])]).toEqual([
      'main',
      'main and rim',
      'main, fill and rim',
    ])
  })
})
