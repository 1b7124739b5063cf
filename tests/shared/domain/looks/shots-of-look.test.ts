import { describe, expect, it } from 'vitest'
import { LOOSE, shotSchema } from '#shared/domain/board/schema.ts'
import { lookSchema } from '#shared/domain/looks/schema.ts'
import { shotsInWords, shotsOfLook } from '#shared/domain/looks/shots-of-look.ts'
import { DEFAULT_MINUTES } from '#shared/domain/plan/minutes.ts'
import { type Plan, readPlan } from '#shared/domain/plan/read-plan.ts'
import { daySchema } from '#shared/domain/plan/schema.ts'
import { briefSchema } from '#shared/domain/shoots/schema.ts'

const uuid = (digit: number) => `00000000-0000-4000-8000-${String(digit).padStart(12, '0')}`
const day = daySchema.parse({ id: uuid(900) })
const look = lookSchema.parse({ id: uuid(800), sitterId: uuid(700), name: 'Night coat' })

/** A day of shots; those at these places wear the look, and loose ones by title. */
function planWith(placed: readonly boolean[], loose: readonly string[] = []): Plan {
  const shots = [
    ...placed.map((wears, index) =>
      shotSchema.parse({
        id: uuid(index + 1),
        title: `Shot ${index}`,
        place: [day.id, `a${index}`],
        lookIds: wears ? [look.id] : [],
      }),
    ),
    ...loose.map((title, index) =>
      shotSchema.parse({ id: uuid(index + 100), title, place: [LOOSE, 'a0'], lookIds: [look.id] }),
    ),
  ]
  const none = new Map()
  return readPlan({
    brief: briefSchema.parse({ title: 'Hilltop', zone: 'Europe/London', location: {}, rooms: [], deliverables: [] }),
    minutes: DEFAULT_MINUTES,
    board: { frames: none, shots: new Map(shots.map((shot) => [String(shot.id), shot])) },
    plan: { days: new Map([[String(day.id), day]]), sets: none, moves: none, shotPlans: none, rules: none },
    looks: { sitters: none, looks: new Map([[String(look.id), look]]), pieces: none },
    lighting: { setups: none, lights: none, sitterPlaces: none, props: none },
  })
}

const words = (plan: Plan) => shotsInWords(shotsOfLook(plan, look.id))

describe('shotsOfLook', () => {
  it('finds the shots that wear the look, in running order, loose ones last', () => {
    const shots = shotsOfLook(planWith([false, true, false, true], ['At the eyepiece']), look.id)
    expect(shots.map(({ number }) => number)).toEqual([2, 4, null])
  })
})

describe('shotsInWords', () => {
  it('is said as people say it', () => {
    expect(words(planWith([false, true]))).toBe('shot 2')
    expect(words(planWith([true, true]))).toBe('shots 1 and 2')
    expect(words(planWith([false, false, true, true, false, true]))).toBe('shots 3, 4 and 6')
    expect(words(planWith([true], ['At the eyepiece']))).toBe('shot 1 and “At the eyepiece”')
    expect(words(planWith([], ['At the eyepiece']))).toBe('“At the eyepiece”')
    expect(words(planWith([false]))).toBe('')
  })
})
