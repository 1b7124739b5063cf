import { describe, expect, it } from 'vitest'
import { exposureLine } from '#shared/domain/uploads/exposure.ts'

const nothing = { fNumber: null, exposureTimeS: null, focalLengthMm: null, iso: null }

describe('exposureLine', () => {
  it('reads as photographers say it', () => {
    expect(exposureLine({ fNumber: 5.6, exposureTimeS: 0.005, focalLengthMm: 85, iso: 100 })).toBe(
      'f/5.6 · 1/200 · 85 mm · ISO 100',
    )
  })

  it('leaves out what the camera did not write', () => {
    expect(exposureLine({ ...nothing, fNumber: 8, iso: 400 })).toBe('f/8 · ISO 400')
    expect(exposureLine(nothing)).toBe('')
  })

  it('says long exposures in seconds', () => {
    expect(exposureLine({ ...nothing, exposureTimeS: 2.5 })).toBe('2.5 s')
    expect(exposureLine({ ...nothing, exposureTimeS: 1 / 60 })).toBe('1/60')
  })

  it('leaves out values no camera can mean', () => {
    expect(exposureLine({ fNumber: 0, exposureTimeS: -1, focalLengthMm: Infinity, iso: Number.NaN })).toBe('')
  })
})
