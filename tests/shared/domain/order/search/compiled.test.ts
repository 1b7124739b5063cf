import { describe, expect, it } from 'vitest'
import { EVER, at, compile, item } from '#shared/domain/order/search/compiled.ts'
import { handDay } from '#tests/support/hand-day.ts'

const c = compile(
  handDay({
    shots: [{ looks: ['coat'] }, { looks: ['gown'], need: 'could' }],
    looks: { coat: { sitter: 'Ada', changeMin: 5 }, gown: { sitter: 'Ada', changeMin: 25 } },
    sitters: { Ada: { hours: [600, 900], chairMin: 20 } },
    rules: [
      { kind: 'pin-place', shot: 1, index: 7 },
      { kind: 'pin-clock', shot: 0, atMin: 610, toleranceMin: 5 },
    ],
  }),
)

describe('compile', () => {
  it('takes a place beyond the last for the last', () => {
    expect(c.places).toEqual([[], [1]])
  })

  it('knows that a sitter of both shots has to change between them', () => {
    // 10 minutes of light against 25 of change.
    expect([at(c.delta, 3), at(c.least, 3)]).toEqual([10, 25])
  })

  it('knows how soon a shot can begin: hours, chair and change', () => {
    expect([...c.soonest]).toEqual([625, 625])
    expect([...c.notBefore]).toEqual([610, EVER])
  })

  it('collects latest times from pins and hours', () => {
    expect(c.latestStart).toEqual([[615], []])
    expect(c.latestEnd).toEqual([[900], [900]])
    expect([...c.need]).toEqual([0, 2])
  })
})

describe('at and item', () => {
  it('read what is inside', () => {
    expect(at(Float64Array.of(3, 4), 1)).toBe(4)
    expect(item(['a', 'b'], 1)).toBe('b')
  })
})
