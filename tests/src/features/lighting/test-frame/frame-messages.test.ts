import { describe, expect, it } from 'vitest'
import { parseFrameAnswer, parseFrameRequest } from '#src/features/lighting/test-frame/frame-messages.ts'

describe('parseFrameAnswer', () => {
  it('reads rows and failures', () => {
    const layers = [new Float32Array(3)]
    expect(parseFrameAnswer({ kind: 'band', job: 1, from: 0, to: 1, layers })).toEqual({
      kind: 'band',
      job: 1,
      from: 0,
      to: 1,
      layers,
    })
    expect(parseFrameAnswer({ kind: 'failed', job: 2, why: 'x' })).toEqual({ kind: 'failed', job: 2, why: 'x' })
  })

  it('is null for anything else', () => {
    for (const odd of [
      null,
      'band',
      {},
      { kind: 'band', job: 'a', from: 0, to: 1, layers: [] },
      { kind: 'band', job: 1, from: 0, layers: [] },
      { kind: 'band', job: 1, from: NaN, to: 1, layers: [] },
      { kind: 'band', job: 1, from: 0, to: 1, layers: [[1, 2]] },
      { kind: 'hello', job: 1 },
    ])
      expect(parseFrameAnswer(odd)).toBeNull()
  })
})

describe('parseFrameRequest', () => {
  it('is null for what is not ours', () => {
    for (const odd of [undefined, 3, { kind: 'begin' }, { kind: 'else', job: 1 }])
      expect(parseFrameRequest(odd)).toBeNull()
    expect(parseFrameRequest({ kind: 'band', job: 1, from: 0, to: 24 })).not.toBeNull()
  })
})
