import { describe, expect, it } from 'vitest'
import { compareOrders, orderFigures } from '#shared/domain/order/compare.ts'
import { schedule } from '#shared/domain/order/schedule.ts'
import { handDay, inOrder, ruleId } from '#tests/support/hand-day.ts'

// Two setups: changing between them takes 20 minutes, staying nothing. Shots 1 and 3 share one, 2 the other.
const problem = handDay({
  shots: [{}, {}, {}],
  light: (from, to) => (from < 0 ? 30 : from % 2 === to % 2 ? 0 : 20),
  rules: [
    { kind: 'pin-place', shot: 0, index: 0 },
    { kind: 'after', shot: 1, after: 2 },
  ],
})

describe('compareOrders', () => {
  it('puts the figures of both side by side', () => {
    const comparison = compareOrders(problem, schedule(problem, inOrder(0, 1, 2)), schedule(problem, inOrder(0, 2, 1)))
    expect(comparison).toMatchObject({
      present: {
        changingMin: 70,
        heldMin: 0,
        lightingChanges: 2,
        roomMoves: 0,
        wrapMin: 700,
        broken: [`rule:${ruleId(1)}`],
      },
      proposed: { changingMin: 50, heldMin: 0, lightingChanges: 1, roomMoves: 0, wrapMin: 680, broken: [] },
      kept: [`rule:${ruleId(0)}`, `rule:${ruleId(1)}`],
      moved: 1,
    })
  })
})

describe('orderFigures', () => {
  it('counts the shots that are not made', () => {
    const short = { ...problem, hardOutMin: 660 }
    expect(orderFigures(schedule(short, inOrder(0, 2, 1))).notMade).toBe(1)
  })

  it('tells waiting for a window from changing over', () => {
    const held = handDay({ shots: [{}, {}], rules: [{ kind: 'window', shot: 1, fromMin: 630, toMin: 700 }] })
    expect(orderFigures(schedule(held, inOrder(0, 1)))).toMatchObject({ changingMin: 30, heldMin: 30, wrapMin: 660 })
  })
})
