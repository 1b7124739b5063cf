import { type Compiled, at } from './compiled.ts'
import { construct } from './construct.ts'
import { Evaluator, NO_SCORE, type Score, compareScores, compareTies } from './evaluate.ts'
import type { Known } from './layers.ts'
import { seededRandom } from './random.ts'

/** Units of work between two chances to stop. */
const SLICE_WORK = 20_000

/** Up to this many shots every local search looks at the tiers below the wrap; beyond, only that of the best order. */
const TIES_SHOTS = 16

/** Stands for minutes late, for each breach, while an order is being led towards keeping all rules. */
const BREACH_MIN = 30

/**
 * Good orders for days of any length: seeded starts, then iterated local search. A move exchanges two neighbouring
 * runs of shots (which moves any run anywhere, and is the asymmetric 3-opt that keeps directions); a move is only worked
 * out in full when the changeovers alone, in constant time, do not already make it worse. Yields whenever the best
 * gets better and every few thousand steps of work; ends when `work` is spent.
 */
export function* improveOrders(
  c: Compiled,
  options: { seed: number; work: number },
): Generator<{ best: Known; spent: number }, Known> {
  const search = new LocalSearch(c, options.seed)
  search.begin()
  yield { best: search.best, spent: search.spent }
  let told = search.best
  let reported = 0
  while (search.spent < options.work && c.n > 1) {
    search.round(Math.min(options.work, search.spent + SLICE_WORK))
    if (search.best !== told || search.spent - reported > SLICE_WORK) {
      told = search.best
      reported = search.spent
      yield { best: told, spent: search.spent }
    }
  }
  return search.best
}

class LocalSearch {
  spent = 0
  best: Known = { order: [], score: NO_SCORE }
  private readonly c: Compiled
  private readonly evaluator: Evaluator
  private readonly random: () => number
  private readonly fixed: number
  private order: number[] = []
  private score: Score = NO_SCORE
  private trial: Score = { ...NO_SCORE }
  private path = 0
  private stale = 0
  private readonly starts: number[][]
  private readonly precedes: Uint8Array
  /** (n + 1) × (n + 1) minutes at least between two shots; row 0 is the start of the day, column n its end. */
  private readonly ways: Float64Array
  private readonly touched: Uint8Array
  private readonly ordered: boolean
  private readonly limit: Int16Array
  private limitStale = true
  /** Where the present round began; null between rounds. */
  private from: Known | null = null
  private cursor = 0
  private quiet = 0
  /** Whether moves that leave the wrap as it is are worked out too, for the tiers below it. */
  private tiesToo = true

  constructor(c: Compiled, seed: number) {
    this.c = c
    this.evaluator = new Evaluator(c)
    this.random = seededRandom(seed)
    this.fixed =
      c.lightsOn + c.minutes.reduce((sum, minutes) => sum + minutes, 0) + (c.hasMeal && c.n > 1 ? c.mealMin : 0)
    this.starts = [construct(c, 0), construct(c, 0.2), construct(c, 1), construct(c, 5)]
    this.precedes = new Uint8Array(c.n * c.n)
    c.after.forEach((shots, shot) => {
      for (const before of shots) this.precedes[before * c.n + shot] = 1
    })
    this.touched = new Uint8Array(c.n).fill(1)
    const width = c.n + 1
    this.ordered = c.after.some((shots) => shots.length > 0)
    this.limit = new Int16Array(this.ordered ? c.n * width : 0)
    this.ways = new Float64Array(width * width)
    for (let from = 0; from <= c.n; from++)
      for (let to = 0; to < c.n; to++) this.ways[from * width + to] = at(c.least, from * c.n + to)
  }

  /** The order as it stands, and the seeded starts, none of them improved yet. */
  begin(): void {
    const present = Array.from(this.c.minutes, (_, shot) => shot)
    this.use(present)
    for (const start of this.starts) {
      const score = this.evaluator.score(start, { ...NO_SCORE })
      this.spent += this.c.n
      this.offer(start, score)
      if (this.compare(score, this.score) < 0) this.use(start)
    }
  }

  /** Goes on towards the next local optimum, from a shaken order; stops early once `until` units are spent. */
  round(until: number): void {
    if (this.from === null) {
      this.from = { order: [...this.order], score: { ...this.score } }
      if (this.stale > 0) this.shake()
      this.cursor = 0
      this.quiet = 0
    }
    if (!this.descend(until)) return
    const { from } = this
    this.from = null
    this.tiesToo = this.c.n <= TIES_SHOTS
    const ahead = this.compare(this.score, from.score)
    if (ahead < 0) this.stale = 1
    else {
      this.stale++
      const limit = from.score.wrap + (from.score.wrap - this.c.lightsOn) * 0.004
      const drift = this.score.broken === from.score.broken && this.score.wrap <= limit && this.random() < 0.1
      if (ahead > 0 && !drift) this.use([...from.order])
    }
    if (this.stale > 60 + 4 * this.c.n) this.polish()
  }

  /** Back to the best order; the next round looks below its wrap at the other tiers. */
  private polish(): void {
    this.use([...this.best.order])
    this.touched.fill(1)
    this.tiesToo = true
    this.stale = 0
  }

  private use(order: number[]): void {
    this.order = order
    this.limitStale = true
    this.score = { ...this.evaluator.score(order, this.trial) }
    this.spent += this.c.n
    this.path = this.pathOf(order)
    this.offer(order, this.score)
  }

  private offer(order: readonly number[], score: Score): void {
    const ahead = compareScores(score, this.best.score)
    if (ahead > 0 || (ahead === 0 && compareTies(this.c, order, this.best.order) >= 0)) return
    this.best = { order: [...order], score: { ...score } }
  }

  /** As the objective while no rule is broken; before that by breaches and how late they are. */
  private compare(a: Score, b: Score): number {
    if (a.broken === 0 && b.broken === 0) return compareScores(a, b)
    const strayed = a.broken * BREACH_MIN + a.lateMin - (b.broken * BREACH_MIN + b.lateMin)
    return strayed || compareScores(a, b)
  }

  private pathOf(order: readonly number[]): number {
    let path = 0
    for (let i = 0; i < order.length; i++)
      path += at(this.ways, (i === 0 ? 0 : at(order, i - 1) + 1) * (this.c.n + 1) + at(order, i))
    return path
  }

  private shake(): void {
    const { n } = this.c
    this.touched.fill(0)
    let wanted = this.random() < 0.7 ? 1 : 2
    for (let tries = 0; tries < 40 && wanted > 0; tries++) {
      const reach = Math.min(n, 3 + Math.floor(this.random() * Math.min(n, 30)))
      const first = Math.floor(this.random() * (n - reach + 1))
      const cuts = [0, 0, 0].map(() => first + Math.floor(this.random() * (reach + 1))).sort((a, b) => a - b)
      const [a, b, d] = [at(cuts, 0), at(cuts, 1), at(cuts, 2)]
      if (a === b || b === d || (this.score.broken === 0 && d > this.limitOf(a, b))) continue
      this.swapRuns(a, b, d)
      wanted--
    }
    this.score = { ...this.evaluator.score(this.order, this.trial) }
    this.spent += n
    this.path = this.pathOf(this.order)
  }

  private limitOf(a: number, b: number): number {
    return this.ordered ? at(this.limits(), a * (this.c.n + 1) + b) : this.c.n
  }

  /**
   * For each run [a, b) the first place behind it whose shot has to come after one of the run: exchanges with [b, d)
   * keep the `after` rules for d up to there.
   */
  private limits(): Int16Array {
    const { limit, order } = this
    const { n } = this.c
    if (!this.limitStale) return limit
    this.limitStale = false
    const width = n + 1
    for (let a = n - 1; a >= 0; a--) {
      const row = at(order, a) * n
      let first = n
      for (let b = n; b > a; b--) {
        if (b < n && at(this.precedes, row + at(order, b)) === 1) first = b
        limit[a * width + b] = a + 1 < b ? Math.min(first, at(limit, (a + 1) * width + b)) : first
      }
    }
    return limit
  }

  /** Exchanges the runs [a, b) and [b, d). */
  private swapRuns(a: number, b: number, d: number): void {
    const { order } = this
    this.limitStale = true
    const first = order.slice(a, b)
    const second = order.slice(b, d)
    let to = a
    for (const shot of second) order[to++] = shot
    for (const shot of first) order[to++] = shot
    for (const edge of [a - 1, a, a + second.length - 1, a + second.length, d - 1, d]) {
      const shot = order[edge]
      if (shot !== undefined) this.touched[shot] = 1
    }
  }

  /** Improves by exchanging runs until no exchange near a changed place helps; false when stopped before that. */
  private descend(until: number): boolean {
    const { n } = this.c
    while (this.quiet < n) {
      if (this.spent > until) return false
      const a = this.cursor
      const shot = at(this.order, a)
      const before = a === 0 ? -1 : at(this.order, a - 1)
      const near = at(this.touched, shot) === 1 || (before >= 0 && at(this.touched, before) === 1)
      if (near && this.improveFrom(a)) {
        this.quiet = 0
        this.cursor = Math.max(0, a - 1)
      } else {
        this.quiet++
        this.cursor = a + 1 < n ? a + 1 : 0
      }
    }
    this.touched.fill(0)
    return true
  }

  /** Tries all exchanges with the cut before place `a`: as the first, the middle and the last of the three cuts. */
  private improveFrom(a: number): boolean {
    const { n } = this.c
    for (let b = a + 1; b < n; b++) if (this.improveAt(a, b, b + 1, n)) return true
    for (let first = a - 1; first >= 0; first--) if (this.improveAt(first, a, a + 1, n)) return true
    return this.improveBefore(a)
  }

  /** Tries the exchanges of runs that end before place `d`. */
  private improveBefore(d: number): boolean {
    const { order, score, ways } = this
    const { n } = this.c
    const width = n + 1
    const tailB = d === 0 ? 0 : (at(order, d - 1) + 1) * width
    const right = d === n ? n : at(order, d)
    const whole = score.broken === 0
    const most = this.mostPath()
    for (let b = d - 1; b > 0; b--) {
      const headB = at(order, b)
      const tailA = (at(order, b - 1) + 1) * width
      const base = this.path - at(ways, tailA + headB) - at(ways, tailB + right) + at(ways, tailA + right)
      this.spent += 0.02
      for (let a = b - 1; a >= 0; a--) {
        if (whole && this.limitOf(a, b) < d) break
        const headA = at(order, a)
        const left = (a === 0 ? 0 : at(order, a - 1) + 1) * width
        const path = base - at(ways, left + headA) + at(ways, left + headB) + at(ways, tailB + headA)
        this.spent += 0.02
        if (path <= most && this.tryExchange(a, b, d, path)) return true
      }
    }
    return false
  }

  /** Minutes of changeovers above which an order cannot be better than this one, whatever else it waits for. */
  private mostPath(): number {
    return this.score.broken === 0 ? this.score.wrap - this.fixed - (this.tiesToo ? 0 : 1e-9) : Infinity
  }

  /** Tries the exchanges of [a, b) with [b, d) for d from `from` to `to`. */
  private improveAt(a: number, b: number, from: number, to: number): boolean {
    const { order, score, ways } = this
    const { n } = this.c
    const width = n + 1
    const left = (a === 0 ? 0 : at(order, a - 1) + 1) * width
    const headA = at(order, a)
    const tailA = (at(order, b - 1) + 1) * width
    const headB = at(order, b)
    const base = this.path - at(ways, left + headA) - at(ways, tailA + headB) + at(ways, left + headB)
    const whole = score.broken === 0
    const most = this.mostPath()
    const until = whole ? Math.min(to, this.limitOf(a, b)) : to
    this.spent += 0.02
    for (let d = from; d <= until; d++) {
      const last = at(order, d - 1)
      const tailB = (last + 1) * width
      const right = d === n ? n : at(order, d)
      const path = base - at(ways, tailB + right) + at(ways, tailB + headA) + at(ways, tailA + right)
      this.spent += 0.02
      if (path <= most && this.tryExchange(a, b, d, path)) return true
    }
    return false
  }

  private tryExchange(a: number, b: number, d: number, path: number): boolean {
    const order = this.order
    const candidate = [...order.slice(0, a), ...order.slice(b, d), ...order.slice(a, b), ...order.slice(d)]
    this.spent += this.c.n
    const score = this.evaluator.score(candidate, this.trial)
    this.offer(candidate, score)
    const ahead = this.compare(score, this.score)
    if (ahead > 0 || (ahead === 0 && compareTies(this.c, candidate, order) >= 0)) return false
    this.swapRuns(a, b, d)
    this.score = { ...score }
    this.path = path
    return true
  }
}
