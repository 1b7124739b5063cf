import type { LookId, SetId, ShotId, SitterId } from '#shared/ids.ts'
import type { ChangeAction } from '#shared/domain/lighting/changeover.ts'
import type { BrokenRule } from './rules.ts'
import type { MealBreak } from './wardrobe.ts'

/** One sitter getting ready for a shot. */
export type WardrobeChange = {
  sitterId: SitterId
  sitterName: string
  lookId: LookId
  lookName: string
  chairMin: number
  changeMin: number
  /** Whether it is the sitter's first look of the day. */
  first: boolean
  /** Minutes of it that the clock waits for; the rest is hidden behind other work. */
  onClockMin: number
}

export type SetMove = {
  fromSetId: SetId | null
  fromSetName: string
  toSetId: SetId | null
  toSetName: string
  fromRoomName: string
  toRoomName: string
  /** Whether the party goes to another room. */
  otherRoom: boolean
  moveMin: number
  strikeMin: number
  dressMin: number
}

/** Everything between two shots, spelled out. All in minutes. */
export type Changeover = {
  fromShotId: ShotId | null
  /** From the end of the shot before (lights-on for the first) to the start of this one, without the meal. */
  minutes: number
  lighting: readonly ChangeAction[]
  lightingMin: number
  changesLight: boolean
  setMove: SetMove | null
  wardrobe: readonly WardrobeChange[]
  /** Minutes in which everything waits for a sitter. */
  wardrobeWaitMin: number
  /** Minutes in which everything waits for a window to open or a clock pin. */
  holdWaitMin: number
}

export type ScheduledShot = {
  shotId: ShotId
  startMin: number
  endMin: number
  mealBefore: MealBreak | null
  changeover: Changeover
  /** The earliest its windows and clock pins allow; null: any time. */
  notBeforeMin: number | null
  /** Whether it ends by the hard out. */
  made: boolean
}

/** When a sitter starts: worked back from the first shot. */
export type Call = {
  sitterId: SitterId
  sitterName: string
  /** Rounded down to five minutes; travel counts. */
  callMin: number
  /** Into the chair, or into the clothes when there is no chair. */
  beginMin: number
  firstShotId: ShotId
  firstStartMin: number
  chairMin: number
  changeMin: number
  travelMin: number
}

export type DaySchedule = {
  shots: readonly ScheduledShot[]
  lightsOnMin: number
  hardOutMin: number
  wrapMin: number
  meal: MealBreak | null
  broken: readonly BrokenRule[]
  calls: readonly Call[]
  /** Minutes each sitter waits between own shots. */
  waiting: readonly { sitterId: SitterId; minutes: number }[]
  waitingMin: number
  lightingChanges: number
  roomMoves: number
  wardrobeOnClock: number
  /** Minutes spent changing over, the rigging of the first shot included. */
  changeoverMin: number
}
