import {
  dayIdSchema,
  lookIdSchema,
  roomIdSchema,
  ruleIdSchema,
  setIdSchema,
  setupIdSchema,
  shotIdSchema,
  sitterIdSchema,
} from '#shared/ids.ts'
import type { OrderProblem, ProblemLook, ProblemShot, ProblemSitter, Transition } from '#shared/domain/order/problem.ts'
import type { ProblemRule } from '#shared/domain/order/rules.ts'
import { schedule } from '#shared/domain/order/schedule.ts'

/** A readable id: the number in the last digits of a UUID. */
export function idOf(kind: number, number: number): string {
  return `00000000-0000-4000-8${String(kind).padStart(3, '0')}-${String(number).padStart(12, '0')}`
}

export type DayRecipe = {
  shots: number
  /** How many rules of each kind at most. */
  rules?: number
  sitters?: number
  setups?: number
  sets?: number
  meal?: boolean
  chairs?: number | null
  hours?: boolean
  hardOutMin?: number
}

const NEEDS = ['must', 'must', 'should', 'could'] as const

/** A problem made from a generator of numbers in [0, 1): setups, sets and rooms, looks on sitters, rules of every kind. */
export function randomDay(random: () => number, recipe: DayRecipe): OrderProblem {
  const upTo = (most: number) => Math.floor(random() * (most + 1))
  const pick = <T>(items: readonly T[]): T => items[upTo(items.length - 1)] as T
  const { shots: n } = recipe
  const lightsOnMin = 600
  const sitterCount = recipe.sitters ?? 1 + upTo(2)
  const sitters: ProblemSitter[] = Array.from({ length: sitterCount }, (_, s) => {
    const from = 570 + 15 * upTo(6)
    const hours = recipe.hours !== false && random() < 0.4 ? ([from, from + 120 + 15 * upTo(20)] as const) : null
    return {
      id: sitterIdSchema.parse(idOf(1, s)),
      name: `Sitter ${s}`,
      hours,
      chairMin: 5 * upTo(6),
      travelMin: 10 * upTo(3),
    }
  })
  const looks: ProblemLook[] = []
  const looksOf = sitters.map((_, s) =>
    Array.from({ length: 1 + upTo(2) }, () => {
      const id = lookIdSchema.parse(idOf(2, looks.length))
      return (
        looks.push({ id, sitter: s, name: `Look ${looks.length}`, changeMin: 5 * upTo(4), style: String(upTo(1)) }) - 1
      )
    }),
  )
  const setups = recipe.setups ?? 3
  const sets = recipe.sets ?? 3
  const places = Array.from({ length: sets }, (_, set) => ({
    set,
    room: upTo(1),
    dressMin: 5 * upTo(2),
    strikeMin: 5 * upTo(2),
  }))
  const shots: ProblemShot[] = Array.from({ length: n }, (_, index) => {
    const place = pick(places)
    const setup = upTo(setups - 1)
    const wears = sitters.flatMap((_sitter, s) => {
      if (random() < 0.45) return []
      const own = looksOf[s] ?? []
      return [{ sitter: s, firstLook: pick(own), lastLook: pick(own) }].map((wear) =>
        random() < 0.8 ? { ...wear, lastLook: wear.firstLook } : wear,
      )
    })
    return {
      // Ids run against the order for every other shot, so that the last tier of the objective has something to do.
      id: shotIdSchema.parse(idOf(3, (index * 7 + 3) % 1000)),
      number: index + 1,
      title: `Shot ${index + 1}`,
      minutes: 5 + 5 * upTo(7),
      need: pick(NEEDS),
      setId: setIdSchema.parse(idOf(4, place.set)),
      setName: `Set ${place.set}`,
      roomId: roomIdSchema.parse(idOf(5, place.room)),
      roomName: `Room ${place.room}`,
      setupId: setupIdSchema.parse(idOf(6, setup)),
      setupName: `Setup ${setup}`,
      wears,
    }
  })
  const lightingOf = Array.from({ length: (setups + 1) * setups }, () => 2.5 * (1 + upTo(6)))
  const setupIndex = (shot: ProblemShot) => Number((shot.setupId ?? '').slice(-12))
  const placeIndex = (shot: ProblemShot) => Number((shot.setId ?? '').slice(-12))
  const transition = (from: ProblemShot | null, to: ProblemShot): Transition => {
    const before = from ? places[placeIndex(from)] : undefined
    const after = places[placeIndex(to)]
    const sameSet = before?.set === after?.set
    const sameSetup = from !== null && setupIndex(from) === setupIndex(to) && before?.room === after?.room
    const lightingMin = sameSetup
      ? 0
      : (lightingOf[((from ? setupIndex(from) : -1) + 1) * setups + setupIndex(to)] ?? 0)
    return {
      lightingMin,
      changesLight: lightingMin > 0,
      actions: 0,
      moveMin: before && before.room !== after?.room ? 15 : 0,
      strikeMin: sameSet ? 0 : (before?.strikeMin ?? 0),
      dressMin: sameSet ? 0 : (after?.dressMin ?? 0),
    }
  }
  const most = recipe.rules ?? 2
  const rules: ProblemRule[] = []
  const rule = (body: DistributiveOmit<ProblemRule, 'ruleId'>) =>
    rules.push({ ...body, ruleId: ruleIdSchema.parse(idOf(7, rules.length)) })
  const shot = () => upTo(n - 1)
  for (let count = n > 1 ? upTo(most) : 0; count > 0; count--) {
    const one = shot()
    const other = (one + 1 + upTo(n - 2)) % n
    const from = 600 + 15 * upTo(16)
    const kind = upTo(4)
    if (kind === 0) rule({ kind: 'pin-place', shot: one, index: random() < 0.3 ? -1 : upTo(n) })
    else if (kind === 1) rule({ kind: 'pin-clock', shot: one, atMin: from, toleranceMin: 5 * upTo(6) })
    else if (kind === 2) rule({ kind: 'after', shot: one, after: other })
    else if (kind === 3) rule({ kind: 'together', shots: [...new Set([one, other, shot()])] })
    else rule({ kind: 'window', shot: one, fromMin: from, toMin: from + 60 + 15 * upTo(10) })
  }
  const withMeal = recipe.meal ?? random() < 0.6
  return {
    dayId: dayIdSchema.parse(idOf(8, 0)),
    shots,
    sitters,
    looks,
    lightsOnMin,
    hardOutMin: recipe.hardOutMin ?? 720 + 30 * upTo(14),
    meal: withMeal ? { minutes: 30 + 15 * upTo(1), latestAfterMin: 60 + 30 * upTo(5) } : null,
    hands: 2,
    chairs: recipe.chairs === undefined ? pick([null, 1, 2]) : recipe.chairs,
    transitions: [null, ...shots].map((from) => shots.map((to) => transition(from, to))),
    actionLists: [[]],
    rules,
    faults: [],
  }
}

/** Every order of some things. */
export function* permutations<T>(items: readonly T[]): Generator<T[]> {
  if (items.length < 2) {
    yield [...items]
    return
  }
  for (const [index, first] of items.entries()) {
    for (const rest of permutations([...items.slice(0, index), ...items.slice(index + 1)])) yield [first, ...rest]
  }
}

/**
 * A day on which all rules can be kept: rules of every kind are read off the times of a hidden order, with some give.
 * Returned in another order than the hidden one.
 */
export function plannedDay(random: () => number, recipe: DayRecipe): OrderProblem {
  const upTo = (most: number) => Math.floor(random() * (most + 1))
  const bare = randomDay(random, { ...recipe, rules: 0, hours: false, hardOutMin: recipe.hardOutMin ?? 2000 })
  const hidden = bare.shots.map((_, index) => index)
  for (let at = hidden.length - 1; at > 0; at--) {
    const other = upTo(at)
    ;[hidden[at], hidden[other]] = [hidden[other] ?? 0, hidden[at] ?? 0]
  }
  const shotIds = hidden.flatMap((index) => bare.shots[index]?.id ?? [])
  const day = schedule({ ...bare, meal: null }, shotIds)
  const timesOf = (place: number) => ({
    startMin: day.shots[place]?.startMin ?? 0,
    endMin: day.shots[place]?.endMin ?? 0,
  })
  const give = 60 + (bare.meal?.minutes ?? 0)
  const rules: ProblemRule[] = []
  const rule = (body: DistributiveOmit<ProblemRule, 'ruleId'>) =>
    rules.push({ ...body, ruleId: ruleIdSchema.parse(idOf(7, rules.length)) })
  const n = hidden.length
  for (let count = recipe.rules ?? 4; count > 0 && n > 2; count--) {
    const place = upTo(n - 2)
    const shot = hidden[place] ?? 0
    const next = hidden[place + 1] ?? 0
    const { startMin, endMin } = timesOf(place)
    const kind = count % 5
    if (kind === 0) rule({ kind: 'pin-place', shot: hidden[0] ?? 0, index: 0 })
    else if (kind === 1) rule({ kind: 'after', shot: hidden[place + 1 + upTo(n - 2 - place)] ?? next, after: shot })
    else if (kind === 2) rule({ kind: 'together', shots: [shot, next] })
    else if (kind === 3) rule({ kind: 'window', shot, fromMin: startMin - 30, toMin: endMin + give })
    else rule({ kind: 'pin-clock', shot, atMin: Math.ceil(startMin), toleranceMin: give })
  }
  const sitters = bare.sitters.map((sitter, s): ProblemSitter => {
    const places = hidden.flatMap((index, place) =>
      bare.shots[index]?.wears.some((wear) => wear.sitter === s) ? [place] : [],
    )
    if (places.length === 0 || s % 2 === 1) return sitter
    const from = timesOf(Math.min(...places)).startMin - 60
    return { ...sitter, hours: [Math.floor(from), Math.ceil(timesOf(Math.max(...places)).endMin) + give] }
  })
  return { ...bare, rules, sitters, hardOutMin: recipe.hardOutMin ?? Math.ceil(day.wrapMin) + give }
}

type DistributiveOmit<T, K extends PropertyKey> = T extends unknown ? Omit<T, K> : never
