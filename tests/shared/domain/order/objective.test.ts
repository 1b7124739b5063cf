import { describe, expect, it } from 'vitest'
import { type Objective, compareObjectives, movedShots, objectiveOf } from '#shared/domain/order/objective.ts'
import { schedule } from '#shared/domain/order/schedule.ts'
import { handDay, inOrder } from '#tests/support/hand-day.ts'

describe('movedShots', () => {
  it('counts the fewest shots to take out and put back', () => {
    const moved = (...order: number[]) => movedShots(inOrder(0, 1, 2, 3), inOrder(...order))
    expect([moved(0, 1, 2, 3), moved(3, 0, 1, 2), moved(1, 0, 3, 2), moved(3, 2, 1, 0)]).toEqual([0, 1, 2, 3])
  })

  it('leaves out shots that are in one order only', () => {
    expect(movedShots(inOrder(0, 1, 2), inOrder(2, 0))).toBe(1)
  })
})

describe('compareObjectives', () => {
  const plain: Objective = {
    broken: 0,
    mustNotMade: 0,
    shouldNotMade: 0,
    wrapMin: 0,
    lightingChanges: 0,
    waitingMin: 0,
    moved: 0,
    sequence: inOrder(0, 1),
  }
  const tiers = ['broken', 'mustNotMade', 'shouldNotMade', 'wrapMin', 'lightingChanges', 'waitingMin', 'moved'] as const

  it('compares its tiers from top to bottom', () => {
    tiers.forEach((tier, index) => {
      const worseBelow = Object.fromEntries(tiers.slice(index + 1).map((below) => [below, 9]))
      expect(compareObjectives({ ...plain, ...worseBelow }, { ...plain, [tier]: 1 })).toBeLessThan(0)
    })
  })

  it('ends with ids, and is zero for the same order only', () => {
    expect(compareObjectives(plain, { ...plain, sequence: inOrder(1, 0) })).toBeLessThan(0)
    expect(compareObjectives(plain, plain)).toBe(0)
  })
})

describe('objectiveOf', () => {
  it('reads an order off its schedule', () => {
    const problem = handDay({
      shots: [{}, { need: 'should' }, { need: 'could' }],
      hardOutMin: 600,
      rules: [{ kind: 'after', shot: 0, after: 1 }],
    })
    expect(objectiveOf(problem, schedule(problem, inOrder(0, 1, 2)))).toEqual({
      broken: 1,
      mustNotMade: 0,
      shouldNotMade: 1,
      wrapMin: 670,
      lightingChanges: 2,
      waitingMin: 0,
      moved: 0,
      sequence: inOrder(0, 1, 2),
    })
  })
})
