import { readFileSync, readdirSync } from 'node:fs'
import { join } from 'node:path'
import { dayIdSchema, ruleIdSchema, shotIdSchema, sitterIdSchema, lookIdSchema } from '#shared/ids.ts'
import type { OrderProblem } from '#shared/domain/order/problem.ts'
import type { ProblemRule } from '#shared/domain/order/rules.ts'
import { idOf } from '#tests/support/random-days.ts'

/** A published instance as a day, its best known value, and how our answer is read as a value of the instance. */
export type Instance = {
  name: string
  nodes: number
  best: number
  problem: OrderProblem
  valueOf: (day: { wrapMin: number; waitingMin: number }) => number
}

/** Best known values as printed with the instances (TSPLIB95; Ascheuer, Fischetti, Grötschel; CSPLib 039). */
const BEST: Readonly<Record<string, number>> = {
  br17: 39,
  ftv33: 1286,
  ftv38: 1530,
  ry48p: 14422,
  ft53: 6905,
  ESC07: 2125,
  ESC12: 1675,
  ESC25: 1681,
  'br17.10': 55,
  'ft53.2': 8026,
  'ry48p.2': 16666,
  'p43.1': 28140,
  rbg048a: 351,
  rbg010a: 3840,
  rbg016a: 2596,
  rbg031a: 3498,
  tiny: 2,
  small: 12,
  concert: 17,
}

/** Every instance of a folder with the sub-folders atsp, sop, tsptw and talent. */
export function readInstances(folder: string): Instance[] {
  const files = (kind: string, end: string) =>
    readdirSync(join(folder, kind))
      .filter((file) => file.endsWith(end))
      .map((file) => ({
        name: file.slice(0, file.length - end.length),
        text: readFileSync(join(folder, kind, file), 'utf8'),
      }))
  return [
    ...files('atsp', '.atsp').map(({ name, text }) =>
      closedTour(name, numbersAfter(text, 'EDGE_WEIGHT_SECTION'), dimensionOf(text)),
    ),
    ...files('sop', '.sop').map(({ name, text }) => sequential(name, numbersAfter(text, 'EDGE_WEIGHT_SECTION'))),
    ...files('tsptw', '.tw').map(({ name, text }) => windows(name, numbersIn(text.split('#')[0] ?? ''))),
    ...files('talent', '').map(({ name, text }) => talent(name, numbersIn(text.split('\n').slice(1).join('\n')))),
  ]
}

const numbersIn = (text: string) =>
  text
    .split(/\s+/)
    .filter((word) => /^-?\d+(\.\d+)?$/.test(word))
    .map(Number)
const numbersAfter = (text: string, mark: string) =>
  numbersIn(text.slice(text.indexOf(mark) + mark.length).replace('EOF', ''))
const dimensionOf = (text: string) => Number(/DIMENSION:\s*(\d+)/.exec(text)?.[1])

type Parts = {
  n: number
  way: (from: number, to: number) => number
  minutes?: readonly number[]
  rules?: (ruleId: () => ProblemRule['ruleId']) => ProblemRule[]
  lightsOnMin?: number
}

/** A day whose changeovers are these ways; `from` is -1 for the start of the day. */
function day({ n, way, minutes = [], rules = () => [], lightsOnMin = 0 }: Parts): OrderProblem {
  const shots = Array.from({ length: n }, (_, shot) => ({
    id: shotIdSchema.parse(idOf(3, shot)),
    number: shot + 1,
    title: String(shot),
    minutes: minutes[shot] ?? 0,
    need: 'must' as const,
    setId: null,
    setName: '',
    roomId: null,
    roomName: '',
    setupId: null,
    setupName: '',
    wears: [],
  }))
  let count = 0
  const transition = (from: number, to: number) => ({
    lightingMin: way(from, to),
    changesLight: false,
    actions: 0,
    moveMin: 0,
    strikeMin: 0,
    dressMin: 0,
  })
  return {
    dayId: dayIdSchema.parse(idOf(8, 0)),
    shots,
    sitters: [],
    looks: [],
    lightsOnMin,
    hardOutMin: 1e9,
    meal: null,
    hands: 1,
    chairs: null,
    transitions: Array.from({ length: n + 1 }, (_, row) => shots.map((_shot, to) => transition(row - 1, to))),
    actionLists: [[]],
    rules: rules(() => ruleIdSchema.parse(idOf(7, count++))),
    faults: [],
  }
}

/** A closed tour through all nodes: node 0 is pinned first, and once more last. */
function closedTour(name: string, numbers: readonly number[], n: number): Instance {
  const cost = (from: number, to: number) => numbers[from * n + to] ?? 0
  const problem = day({
    n: n + 1,
    way: (from, to) => (from < 0 || from === to ? 0 : cost(from % n, to % n)),
    rules: (ruleId) => [
      { ruleId: ruleId(), kind: 'pin-place', shot: 0, index: 0 },
      { ruleId: ruleId(), kind: 'pin-place', shot: n, index: -1 },
    ],
  })
  return { name, nodes: n, best: BEST[name] ?? NaN, problem, valueOf: (answer) => answer.wrapMin }
}

/** A path from the first node to the last; −1 at (i, j): j comes before i. */
function sequential(name: string, [n = 0, ...numbers]: readonly number[]): Instance {
  const pairs = Array.from({ length: n * n }, (_, cell) => cell)
  const problem = day({
    n,
    way: (from, to) => (from < 0 ? 0 : Math.max(0, numbers[from * n + to] ?? 0)),
    rules: (ruleId) =>
      pairs
        .filter((cell) => numbers[cell] === -1)
        .map((cell) => ({ ruleId: ruleId(), kind: 'after', shot: Math.floor(cell / n), after: cell % n })),
  })
  return { name, nodes: n, best: BEST[name] ?? NaN, problem, valueOf: (answer) => answer.wrapMin }
}

/** Time windows on the beginning of each visit; the way includes the stay. Out from node 0 and back to it, earliest finish. */
function windows(name: string, [n = 0, ...numbers]: readonly number[]): Instance {
  const window = (node: number) => numbers.slice(n * n + 2 * node, n * n + 2 * node + 2)
  const problem = day({
    n: n + 1,
    way: (from, to) => (from < 0 || from === to ? 0 : (numbers[(from % n) * n + (to % n)] ?? 0)),
    rules: (ruleId) => [
      { ruleId: ruleId(), kind: 'pin-place', shot: 0, index: 0 },
      { ruleId: ruleId(), kind: 'pin-place', shot: n, index: -1 },
      ...Array.from({ length: n + 1 }, (_, shot): ProblemRule => {
        const [fromMin = 0, toMin = 0] = window(shot % n)
        return { ruleId: ruleId(), kind: 'window', shot, fromMin, toMin }
      }),
    ],
  })
  return { name, nodes: n, best: BEST[name] ?? NaN, problem, valueOf: (answer) => answer.wrapMin }
}

/** People paid by the day from their first scene to their last: what they wait, a person as many times as a day costs. */
function talent(name: string, [scenes = 0, people = 0, ...numbers]: readonly number[]): Instance {
  const rows = Array.from({ length: people }, (_, person) =>
    numbers.slice(person * (scenes + 1), (person + 1) * (scenes + 1)),
  )
  const minutes = numbers.slice(people * (scenes + 1))
  const paid = rows.flatMap((row) => Array.from({ length: row[scenes] ?? 1 }, () => row))
  const bare = day({ n: scenes, way: () => 0, minutes })
  const problem: OrderProblem = {
    ...bare,
    sitters: paid.map((_, s) => ({
      id: sitterIdSchema.parse(idOf(1, s)),
      name: String(s),
      hours: null,
      chairMin: 0,
      travelMin: 0,
    })),
    looks: paid.map((_, s) => ({
      id: lookIdSchema.parse(idOf(2, s)),
      sitter: s,
      name: String(s),
      changeMin: 0,
      style: '',
    })),
    shots: bare.shots.map((shot, scene) => ({
      ...shot,
      wears: paid.flatMap((row, s) => (row[scene] === 1 ? [{ sitter: s, firstLook: s, lastLook: s }] : [])),
    })),
  }
  return { name, nodes: scenes, best: BEST[name] ?? NaN, problem, valueOf: (answer) => answer.waitingMin }
}
