import { describe, expect, it } from 'vitest'
import { searchBoard } from '#shared/domain/board/search.ts'

const items = [
  { id: 'a', words: 'Collar high, cloth matte' },
  { id: 'b', words: 'Blé d’été, high summer' },
]

describe('searchBoard', () => {
  it('wants every word and ignores case and accents', () => {
    expect(searchBoard(items, 'HIGH')).toEqual(['a', 'b'])
    expect(searchBoard(items, 'ete high')).toEqual(['b'])
    expect(searchBoard(items, 'collar summer')).toEqual([])
  })

  it('finds nothing for nothing', () => {
    expect(searchBoard(items, '  ')).toEqual([])
  })
})
