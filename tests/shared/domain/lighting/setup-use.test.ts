import { describe, expect, it } from 'vitest'
import { shotSchema } from '#shared/domain/board/schema.ts'
import { daySchema, setSchema, shotPlanSchema } from '#shared/domain/plan/schema.ts'
import { readPlan } from '#shared/domain/plan/read-plan.ts'
import { briefSchema } from '#shared/domain/shoots/schema.ts'
import { setupUse, widestOf } from '#shared/domain/lighting/setup-use.ts'
import { MINUTES, id, whole } from '#tests/support/lighting-sample.ts'

const { setup } = whole({})
const dayId = id(500)
const shot = (n: number, list: string) =>
  shotSchema.parse({ id: id(n), title: `Shot ${n}`, place: [list, `a${n - 600}`] })
const planned = (n: number, more: object) =>
  shotPlanSchema.parse({ id: id(n), setupId: setup.id, setId: id(700), frames: 30, ...more })
const plan = readPlan({
  brief: briefSchema.parse({ title: 'A shoot', zone: 'Europe/London', location: {}, rooms: [], deliverables: [] }),
  minutes: MINUTES,
  board: {
    frames: new Map(),
    shots: new Map([shot(601, dayId), shot(602, dayId), shot(603, 'loose')].map((entry) => [entry.id, entry])),
  },
  plan: {
    days: new Map([[dayId, daySchema.parse({ id: dayId })]]),
    sets: new Map([[id(700), setSchema.parse({ id: id(700), name: 'Dome' })]]),
    moves: new Map(),
    shotPlans: new Map(
      [planned(601, {}), planned(602, { orientation: 'across' }), planned(603, {})].map((entry) => [entry.id, entry]),
    ),
    rules: new Map(),
  },
  looks: { sitters: new Map(), looks: new Map(), pieces: new Map() },
  lighting: { setups: new Map([[setup.id, setup]]), lights: new Map(), sitterPlaces: new Map(), props: new Map() },
})

describe('setupUse', () => {
  it('names sets and shots, adds up frames and gathers orientations', () => {
    expect(setupUse(plan, setup.id)).toMatchObject({
      words: 'Dome · shots 1 and 2 and 1 loose shot',
      frames: 90,
      orientations: ['upright', 'across'],
    })
  })
  it('has no frames and is upright where no shot uses it', () => {
    expect(setupUse(plan, id(2))).toMatchObject({ words: 'no shot yet', frames: null, orientations: ['upright'] })
  })
})

describe('widestOf', () => {
  it('is across as soon as one shot is', () => {
    expect([widestOf(['upright', 'across']), widestOf(['square']), widestOf([])]).toEqual([
      'across',
      'square',
      'upright',
    ])
  })
})
