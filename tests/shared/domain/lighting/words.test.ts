import { describe, expect, it } from 'vitest'
import {
  fNumberLabel,
  inSentence,
  lightSummary,
  metresLabel,
  powerLabel,
  purposeWord,
  sideOf,
  stopsLabel,
} from '#shared/domain/lighting/words.ts'
import { FULL_WARM, OCTA, light } from '#tests/support/lighting-sample.ts'

describe('fNumberLabel', () => {
  it.each([
    // Nominal third-stop list of camera manuals against exact 2^(i/6).
    [1, 'f/1'],
    [1.2599, 'f/1.2'],
    [1.5874, 'f/1.6'],
    [2.5198, 'f/2.5'],
    [3.1748, 'f/3.2'],
    [5.0397, 'f/5'],
    [5.6569, 'f/5.6'],
    [6.3496, 'f/6.3'],
    [8, 'f/8'],
    [10.0794, 'f/10'],
    [11.3137, 'f/11'],
    [12.6992, 'f/13'],
    [20.1587, 'f/20'],
    [22.6274, 'f/22'],
    [0.7071, 'f/0.7'],
    [128, 'f/128'],
    [0.2, 'f/0.20'],
    [300, 'f/300'],
    [0, 'no light'],
  ])('labels %d as %s', (fNumber, label) => {
    expect(fNumberLabel(fNumber)).toBe(label)
  })
})

describe('powerLabel', () => {
  it.each([
    [1, 'full'],
    [0.5, '1/2'],
    [0.125, '1/8'],
    [0.125 * 2 ** (1 / 3), '1/8 + ⅓'],
    [2 ** (-1 / 3), '1/2 + ⅔'],
    [1 / 128, '1/128'],
  ])('labels %d as %s', (power, label) => {
    expect(powerLabel(power)).toBe(label)
  })
  it('has words for none', () => {
    expect([0, -0.5, NaN].map(powerLabel)).toEqual(['no power', 'no power', 'no power'])
  })
})

describe('stopsLabel', () => {
  it.each([
    [0, '0'],
    [-2, '−2'],
    [0.66, '+⅔'],
    [-1.34, '−1⅓'],
    [-0.3, '−⅓'],
    [0.1, '0'],
  ])('labels %d as %s', (stops, label) => {
    expect(stopsLabel(stops)).toBe(label)
  })
})

describe('metresLabel', () => {
  it('has one decimal', () => {
    expect(metresLabel(1.649)).toBe('1.6 m')
  })
})

describe('purposeWord', () => {
  it('calls the main light main', () => {
    expect(purposeWord('main')).toBe('Main')
  })
})

describe('sideOf', () => {
  // x is to the right as the camera sees it, z towards the camera.
  it.each([
    [[-1.2, 2, 1], 'camera left'],
    [[1.2, 2, 1], 'camera right'],
    [[0.1, 2, 2], 'in front'],
    [[0.1, 2, -2], 'behind'],
    [[-1, 2, -1], 'back left'],
    [[1, 2, -1], 'back right'],
    [[0, 2.5, 0.1], 'overhead'],
    [[1, 2, -0.2], 'camera right'],
  ] as const)('%j is %s', (at, words) => {
    expect(sideOf([...at], [0, 1.5, 0])).toBe(words)
  })
})

describe('inSentence', () => {
  it('lowers a first letter and leaves names in capitals', () => {
    expect(['Full warm', '60 cm softbox', 'TTL trigger'].map(inSentence)).toEqual([
      'full warm',
      '60 cm softbox',
      'TTL trigger',
    ])
  })
})

describe('lightSummary', () => {
  it('says head, modifier, gels and power', () => {
    const main = light(1, { purpose: 'main', at: [-1, 1.9, 1], aim: [0, 1.5, 0], modifier: OCTA, gels: [FULL_WARM] })
    expect(lightSummary(main)).toBe('Small flash · 90 cm octa · full warm +167 · 1/4')
  })
})
