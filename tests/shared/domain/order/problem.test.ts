import { describe, expect, it } from 'vitest'
import { orderProblem, quarter } from '#shared/domain/order/problem.ts'
import { schedule } from '#shared/domain/order/schedule.ts'
import { moveId, readPlan } from '#shared/domain/plan/read-plan.ts'
import { id } from '#tests/support/lighting-sample.ts'
import { DAY, DOME, GALLERY, planSample } from '#tests/support/plan-sample.ts'

const shot = (n: number, lookIds: string[] = []) => ({
  id: id(100 + n),
  title: `Shot ${n}`,
  place: [DAY, `a${n}`] as [string, string],
  lookIds,
})

const SAMPLE = {
  shots: [shot(1, [id(301)]), shot(2, [id(302)]), shot(3)],
  sets: [
    { id: id(201), name: 'Bench', roomId: GALLERY, dressMin: 10, strikeMin: 5 },
    { id: id(202), name: 'Pier', roomId: DOME, dressMin: 20, strikeMin: 7 },
  ],
  setups: [id(501), id(502)],
  shotPlans: [
    { id: id(101), setId: id(201), setupId: id(501), minutes: 30 },
    { id: id(102), setId: id(202), setupId: id(501), minutes: 25.1 },
    { id: id(103), setId: id(202) },
  ],
  sitters: [{ id: id(311), name: 'Ada', character: 'The Astronomer', chairMin: 40 }],
  looks: [
    { id: id(301), sitterId: id(311), name: 'Work coat', hair: 'Pinned', changeMin: 12 },
    { id: id(302), sitterId: id(311), name: 'Night coat', hair: ' pinned ', changeMin: 15 },
  ],
}

describe('orderProblem', () => {
  it('takes the given move, the strike of the old set and the dressing of the new', () => {
    const input = planSample({ ...SAMPLE, moves: [{ id: moveId(GALLERY, DOME), minutes: 22 }] })
    expect(orderProblem(readPlan(input), DAY).transitions[1]?.[1]).toMatchObject({
      moveMin: 22,
      strikeMin: 5,
      dressMin: 20,
    })
  })

  it('falls back to the studio’s minutes between rooms', () => {
    expect(orderProblem(readPlan(planSample(SAMPLE)), DAY).transitions[1]?.[1]?.moveMin).toBe(15)
  })

  it('dresses the first set and strikes nothing', () => {
    expect(orderProblem(readPlan(planSample(SAMPLE)), DAY).transitions[0]?.[0]).toMatchObject({
      moveMin: 0,
      strikeMin: 0,
      dressMin: 10,
    })
  })

  it('moves every light to another room although the setup is the same', () => {
    const problem = orderProblem(readPlan(planSample(SAMPLE)), DAY)
    const there = problem.transitions[1]?.[1]
    expect(problem.actionLists[there?.actions ?? 0]?.map((action) => action.kind)).toEqual(
      expect.arrayContaining(['move', 'camera']),
    )
    // Stand and camera at the same time by two hands, 2 minutes each, and 2 of test frames.
    expect(there).toMatchObject({ lightingMin: 4, changesLight: true })
  })

  it('costs no light to get to a shot without a setup, and rigs from nothing after it', () => {
    const problem = orderProblem(readPlan(planSample(SAMPLE)), DAY)
    expect(problem.transitions[1]?.[2]).toMatchObject({ lightingMin: 0, changesLight: false })
    expect(problem.transitions[3]?.[1]?.lightingMin).toBe(problem.transitions[0]?.[1]?.lightingMin)
  })

  it('names sitters by their character and compares hair and make-up without regard to case and spaces', () => {
    const problem = orderProblem(readPlan(planSample(SAMPLE)), DAY)
    expect(problem.sitters).toMatchObject([{ name: 'The Astronomer', chairMin: 40, hours: null }])
    expect(problem.looks[0]?.style).toBe(problem.looks[1]?.style)
  })

  it('lets a sitter with two looks in one shot come in the first and leave in the last', () => {
    const input = planSample({ ...SAMPLE, shots: [shot(1, [id(301), id(302)])] })
    expect(orderProblem(readPlan(input), DAY).shots[0]?.wears).toEqual([{ sitter: 0, firstLook: 0, lastLook: 1 }])
  })

  it('is plain data that a worker can be sent, and schedules', () => {
    const problem = orderProblem(readPlan(planSample(SAMPLE)), DAY)
    expect(JSON.parse(JSON.stringify(problem))).toEqual(problem)
    const day = schedule(
      problem,
      problem.shots.map((one) => one.id),
    )
    expect(day.shots[1]?.changeover.setMove).toMatchObject({
      fromSetName: 'Bench',
      toSetName: 'Pier',
      otherRoom: true,
      toRoomName: 'Dome',
    })
  })

  it('knows no day that is not in the plan', () => {
    expect(() => orderProblem(readPlan(planSample({})), id(77))).toThrow(RangeError)
  })
})

describe('quarter', () => {
  it('rounds to quarters of a minute, so that sums are exact', () => {
    expect([25.1, 0.125, 7.5].map(quarter)).toEqual([25, 0.25, 7.5])
  })
})
