import { frameSchema, shotSchema } from '#shared/domain/board/schema.ts'
import { lightSchema, setupSchema } from '#shared/domain/lighting/schema.ts'
import { lookSchema, sitterSchema } from '#shared/domain/looks/schema.ts'
import { DEFAULT_MINUTES } from '#shared/domain/plan/minutes.ts'
import type { ReadPlanInput } from '#shared/domain/plan/read-plan.ts'
import { daySchema, moveSchema, ruleSchema, setSchema, shotPlanSchema } from '#shared/domain/plan/schema.ts'
import { briefSchema } from '#shared/domain/shoots/schema.ts'
import type { z } from 'zod'
import { OCTA, STAND, id, unit } from './lighting-sample.ts'

/** Items as they are written, before their defaults. */
export type PlanSample = {
  days?: readonly z.input<typeof daySchema>[]
  sets?: readonly z.input<typeof setSchema>[]
  moves?: readonly z.input<typeof moveSchema>[]
  shots?: readonly z.input<typeof shotSchema>[]
  shotPlans?: readonly z.input<typeof shotPlanSchema>[]
  rules?: readonly z.input<typeof ruleSchema>[]
  sitters?: readonly z.input<typeof sitterSchema>[]
  looks?: readonly z.input<typeof lookSchema>[]
  frames?: readonly z.input<typeof frameSchema>[]
  /** Ids of setups, each with one light a metre and a half up. */
  setups?: readonly string[]
}

export const DAY = id(1)
export const OTHER_DAY = id(2)
export const GALLERY = id(11)
export const DOME = id(12)

/** The items of a small shoot in two rooms, the gallery and the dome, as `readPlan` takes them. */
export function planSample(sample: PlanSample): ReadPlanInput {
  const brief = briefSchema.parse({
    title: 'Leaf and brass',
    zone: 'Europe/London',
    location: {},
    deliverables: [],
    rooms: [
      { id: GALLERY, name: 'Long gallery' },
      { id: DOME, name: 'Dome' },
    ],
  })
  const setups = (sample.setups ?? []).map((setupId) =>
    setupSchema.parse({
      id: setupId,
      name: `Setup ${setupId.slice(-2)}`,
      camera: { at: [0, 1.5, 3], focalMm: 85, fNumber: 8, iso: 100, shutterS: 0.005, whiteBalanceK: 5500 },
      background: { zM: -2, widthM: 4, heightM: 3, colour: '#806040' },
    }),
  )
  const lights = setups.map((setup, index) =>
    lightSchema.parse({
      id: id(700 + index),
      setupId: setup.id,
      purpose: 'main',
      unit: unit(),
      modifier: OCTA,
      support: STAND,
      power: 0.25,
      at: [1 + index, 1.8, 1],
      aim: [0, 1.5, 0],
    }),
  )
  return {
    brief,
    minutes: DEFAULT_MINUTES,
    board: { frames: byId(frameSchema, sample.frames), shots: byId(shotSchema, sample.shots) },
    plan: {
      days: byId(daySchema, sample.days ?? [{ id: DAY }]),
      sets: byId(setSchema, sample.sets),
      moves: byId(moveSchema, sample.moves),
      shotPlans: byId(shotPlanSchema, sample.shotPlans),
      rules: byId(ruleSchema, sample.rules),
    },
    looks: { sitters: byId(sitterSchema, sample.sitters), looks: byId(lookSchema, sample.looks), pieces: new Map() },
    lighting: {
      setups: new Map(setups.map((setup) => [setup.id, setup])),
      lights: new Map(lights.map((light) => [light.id, light])),
      sitterPlaces: new Map(),
      props: new Map(),
    },
  }
}

function byId<Schema extends z.ZodObject<{ id: z.ZodType<string> }>>(
  schema: Schema,
  items: readonly z.input<Schema>[] = [],
) {
  return new Map(items.map((item) => schema.parse(item)).map((item) => [String(item.id), item]))
}
