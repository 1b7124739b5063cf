import type { DayId, LookId, RoomId, SetId, SetupId, ShotId, SitterId } from '#shared/ids.ts'
import type { Need } from '#shared/domain/board/schema.ts'
import { type ChangeAction, changeActions, changesLight, lightingMinutes } from '#shared/domain/lighting/changeover.ts'
import { type Plan, type PlannedShot, moveId } from '#shared/domain/plan/read-plan.ts'
import { type BrokenRule, type ProblemRule, problemRules } from './rules.ts'

/** What one sitter wears in a shot: looks are indices into the problem's `looks`. Usually both are the same. */
export type Wear = { sitter: number; firstLook: number; lastLook: number }

export type ProblemShot = {
  id: ShotId
  /** Number in the running order as it stands. */
  number: number
  title: string
  minutes: number
  need: Need
  setId: SetId | null
  setName: string
  roomId: RoomId | null
  roomName: string
  setupId: SetupId | null
  setupName: string
  /** One entry a sitter, in the order in which the looks are listed on the shot. */
  wears: readonly Wear[]
}

export type ProblemSitter = {
  id: SitterId
  name: string
  /** Minutes since midnight; null: here the whole day, and as early as the first shot needs. */
  hours: readonly [fromMin: number, toMin: number] | null
  chairMin: number
  travelMin: number
}

export type ProblemLook = {
  id: LookId
  sitter: number
  name: string
  changeMin: number
  /** Hair and make-up as one word to compare: another one means another turn in the chair. */
  style: string
}

/** What changes between two shots apart from wardrobe; all in minutes. */
export type Transition = {
  lightingMin: number
  /** Whether any light, panel or background changes: a lighting change. */
  changesLight: boolean
  moveMin: number
  strikeMin: number
  dressMin: number
  /** Index into the problem's `actionLists`. */
  actions: number
}

/**
 * One day as numbers: everything the order of its shots depends on, and the words to spell the changeovers out. It
 * is plain data and can be posted to a worker. Minutes are rounded to quarters, so that sums are exact and ties are
 * real ties.
 */
export type OrderProblem = {
  dayId: DayId
  /** In the order as it stands. */
  shots: readonly ProblemShot[]
  sitters: readonly ProblemSitter[]
  looks: readonly ProblemLook[]
  lightsOnMin: number
  hardOutMin: number
  meal: { minutes: number; latestAfterMin: number } | null
  hands: number
  chairs: number | null
  /** `[from + 1][to]`; row 0 is the start of the day, from nothing. */
  transitions: readonly (readonly Transition[])[]
  actionLists: readonly (readonly ChangeAction[])[]
  rules: readonly ProblemRule[]
  /** Broken whatever the order of this day: a rule with a shot of another day. */
  faults: readonly BrokenRule[]
}

/** To quarters of a minute. */
export function quarter(minutes: number): number {
  return Math.round(minutes * 4) / 4
}

/** Text as it is compared: composed, trimmed, without regard to case. */
function plain(text: string): string {
  return text.normalize('NFC').trim().toLowerCase()
}

/**
 * The problem of one day, as the plan stands.
 *
 * Readings where the plan says less than the day needs: a shot without a setup costs no light, and the next one is
 * rigged from nothing; sets whose rooms are not known count as one room; a shot without a set changes nothing about
 * sets, and the next set is dressed; a sitter with several looks in one shot comes in the first, leaves in the last,
 * and changes inside the shot's own minutes.
 *
 * @throws when the day is not in the plan.
 */
export function orderProblem(plan: Plan, dayId: string): OrderProblem {
  const planned = plan.days.find((day) => day.day.id === dayId)
  if (!planned) throw new RangeError(`no day ${dayId} in this plan`)
  const { day } = planned
  const sitters: ProblemSitter[] = []
  const looks: ProblemLook[] = []
  const sitterIndex = new Map<string, number>()
  const lookIndex = new Map<string, number>()
  const shots = planned.shots.map((shot, at) => problemShot(shot, at, { sitters, looks, sitterIndex, lookIndex }))

  const actionLists: ChangeAction[][] = [[]]
  const listOf = new Map<string, number>()
  const lightingOf = (from: PlannedShot | null, to: PlannedShot, sameRoom: boolean): [number, number] => {
    if (!to.setup) return [0, 0]
    const key = `${from?.setup?.setup.id ?? '-'}>${to.setup.setup.id}:${sameRoom ? 'same' : 'other'}`
    let list = listOf.get(key)
    if (list === undefined) {
      list = actionLists.push(changeActions(from?.setup ?? null, to.setup, { sameRoom, minutes: plan.minutes })) - 1
      listOf.set(key, list)
    }
    const actions = actionLists[list] ?? []
    return [quarter(lightingMinutes(actions, day.hands, plan.minutes)), list]
  }
  const transition = (from: PlannedShot | null, to: PlannedShot): Transition => {
    const rooms = [from?.set?.roomId ?? null, to.set?.roomId ?? null] as const
    const sameRoom = rooms[0] === null || rooms[1] === null || rooms[0] === rooms[1]
    const [lightingMin, actions] = lightingOf(from, to, sameRoom)
    const changes = to.set !== null && from?.set?.id !== to.set.id
    const given = sameRoom ? undefined : plan.moves.get(moveId(rooms[0] ?? '', rooms[1] ?? ''))
    return {
      lightingMin,
      actions,
      changesLight: (actionLists[actions] ?? []).some(changesLight),
      moveMin: sameRoom ? 0 : quarter(given?.minutes ?? plan.minutes.roomMove),
      strikeMin: changes ? quarter(from?.set?.strikeMin ?? 0) : 0,
      dressMin: changes ? quarter(to.set?.dressMin ?? 0) : 0,
    }
  }
  const { rules, faults } = problemRules(plan, planned)
  return {
    dayId: day.id,
    shots,
    sitters,
    looks,
    lightsOnMin: day.lightsOnMin,
    hardOutMin: day.hardOutMin,
    meal: day.meal,
    hands: day.hands,
    chairs: day.chairs,
    transitions: [null, ...planned.shots].map((from) => planned.shots.map((to) => transition(from, to))),
    actionLists,
    rules,
    faults,
  }
}

type People = {
  sitters: ProblemSitter[]
  looks: ProblemLook[]
  sitterIndex: Map<string, number>
  lookIndex: Map<string, number>
}

function problemShot(planned: PlannedShot, at: number, people: People): ProblemShot {
  const wears: Wear[] = []
  for (const { look, sitter } of planned.looks) {
    if (!sitter) continue
    let s = people.sitterIndex.get(sitter.id)
    if (s === undefined) {
      const { id, hours } = sitter
      const name = sitter.character === '' ? sitter.name : sitter.character
      s = people.sitters.push({ id, name, hours, chairMin: quarter(sitter.chairMin), travelMin: sitter.travelMin }) - 1
      people.sitterIndex.set(id, s)
    }
    let l = people.lookIndex.get(look.id)
    if (l === undefined) {
      const style = `${plain(look.hair)}\n${plain(look.makeUp)}`
      l = people.looks.push({ id: look.id, sitter: s, name: look.name, changeMin: quarter(look.changeMin), style }) - 1
      people.lookIndex.set(look.id, l)
    }
    const worn = wears.findIndex((wear) => wear.sitter === s)
    const before = wears[worn]
    if (before) wears[worn] = { ...before, lastLook: l }
    else wears.push({ sitter: s, firstLook: l, lastLook: l })
  }
  return {
    id: planned.shot.id,
    number: planned.number ?? at + 1,
    title: planned.shot.title,
    minutes: quarter(planned.plan.minutes),
    need: planned.shot.need,
    setId: planned.set?.id ?? null,
    setName: planned.set?.name ?? '',
    roomId: planned.room?.id ?? null,
    roomName: planned.room?.name ?? '',
    setupId: planned.setup?.setup.id ?? null,
    setupName: planned.setup?.setup.name ?? '',
    wears,
  }
}
