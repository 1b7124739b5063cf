import { describe, expect, it } from 'vitest'
import { fingerprintOf } from '#shared/domain/sign-off/fingerprint.ts'
import type { FrozenLook } from '#shared/domain/sign-off/schema.ts'
import { type Answer, signOffLamp, signOffState, signOffWords } from '#shared/domain/sign-off/state.ts'

const version = (hair: string): FrozenLook => ({
  version: 1,
  sitter: '',
  character: '',
  name: 'Night coat',
  hair,
  makeUp: '',
  pieces: [],
  pictures: [],
})
const answer = (kind: Answer['answer'], hair: string, atMs: number): Answer => {
  const frozen = version(hair)
  return {
    answer: kind,
    fingerprint: fingerprintOf(frozen),
    frozen,
    words: kind === 'change asked' ? 'softer' : '',
    name: 'Thea Quill',
    atMs,
  }
}

describe('signOffState', () => {
  it('waits while nobody has answered', () => {
    expect(signOffState([], version('loose'))).toEqual({ kind: 'waiting' })
  })

  it('is signed off while the look stands as it was signed', () => {
    const yes = answer('signed off', 'loose', 1)
    expect(signOffState([yes], version('loose'))).toEqual({ kind: 'signed off', answer: yes })
  })

  it('has changed since when the look differs from what was signed, and says how', () => {
    expect(signOffState([answer('signed off', 'loose', 1)], version('pinned'))).toMatchObject({
      kind: 'changed since',
      differences: [{ what: 'Hair', before: 'loose', after: 'pinned' }],
    })
  })

  it('is signed off again when the look is changed back', () => {
    const history = [answer('signed off', 'loose', 1), answer('change asked', 'pinned', 2)]
    expect(signOffState(history, version('loose'))).toMatchObject({ kind: 'signed off', answer: { atMs: 1 } })
  })

  it('is change asked, and knows whether the look was altered after the asking', () => {
    const history = [answer('change asked', 'loose', 2), answer('signed off', 'loose', 1)]
    expect(signOffState(history, version('loose'))).toMatchObject({
      kind: 'change asked',
      changedSince: false,
      differences: [],
    })
    expect(signOffState(history, version('pinned'))).toMatchObject({
      kind: 'change asked',
      changedSince: true,
      differences: [{ what: 'Hair', before: 'loose', after: 'pinned' }],
    })
  })

  it('goes by the newest answer to this version, in whatever order they come', () => {
    const history = [
      answer('change asked', 'loose', 1),
      answer('signed off', 'loose', 3),
      answer('signed off', 'pinned', 2),
    ]
    expect(signOffState(history, version('loose'))).toMatchObject({ kind: 'signed off', answer: { atMs: 3 } })
    expect(signOffState(history, version('cropped'))).toMatchObject({ kind: 'changed since', answer: { atMs: 3 } })
  })
})

describe('signOffLamp', () => {
  it('is lit for signed off, half for answered otherwise, unlit for waiting', () => {
    const history = [answer('signed off', 'loose', 1)]
    expect(signOffLamp(signOffState(history, version('loose')))).toBe('lit')
    expect(signOffLamp(signOffState(history, version('pinned')))).toBe('half')
    expect(signOffLamp(signOffState([answer('change asked', 'loose', 1)], version('loose')))).toBe('half')
    expect(signOffLamp(signOffState([], version('loose')))).toBe('unlit')
  })
})

describe('signOffWords', () => {
  it('tells a change that waits from one that was made', () => {
    const history = [answer('change asked', 'loose', 1)]
    expect(signOffWords(signOffState(history, version('loose')))).toBe('Change asked for')
    expect(signOffWords(signOffState(history, version('pinned')))).toBe('Changed as asked, look again')
  })
})
