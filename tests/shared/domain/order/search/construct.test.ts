import { describe, expect, it } from 'vitest'
import { compile } from '#shared/domain/order/search/compiled.ts'
import { construct } from '#shared/domain/order/search/construct.ts'
import { handDay } from '#tests/support/hand-day.ts'

describe('construct', () => {
  it('goes to the cheapest next shot', () => {
    const c = compile(
      handDay({ shots: [{}, {}, {}], light: (from, to) => (from < 0 ? [30, 5, 30] : [9, 9, 1])[to] ?? 0 }),
    )
    expect(construct(c, 0)).toEqual([1, 2, 0])
  })

  it('keeps what comes after what, places and what belongs together', () => {
    const c = compile(
      handDay({
        shots: [{}, {}, {}, {}],
        rules: [
          { kind: 'pin-place', shot: 3, index: 0 },
          { kind: 'after', shot: 0, after: 2 },
          { kind: 'together', shots: [3, 2] },
        ],
      }),
    )
    expect(construct(c, 0)).toEqual([3, 2, 0, 1])
  })

  it('hurries to what closes early when told to', () => {
    const c = compile(
      handDay({
        shots: [{}, {}],
        light: (_, to) => (to === 1 ? 12 : 10),
        rules: [{ kind: 'window', shot: 1, fromMin: 540, toMin: 600 }],
      }),
    )
    expect(construct(c, 0)).toEqual([0, 1])
    expect(construct(c, 1)).toEqual([1, 0])
  })
})
