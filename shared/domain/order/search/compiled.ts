import type { OrderProblem } from '../problem.ts'
import { notBefore, transitionMinutes } from '../transitions.ts'
import { wardrobeWork } from '../wardrobe.ts'

/** Stands for "any time before the day": earlier than every clock time, and still exact to add quarters to. */
export const EVER = -1e7

type Numbers = Float64Array | Int16Array | Uint8Array | Uint16Array | Int32Array | readonly number[]

/** Element of an array whose index is known to be inside: the inner loops of the search index only what they have sized. */
export function at(numbers: Numbers, index: number): number {
  return numbers[index] as number
}

/** As `at`, for arrays of anything. */
export function item<T>(items: readonly T[], index: number): T {
  return items[index] as T
}

export type CompiledWear = { sitter: number; first: number; last: number }

/** A problem as flat arrays; a shot is its index in the order as it stands. Row 0 of a table is "from nothing". */
export type Compiled = {
  n: number
  lightsOn: number
  hardOut: number
  mealMin: number
  mealLatest: number
  hasMeal: boolean
  minutes: Float64Array
  /** 0 must, 1 should, 2 could. */
  need: Uint8Array
  /** (n + 1) × n minutes of light, move, strike and dressing. */
  delta: Float64Array
  /** (n + 1) × n: the least that can lie between two shots that follow one another, shared sitters' changes included. */
  least: Float64Array
  /** Least of a column of `least`. */
  leastIn: Float64Array
  light: Uint8Array
  notBefore: Float64Array
  /** No shot begins sooner: windows, clock pins, and sitters' hours with their first chair and change. */
  soonest: Float64Array
  /** Shots by `soonest` less their cheapest way in. */
  bySoonest: readonly number[]
  latestStart: readonly (readonly number[])[]
  latestEnd: readonly (readonly number[])[]
  /** Shots that have any latest start or end. */
  timed: readonly number[]
  /** Shots that have to come before each shot, one entry a rule. */
  after: readonly (readonly number[])[]
  /** Places each shot is pinned to, one entry a rule. */
  places: readonly (readonly number[])[]
  together: readonly (readonly number[])[]
  wears: readonly (readonly CompiledWear[])[]
  sitters: number
  looks: number
  available: Float64Array
  /** (looks + 1) × looks minutes; row 0 is "nothing worn yet". */
  change: Float64Array
  chair: Float64Array
  chairs: number | null
  /** Rank of each shot's id. */
  idRank: Uint16Array
}

/** Flattens a problem for the search. */
export function compile(problem: OrderProblem): Compiled {
  const n = problem.shots.length
  const all = problem.shots.map((_, shot) => shot)
  const rows = [-1, ...all]
  const delta = new Float64Array((n + 1) * n)
  const least = new Float64Array((n + 1) * n)
  const light = new Uint8Array((n + 1) * n)
  for (const from of rows) {
    for (const to of all) {
      const transition = problem.transitions[from + 1]?.[to]
      const cell = (from + 1) * n + to
      delta[cell] = transitionMinutes(transition)
      light[cell] = from >= 0 && transition?.changesLight ? 1 : 0
      least[cell] = Math.max(at(delta, cell), sharedWork(problem, from, to))
    }
  }
  const leastIn = Float64Array.from(all, (to) =>
    Math.min(...rows.filter((from) => from !== to).map((from) => at(least, (from + 1) * n + to))),
  )
  const looks = problem.looks.length
  const change = new Float64Array((looks + 1) * looks)
  const chair = new Float64Array((looks + 1) * looks)
  for (let from = -1; from < looks; from++) {
    for (let to = 0; to < looks; to++) {
      const work = wardrobeWork(problem, from, to)
      change[(from + 1) * looks + to] = work.changeMin
      chair[(from + 1) * looks + to] = work.chairMin
    }
  }
  const rules = problem.rules
  const latestStart = all.map((shot) =>
    rules.flatMap((rule) => (rule.kind === 'pin-clock' && rule.shot === shot ? [rule.atMin + rule.toleranceMin] : [])),
  )
  const latestEnd = all.map((shot) => [
    ...rules.flatMap((rule) => (rule.kind === 'window' && rule.shot === shot ? [rule.toMin] : [])),
    ...item(problem.shots, shot).wears.flatMap((wear) => problem.sitters[wear.sitter]?.hours?.[1] ?? []),
  ])
  const held = Float64Array.from(all, (shot) => Math.max(EVER, notBefore(problem, shot)))
  const soonest = Float64Array.from(all, (shot) =>
    Math.max(at(held, shot), ...item(problem.shots, shot).wears.map((wear) => firstReady(problem, wear.sitter))),
  )
  const byId = [...all].sort((a, b) => (item(problem.shots, a).id < item(problem.shots, b).id ? -1 : 1))
  const idRank = new Uint16Array(n)
  byId.forEach((shot, rank) => {
    idRank[shot] = rank
  })
  return {
    n,
    lightsOn: problem.lightsOnMin,
    hardOut: problem.hardOutMin,
    mealMin: problem.meal?.minutes ?? 0,
    mealLatest: problem.lightsOnMin + (problem.meal?.latestAfterMin ?? 0),
    hasMeal: problem.meal !== null,
    minutes: Float64Array.from(problem.shots, (shot) => shot.minutes),
    need: Uint8Array.from(problem.shots, (shot) => (shot.need === 'must' ? 0 : shot.need === 'should' ? 1 : 2)),
    delta,
    least,
    leastIn,
    light,
    notBefore: held,
    soonest,
    bySoonest: [...all].sort((a, b) => at(soonest, a) - at(leastIn, a) - at(soonest, b) + at(leastIn, b)),
    latestStart,
    latestEnd,
    timed: all.filter((shot) => item(latestStart, shot).length + item(latestEnd, shot).length > 0),
    after: all.map((shot) =>
      rules.flatMap((rule) => (rule.kind === 'after' && rule.shot === shot ? [rule.after] : [])),
    ),
    places: all.map((shot) =>
      rules.flatMap((rule) => (rule.kind === 'pin-place' && rule.shot === shot ? [placeOf(rule.index, n)] : [])),
    ),
    together: rules.flatMap((rule) => (rule.kind === 'together' ? [rule.shots] : [])),
    wears: problem.shots.map((shot) =>
      shot.wears.map((wear) => ({ sitter: wear.sitter, first: wear.firstLook, last: wear.lastLook })),
    ),
    sitters: problem.sitters.length,
    looks,
    available: Float64Array.from(problem.sitters, (sitter) => sitter.hours?.[0] ?? EVER),
    change,
    chair,
    chairs: problem.chairs,
    idRank,
  }
}

function placeOf(index: number, n: number): number {
  return index < 0 ? n - 1 : Math.min(index, n - 1)
}

/** When a sitter can be ready for a first look at the soonest. */
function firstReady(problem: OrderProblem, sitter: number): number {
  const work = problem.looks.flatMap((look, index) =>
    look.sitter === sitter ? [wardrobeWork(problem, -1, index)] : [],
  )
  const least = Math.min(...work.map((minutes) => minutes.chairMin + minutes.changeMin))
  return (problem.sitters[sitter]?.hours?.[0] ?? EVER) + least
}

/** What a sitter of both shots needs between them, at least. */
function sharedWork(problem: OrderProblem, from: number, to: number): number {
  const before = problem.shots[from]?.wears ?? []
  let most = 0
  for (const wear of item(problem.shots, to).wears) {
    const earlier = before.find((candidate) => candidate.sitter === wear.sitter)
    if (!earlier) continue
    const work = wardrobeWork(problem, earlier.lastLook, wear.firstLook)
    most = Math.max(most, work.chairMin + work.changeMin)
  }
  return most
}
