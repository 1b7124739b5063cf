import { describe, expect, it } from 'vitest'
import {
  addWords,
  aimWords,
  backgroundWords,
  cameraWords,
  moveWords,
  swapWords,
} from '#shared/domain/lighting/changeover-words.ts'
import { backgroundSchema, type Point } from '#shared/domain/lighting/schema.ts'
import { light } from '#tests/support/lighting-sample.ts'

const FACE: Point = [0, 1.5, 0]
const move = (before: Point, after: Point, sameRoom = true) => moveWords('Main', before, after, FACE, FACE, sameRoom)

describe('moveWords', () => {
  it('says only the height when only the height changed', () => {
    expect(move([-1, 2, 1], [-1, 1.4, 1])).toEqual({ what: 'Main 0.6 m lower', detail: '1.4 m up' })
  })
  it('says closer and further off along the same side', () => {
    expect(move([-1.2, 1.9, 1.2], [-0.9, 1.9, 0.9]).what).toBe('Main 0.4 m closer')
    expect(move([-0.9, 1.9, 0.9], [-1.2, 2.2, 1.2])).toEqual({
      what: 'Main 0.4 m further off',
      detail: '1.8 m from the sitter · 0.3 m higher',
    })
  })
  it('says where to when it changes sides, and always in another room', () => {
    expect(move([-1, 1.9, 1], [1, 1.9, 1])).toEqual({ what: 'Main to camera right, 1.5 m', detail: 'moves 2.0 m' })
    expect(move([-1, 1.9, 1], [-1, 1.9, 1], false)).toEqual({ what: 'Main to camera left, 1.5 m', detail: '1.9 m up' })
  })
})

describe('addWords', () => {
  it('says side and distance', () => {
    expect(addWords('Rim', [1, 2, -1], FACE)).toBe('Rim: add, back right, 1.5 m')
  })
})

describe('swapWords', () => {
  it('says what comes off and what goes on', () => {
    expect(swapWords('Softbox', 'White umbrella')).toBe('softbox off, white umbrella on')
    expect(swapWords(undefined, '10° grid')).toBe('10° grid on')
    expect(swapWords('10° grid', undefined)).toBe('10° grid off')
  })
})

describe('aimWords', () => {
  const aimed = (aim: Point) => aimWords(light(1, { purpose: 'main', at: [-1, 1.9, 1], aim }), FACE)
  it('names the face, the background, or a point', () => {
    expect(aimed([0, 1.4, 0])).toBe('turn to the sitter’s face')
    expect(aimed([0, 1.4, -2])).toBe('turn to the background')
    expect(aimed([1, 1, 0.5])).toBe('turn to a point camera right, 1.0 m up')
  })
})

describe('cameraWords', () => {
  it('says where the camera goes', () => {
    expect(cameraWords(null, [0, 1.4, 3], FACE, true)).toBe('Camera to 1.4 m up, 3.0 m from the sitter')
    expect(cameraWords([0, 1.4, 3], [0, 1, 3], FACE, true)).toBe('Camera 0.4 m lower')
    expect(cameraWords([0, 1.4, 3], [0, 1.4, 2], FACE, true)).toBe('Camera to 2.0 m from the sitter')
  })
})

describe('backgroundWords', () => {
  const wall = (more: object = {}) =>
    backgroundSchema.parse({ zM: -2, widthM: 3, heightM: 3, colour: '#808080', what: 'Grey paper', ...more })
  it('names a new background and where it hangs', () => {
    expect(backgroundWords(null, wall())).toEqual({
      what: 'Background: grey paper',
      detail: '3.0 m wide, 2.0 m behind the sitter',
    })
  })
  it('says only the distance when it is the same one', () => {
    expect(backgroundWords(wall(), wall({ zM: -3 })).what).toBe('Background to 3.0 m behind the sitter')
  })
})
