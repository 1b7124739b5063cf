import { describe, expect, it } from 'vitest'
import { moveId, plannedLooks, readPlan, wholeSetups } from '#shared/domain/plan/read-plan.ts'
import { id } from '#tests/support/lighting-sample.ts'
import { DAY, DOME, GALLERY, OTHER_DAY, planSample } from '#tests/support/plan-sample.ts'

const shot = (n: number, list: string, key: string) => ({
  id: id(100 + n),
  title: `Shot ${n}`,
  place: [list, key] as [string, string],
})

describe('readPlan', () => {
  it('puts shots into the order of their keys, ties by id, and numbers them over all days by date', () => {
    const plan = readPlan(
      planSample({
        days: [
          { id: DAY, date: '2026-12-04' },
          { id: OTHER_DAY, date: '2026-12-03' },
        ],
        shots: [shot(1, DAY, 'a1'), shot(2, DAY, 'a0'), shot(4, OTHER_DAY, 'b0'), shot(3, OTHER_DAY, 'b0')],
      }),
    )
    expect(plan.days.map((day) => day.day.date)).toEqual(['2026-12-03', '2026-12-04'])
    expect(plan.days.flatMap((day) => day.shots).map((planned) => [planned.number, planned.shot.title])).toEqual([
      [1, 'Shot 3'],
      [2, 'Shot 4'],
      [3, 'Shot 2'],
      [4, 'Shot 1'],
    ])
  })

  it('puts undated days last', () => {
    const plan = readPlan(planSample({ days: [{ id: DAY }, { id: OTHER_DAY, date: '2030-01-01' }] }))
    expect(plan.days.map((day) => day.day.id)).toEqual([OTHER_DAY, DAY])
  })

  it('leaves a shot loose whose day is gone, without a number', () => {
    const plan = readPlan(planSample({ shots: [shot(1, 'loose', 'a0'), shot(2, id(99), 'a0')] }))
    expect(plan.loose.map((planned) => [planned.number, planned.shot.title])).toEqual([
      [null, 'Shot 1'],
      [null, 'Shot 2'],
    ])
  })

  it('says what a shot misses, and gives it the default plan', () => {
    const [planned] = readPlan(planSample({ shots: [shot(1, DAY, 'a0')] })).days[0]?.shots ?? []
    expect(planned).toMatchObject({
      missing: ['set', 'setup', 'look'],
      plan: { minutes: 20 },
      set: null,
      room: null,
      setup: null,
    })
  })

  it('joins set, room, setup, looks and cover', () => {
    const input = planSample({
      shots: [{ ...shot(1, DAY, 'a0'), lookIds: [id(301)], coverFrameId: id(401) }],
      sets: [{ id: id(201), name: 'Pier', roomId: DOME }],
      shotPlans: [{ id: id(101), setId: id(201), setupId: id(501), minutes: 35 }],
      setups: [id(501)],
      sitters: [{ id: id(311), name: 'Ada' }],
      looks: [{ id: id(301), sitterId: id(311), name: 'Night coat' }],
      frames: [
        {
          id: id(401),
          box: [0, 0, 100, 100],
          picture: { uploadId: id(402), state: 'stored', widthPx: 10, heightPx: 10 },
        },
      ],
    })
    expect(readPlan(input).shots.get(id(101))).toMatchObject({
      missing: [],
      set: { name: 'Pier' },
      room: { name: 'Dome' },
      setup: { lights: [{ purpose: 'main' }] },
      looks: [{ look: { name: 'Night coat' }, sitter: { name: 'Ada' } }],
      cover: { id: id(401) },
      plan: { minutes: 35 },
    })
  })

  it('forgets links to what was taken away', () => {
    const input = planSample({
      shots: [{ ...shot(1, DAY, 'a0'), lookIds: [id(301)] }],
      shotPlans: [{ id: id(101), setId: id(201), setupId: id(501) }],
    })
    expect(readPlan(input).shots.get(id(101))).toMatchObject({ missing: ['set', 'setup', 'look'], looks: [] })
  })
})

describe('moveId', () => {
  it('is the same in both directions', () => {
    expect(moveId(DOME, GALLERY)).toBe(moveId(GALLERY, DOME))
  })
})

describe('wholeSetups', () => {
  it('leaves out lights of setups that are gone', () => {
    const { lighting } = planSample({ setups: [id(501)] })
    const setups = wholeSetups({ ...lighting, setups: new Map() })
    expect(setups.size).toBe(0)
  })
})

describe('plannedLooks', () => {
  it('sorts looks by sitter and rank and keeps one whose sitter is gone', () => {
    const { looks } = planSample({
      sitters: [{ id: id(311), name: 'Ada' }],
      looks: [
        { id: id(301), sitterId: id(311), name: 'Second', rank: 'a1' },
        { id: id(302), sitterId: id(311), name: 'First', rank: 'a0' },
        { id: id(303), sitterId: id(399), name: 'Nobody’s' },
      ],
    })
    expect([...plannedLooks(looks).values()].map((look) => [look.look.name, look.sitter?.name ?? null])).toEqual([
      ['First', 'Ada'],
      ['Second', 'Ada'],
      ['Nobody’s', null],
    ])
  })
})
