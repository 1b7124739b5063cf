import { describe, expect, it } from 'vitest'
import { listed, offWords, provenanceOf } from '#src/features/lighting/reading-words.ts'
import { FULL_WARM, OCTA, light, unit } from '#tests/support/lighting-sample.ts'

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
