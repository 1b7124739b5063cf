import { z } from 'zod'
import { dayIdSchema, roomIdSchema, ruleIdSchema, setIdSchema, setupIdSchema, shotIdSchema } from '#shared/ids.ts'
import { civilDateSchema, clockMinSchema, colourSchema, lineSchema, proseSchema } from '#shared/domain/text.ts'

/** One day of shooting. Times are minutes since midnight in the shoot's zone. */
export const daySchema = z.object({
  id: dayIdSchema,
  date: civilDateSchema.nullable().default(null),
  lightsOnMin: clockMinSchema.default(600),
  hardOutMin: clockMinSchema.default(1080),
  /** Meal: its length, and the latest it may start counted from lights-on; null for no meal. */
  meal: z
    .object({ minutes: z.number().int().min(5).max(180), latestAfterMin: z.number().int().min(30).max(720) })
    .nullable()
    .default({ minutes: 45, latestAfterMin: 300 }),
  /** People who can move lights. */
  hands: z.number().int().min(1).max(20).default(2),
  /** Hair and make-up places; null is unlimited (an assumption, said on screen). */
  chairs: z.number().int().min(1).max(20).nullable().default(null),
})
export type Day = z.infer<typeof daySchema>

export const setSchema = z.object({
  id: setIdSchema,
  name: lineSchema(80),
  roomId: roomIdSchema.nullable().default(null),
  background: proseSchema(200).default(''),
  colour: colourSchema.nullable().default(null),
  dressMin: z.number().min(0).max(480).default(0),
  strikeMin: z.number().min(0).max(480).default(0),
  note: proseSchema(2000).default(''),
})
export type Set = z.infer<typeof setSchema>

/** Minutes to move the whole party between two rooms; the id is both room ids sorted and joined by `:`. */
export const moveSchema = z.object({
  id: z.string().max(80),
  minutes: z.number().min(0).max(480),
})
export type RoomMove = z.infer<typeof moveSchema>

export const ORIENTATIONS = ['upright', 'across', 'square'] as const

/** What the plan says of a shot (its title, looks and order are on the board). */
export const shotPlanSchema = z.object({
  id: shotIdSchema,
  setId: setIdSchema.nullable().default(null),
  setupId: setupIdSchema.nullable().default(null),
  minutes: z.number().min(1).max(480).default(20),
  frames: z.number().int().min(1).max(9999).default(40),
  lens: proseSchema(80).default(''),
  orientation: z.enum(ORIENTATIONS).default('upright'),
})
export type ShotPlan = z.infer<typeof shotPlanSchema>

/**
 * A rule about the order. `pin`: this shot stays at this place (0-based, counted among the day's shots; -1 is last)
 * or starts at this clock time within a tolerance; `after`: comes after that one (not necessarily at once);
 * `together`: directly follow one another in any order; `window`: lies wholly within these hours.
 */
export const ruleBodySchema = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('pin-place'), shotId: shotIdSchema, index: z.number().int().min(-1).max(999) }),
  z.object({
    kind: z.literal('pin-clock'),
    shotId: shotIdSchema,
    atMin: clockMinSchema,
    toleranceMin: z.number().min(0).max(240),
  }),
  z.object({ kind: z.literal('after'), shotId: shotIdSchema, afterShotId: shotIdSchema }),
  z.object({ kind: z.literal('together'), shotIds: z.array(shotIdSchema).min(2).max(30) }),
  z.object({ kind: z.literal('window'), shotId: shotIdSchema, fromMin: clockMinSchema, toMin: clockMinSchema }),
])
export type RuleBody = z.infer<typeof ruleBodySchema>
export const ruleSchema = z.object({ id: ruleIdSchema, rule: ruleBodySchema })
export type Rule = z.infer<typeof ruleSchema>
