import { describe, expect, it } from 'vitest'
import {
  counterweightWords,
  depthLabel,
  frameWords,
  popsWords,
  sightWords,
  sizeLabel,
  smallLabel,
  syncWords,
  underWords,
  whiteWords,
} from '#shared/domain/lighting/reading-words.ts'

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

// An inch is 25.4 mm, a foot 0.3048 m (NIST SP 811).
describe('smallLabel', () => {
  it('is in millimetres or inches', () => {
    expect([smallLabel(0.03, 'm'), smallLabel(0.0254, 'ft')]).toEqual(['30 mm', '1.0″'])
  })
})

describe('depthLabel', () => {
  it('stays readable when it is short', () => {
    expect([depthLabel(0.178, 'm'), depthLabel(1.42, 'm'), depthLabel(0.178, 'ft')]).toEqual([
      '18 cm',
      '1.4 m',
      '0′ 7″',
    ])
  })
})

describe('sizeLabel', () => {
  it('says the unit once where that is clear', () => {
    expect([sizeLabel(1.2, 0.9, 'm'), sizeLabel(1.2192, 0.9144, 'ft')]).toEqual(['1.2 × 0.9 m', '4′ 0″ × 3′ 0″'])
  })
})

describe('popsWords', () => {
  it('counts against a charge where there is one', () => {
    expect([popsWords(11.2, 150), popsWords(11.2, null)]).toEqual(['12 of 150', '12'])
  })
})

describe('frameWords', () => {
  it('knows a square from a frame across', () => {
    expect((['upright', 'across', 'square'] as const).map(frameWords)).toEqual([
      'Upright frame',
      'Frame across',
      'Square frame',
    ])
  })
})

describe('syncWords, sightWords, counterweightWords', () => {
  it('say what the number beside them means', () => {
    const sync = { shutterS: 1 / 160, limitS: 1 / 200, isAssumed: true, isTooFast: false, units: [] }
    expect(syncWords(sync)).toBe('flash lights the whole frame up to 1/200 (assumed)')
    expect(syncWords({ ...sync, isTooFast: true })).toBe('faster than 1/200: a part of the frame stays dark')
    expect(sightWords({ marginM: 0.2, edge: 'left' })).toBe('clears the left edge')
    expect(sightWords({ marginM: -0.1, edge: 'top' })).toBe('in the picture, past the top edge')
    expect(counterweightWords({ counterweightKg: 5.5, bags: 'a bag of 5 kg' })).toBe(
      'a bag of 5 kg, slid until it balances',
    )
    expect(counterweightWords({ counterweightKg: 0, bags: '' })).toBe('its own arm is enough')
  })
})
