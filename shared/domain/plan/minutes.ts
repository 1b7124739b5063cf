import { z } from 'zod'

const minutes = (value: number) => z.number().min(0).max(240).default(value)

/**
 * A studio's own minutes for the actions of a changeover and for moving between rooms. The defaults are common
 * practice, no source; screens mark them as assumptions until the studio has changed them.
 */
export const minutesSchema = z.object({
  standMove: minutes(2),
  boomMove: minutes(3),
  modifier: minutes(2),
  gel: minutes(0.5),
  powerRemote: minutes(0),
  powerByHand: minutes(0.5),
  add: minutes(4),
  strike: minutes(1.5),
  support: minutes(2),
  panel: minutes(2),
  cameraMove: minutes(2),
  lens: minutes(1),
  background: minutes(6),
  testFrames: minutes(2),
  roomMove: minutes(15),
})
export type Minutes = z.infer<typeof minutesSchema>
export const DEFAULT_MINUTES: Minutes = minutesSchema.parse({})
