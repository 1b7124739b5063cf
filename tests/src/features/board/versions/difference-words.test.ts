import { describe, expect, it } from 'vitest'
import { differenceLines } from '#src/features/board/versions/difference-words.ts'

const of = (back: number, gone: number, changed: number) => ({ back, gone, changed })

describe('differenceLines', () => {
  it('has one line for each thing that happens, in words', () => {
    const differences = new Map([
      ['frame', of(2, 0, 1)],
      ['note', of(1, 0, 0)],
      ['shot', of(3, 0, 4)],
    ])
    expect(differenceLines(differences)).toEqual([
      { what: 'Back again', things: '2 frames, 1 note and 3 shots' },
      { what: 'As it was then', things: '1 frame and 4 shots' },
    ])
  })

  it('has none where nothing differs', () => {
    expect(differenceLines(new Map([['frame', of(0, 0, 0)]]))).toEqual([])
  })
})
