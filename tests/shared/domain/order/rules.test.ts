import { describe, expect, it } from 'vitest'
import { orderProblem } from '#shared/domain/order/problem.ts'
import {
  type RuleKey,
  placeLabel,
  problemRules,
  ruleKeys,
  ruleWords,
  withOnlyRules,
} from '#shared/domain/order/rules.ts'
import { readPlan } from '#shared/domain/plan/read-plan.ts'
import { type RuleBody, handDay, ruleId, sitterId } from '#tests/support/hand-day.ts'
import { id } from '#tests/support/lighting-sample.ts'
import { DAY, OTHER_DAY, planSample } from '#tests/support/plan-sample.ts'

const RULES: readonly RuleBody[] = [
  { kind: 'pin-place', shot: 0, index: 0 },
  { kind: 'pin-place', shot: 2, index: -1 },
  { kind: 'pin-clock', shot: 1, atMin: 840, toleranceMin: 10 },
  { kind: 'after', shot: 2, after: 0 },
  { kind: 'together', shots: [0, 1, 2] },
  { kind: 'window', shot: 1, fromMin: 900, toMin: 960 },
]

const problem = handDay({
  shots: [{ looks: ['coat'] }, {}, {}],
  rules: RULES,
  meal: { minutes: 30, latestAfterMin: 300 },
  looks: { coat: { sitter: 'Ada', changeMin: 5 } },
  sitters: { Ada: { hours: [600, 900] } },
})

describe('ruleWords', () => {
  it('says each rule in plain words', () => {
    expect(ruleKeys(problem).map((key) => ruleWords(problem, key))).toEqual([
      'Shot 1 stays first',
      'Shot 3 stays last',
      'Shot 2 starts at 14:00, 10 min either way at most',
      'Shot 3 comes after shot 1',
      'Shot 1, shot 2 and shot 3 follow one another directly',
      'Shot 2 lies between 15:00 and 16:00',
      'Ada is here from 10:00 to 15:00',
      'The meal begins no later than 14:00',
    ])
  })
})

describe('withOnlyRules', () => {
  it('leaves out rules, hours and meal that are not named', () => {
    const bare = withOnlyRules(problem, new Set<RuleKey>([`rule:${ruleId(3)}`]))
    expect(bare.rules.map((rule) => rule.kind)).toEqual(['after'])
    expect(bare).toMatchObject({ meal: null, sitters: [{ id: sitterId(0), hours: null }] })
    expect(withOnlyRules(problem, new Set(ruleKeys(problem)))).toEqual(problem)
  })
})

describe('placeLabel', () => {
  it('reads like a place', () => {
    expect([-1, 0, 3, 11].map(placeLabel)).toEqual(['last', 'first', 'fourth', '12th'])
  })
})

describe('problemRules', () => {
  const shot = (n: number, list: string) => ({
    id: id(100 + n),
    title: `Shot ${n}`,
    place: [list, `a${n}`] as [string, string],
  })
  const faultsOf = (after: string, rule: 'after' | 'together' = 'after') => {
    const body =
      rule === 'after'
        ? { kind: 'after' as const, shotId: id(101), afterShotId: id(102) }
        : { kind: 'together' as const, shotIds: [id(101), id(102)] }
    const plan = readPlan(
      planSample({
        days: [
          { id: DAY, date: '2026-12-03' },
          { id: OTHER_DAY, date: '2026-12-04' },
        ],
        shots: [shot(1, DAY), shot(2, after)],
        rules: [{ id: id(601), rule: body }],
      }),
    )
    return orderProblem(plan, DAY).faults.map((fault) => fault.words)
  }

  it('cannot keep “after” a shot of a later day, or one that is not placed', () => {
    expect(faultsOf(OTHER_DAY)).toEqual(['“Shot 1” comes after “Shot 2”, which is on a later day.'])
    expect(faultsOf('loose')).toEqual(['“Shot 1” comes after “Shot 2”, which is not placed yet.'])
    expect(faultsOf(DAY)).toEqual([])
  })

  it('cannot keep shots together that are on two days', () => {
    expect(faultsOf(OTHER_DAY, 'together')).toEqual([
      '“Shot 1” and “Shot 2” belong together, but not all of them are on this day.',
    ])
  })

  it('holds “after” a shot of an earlier day for kept', () => {
    const plan = readPlan(
      planSample({
        days: [
          { id: DAY, date: '2026-12-03' },
          { id: OTHER_DAY, date: '2026-12-04' },
        ],
        shots: [shot(1, OTHER_DAY), shot(2, DAY)],
        rules: [{ id: id(601), rule: { kind: 'after', shotId: id(101), afterShotId: id(102) } }],
      }),
    )
    const later = plan.days[1]
    expect(later && problemRules(plan, later)).toEqual({ rules: [], faults: [] })
  })
})
