import { type Clock, Stepper, firstClock } from './clock.ts'
import { type Compiled, at, item } from './compiled.ts'
import { type Score, compareScores, compareTies, movedIn } from './evaluate.ts'
import {
  type Label,
  type LabelTables,
  type Node,
  dominates,
  extendTails,
  labelTables,
  leastMoved,
  makeNode,
  orderOf,
  readyTimes,
} from './labels.ts'
import { type PathBound, bitCount, orderRules, pathBound } from './path-bound.ts'

/** Above this many shots sets of shots do not fit the bits used here. */
export const LAYERS_MAX = 28

export type Known = { order: readonly number[]; score: Score }
export type LayersResult = {
  best: Known | null
  /** Whether nothing was left out: `best` is the best there is, and null means that there is none. */
  complete: boolean
  /** No better order wraps before. */
  leastWrap: number
  spent: number
}

/** What a label and a comparison of two cost, in units of one shot placed once by the local search (measured). */
const CHILD_WORK = 5
const COMPARE_WORK = 0.2

type Options = {
  /** An order known already; only better ones are looked for. */
  known: Known | null
  /** Look only for orders that break nothing. */
  strict: boolean
  /** Labels kept a layer. */
  width: number
  /** Work (labels tried) that may be spent. */
  work: number
}

/**
 * Exact search in layers: all ways to have done k shots, k = 0, 1, 2 … A way is forgotten when another way to have
 * done the same shots, ending with the same one, is no worse for whatever follows (`dominates`), or when even the
 * least that is left to do cannot beat the best order known. Readiness depends on history, so one way a set and last
 * shot is not enough: each keeps its Pareto set. With a `width` that bites, it is a beam search that still says how
 * early a better order might wrap.
 *
 * Yields the work spent from time to time, so that whoever runs it can stop it.
 */
export function* searchLayers(c: Compiled, options: Options): Generator<number, LayersResult> {
  const search = new Layers(c, options)
  let layer = new Map<number, Node>([[0, search.root()]])
  for (let place = 0; place < c.n && layer.size > 0; place++) {
    const next = new Map<number, Node>()
    for (const node of layer.values()) {
      for (const label of node.labels) search.expand(node, label, place, next)
      if (search.spent - search.reported > 20_000) {
        search.reported = search.spent
        yield search.spent
      }
      if (search.spent > options.work) return search.stopped(layer, next)
    }
    search.trim(next)
    layer = next
  }
  return search.finish()
}

class Layers {
  spent = 0
  reported = 0
  private best: Known | null
  private readonly c: Compiled
  private readonly options: Options
  private readonly stepper: Stepper
  private readonly tables: LabelTables
  private readonly bound: PathBound
  private readonly allowed: ((mask: number, last: number, next: number) => boolean) | null
  private readonly scratch: Clock
  private readonly low: Score = { broken: 0, must: 0, should: 0, wrap: 0, light: 0, wait: 0, lateMin: 0 }
  private complete = true
  private leastWrap = Infinity
  private found: Known | null = null

  constructor(c: Compiled, options: Options) {
    this.c = c
    this.options = options
    this.best = options.known
    this.stepper = new Stepper(c)
    this.tables = labelTables(c)
    this.bound = pathBound(c, options.strict)
    this.allowed = options.strict ? orderRules(c) : null
    this.scratch = firstClock(c)
  }

  root(): Node {
    const node: Node = { mask: 0, last: -1, labels: [], needs: [], growing: 0, complete: 0 }
    const label: Label = {
      ...firstClock(this.c),
      shot: -1,
      before: null,
      broken: 0,
      split: 0,
      must: 0,
      should: 0,
      light: 0,
      wait: 0,
      tails: new Uint8Array(0),
      ready: new Float64Array(0),
      least: this.c.lightsOn,
    }
    node.labels.push(label)
    return node
  }

  expand(node: Node, label: Label, place: number, into: Map<number, Node>): void {
    const { c } = this
    for (let shot = 0; shot < c.n; shot++) {
      if ((node.mask & (1 << shot)) !== 0) continue
      if (this.allowed !== null && !this.allowed(node.mask, node.last, shot)) continue
      this.spent += CHILD_WORK
      this.child(node, label, shot, place, into)
    }
  }

  private child(node: Node, label: Label, shot: number, place: number, into: Map<number, Node>): void {
    const { c, low, scratch, options } = this
    const mask = node.mask | (1 << shot)
    const rest = this.bound.minutes(mask, shot)
    if (rest === Infinity) return
    scratch.end = label.end
    scratch.fed = label.fed
    scratch.free.set(label.free)
    scratch.look.set(label.look)
    scratch.chairs.set(label.chairs)
    const step = this.stepper.step(scratch, node.last, shot, place)
    const split = options.strict ? 0 : this.splitBy(node, label, shot)
    const broken =
      label.broken +
      step.late +
      (options.strict ? 0 : this.orderBreaches(node, shot, place) + bitCount(split & ~label.split))
    if (options.strict && broken > 0) return
    const missed = step.end > c.hardOut ? 1 : 0
    const must = label.must + (at(c.need, shot) === 0 ? missed : 0)
    const should = label.should + (at(c.need, shot) === 1 ? missed : 0)
    const light = label.light + at(c.light, (node.last + 1) * c.n + shot)
    const wait = label.wait + step.wait
    const least = Math.max(
      scratch.end + rest + (c.hasMeal && !scratch.fed && place < c.n - 1 ? c.mealMin : 0),
      earliestWrap(c, mask, scratch.end),
    )
    low.broken = broken + this.surelyLate(mask, scratch.end)
    if (options.strict && low.broken > 0) return
    low.must = must
    low.should = should
    if (least > c.hardOut) this.surelyMissed(mask, scratch.end)
    low.wrap = least
    low.light = light + this.bound.lights(mask, shot)
    low.wait = wait
    const tails = extendTails(label.tails, shot)
    if (this.best && !this.mayBeat(label, shot, tails, mask)) return
    const key = mask * c.n + shot
    let target = into.get(key)
    if (!target) {
      target = makeNode(c, this.tables, mask, shot)
      into.set(key, target)
    }
    const made: Label = {
      end: scratch.end,
      fed: scratch.fed,
      free: scratch.free.slice(),
      look: scratch.look.slice(),
      chairs: scratch.chairs.slice(),
      shot,
      before: label,
      broken,
      split,
      must,
      should,
      light,
      wait,
      tails,
      ready: readyTimes(c, target, scratch),
      least,
    }
    if (place === c.n - 1) this.arrive(made)
    else this.spent += COMPARE_WORK * keep(c, target, made)
  }

  /** Whether the lower bounds in `low` leave a chance to beat the best order known. */
  private mayBeat(label: Label, shot: number, tails: Uint8Array, mask: number): boolean {
    const { best, low, c } = this
    if (!best) return true
    const ahead = compareScores(low, best.score)
    if (ahead !== 0) return ahead < 0
    const moved = leastMoved(c.n, tails, mask) - movedIn(best.order)
    if (moved !== 0) return moved < 0
    const order = [...orderOf(label).slice(1), shot]
    for (let i = 0; i < order.length; i++) {
      const rank = at(c.idRank, at(order, i)) - at(c.idRank, at(best.order, i))
      if (rank !== 0) return rank < 0
    }
    return true
  }

  private arrive(label: Label): void {
    const order = orderOf(label).slice(1)
    const score: Score = {
      broken: label.broken,
      must: label.must,
      should: label.should,
      wrap: label.end,
      light: label.light,
      wait: label.wait,
      lateMin: 0,
    }
    const ahead = this.best ? compareScores(score, this.best.score) || compareTies(this.c, order, this.best.order) : -1
    if (ahead >= 0) return
    this.best = { order, score }
    this.found = this.best
  }

  /** Breaches of `after` and place pins by putting this shot here. */
  private orderBreaches(node: Node, shot: number, place: number): number {
    let breaches = 0
    for (const before of item(this.c.after, shot)) if ((node.mask & (1 << before)) === 0) breaches++
    for (const pinned of item(this.c.places, shot)) if (pinned !== place) breaches++
    return breaches
  }

  /** Blocks broken by leaving them unfinished for this shot, with those broken before. */
  private splitBy(node: Node, label: Label, shot: number): number {
    let split = label.split
    this.tables.blocks.forEach((block, index) => {
      if ((block & node.mask) !== 0 && (block & ~node.mask) !== 0 && (block & (1 << shot)) === 0) split |= 1 << index
    })
    return split
  }

  /** Shots to come whose latest time cannot be kept any more, one a latest time. */
  private surelyLate(mask: number, end: number): number {
    const { c } = this
    let late = 0
    for (const shot of c.timed) {
      if ((mask & (1 << shot)) !== 0) continue
      const start = Math.max(end + at(c.leastIn, shot), at(c.soonest, shot))
      for (const latest of item(c.latestStart, shot)) if (start > latest) late++
      for (const latest of item(c.latestEnd, shot)) if (start + at(c.minutes, shot) > latest) late++
    }
    return late
  }

  /** Adds the shots to come that certainly end after the hard out. */
  private surelyMissed(mask: number, end: number): void {
    const { c, low } = this
    for (let shot = 0; shot < c.n; shot++) {
      if ((mask & (1 << shot)) !== 0 || at(c.need, shot) === 2) continue
      const start = Math.max(end + at(c.leastIn, shot), at(c.soonest, shot))
      if (start + at(c.minutes, shot) <= c.hardOut) continue
      if (at(c.need, shot) === 0) low.must++
      else low.should++
    }
  }

  /** Keeps the most promising labels of a layer. */
  trim(layer: Map<number, Node>): void {
    let count = 0
    for (const node of layer.values()) count += node.labels.length
    if (count <= this.options.width) return
    const all = [...layer.values()].flatMap((node) => node.labels.map((label) => ({ node, label })))
    all.sort(
      (a, b) =>
        a.label.broken - b.label.broken ||
        a.label.must - b.label.must ||
        a.label.should - b.label.should ||
        a.label.least - b.label.least ||
        a.label.light - b.label.light ||
        a.label.wait - b.label.wait ||
        a.node.mask - b.node.mask ||
        a.node.last - b.node.last,
    )
    for (const node of layer.values()) node.labels = []
    all.forEach(({ node, label }, index) => {
      if (index < this.options.width) node.labels.push(label)
      else this.leaveOut(label)
    })
  }

  private leaveOut(label: Label): void {
    this.complete = false
    this.leastWrap = Math.min(this.leastWrap, label.least)
  }

  stopped(...layers: Map<number, Node>[]): LayersResult {
    for (const layer of layers) for (const node of layer.values()) for (const label of node.labels) this.leaveOut(label)
    return this.finish()
  }

  finish(): LayersResult {
    const wrap = this.best?.score.wrap ?? Infinity
    return {
      best: this.found,
      complete: this.complete,
      spent: this.spent,
      leastWrap: this.complete ? wrap : Math.min(wrap, this.leastWrap),
    }
  }
}

/** Shots in `mask` done by `end`, no completion wraps before: one shot after another as they become possible, each by its cheapest way in. */
export function earliestWrap(c: Compiled, mask: number, end: number): number {
  let time = end
  for (const shot of c.bySoonest) {
    if ((mask & (1 << shot)) !== 0) continue
    const way = at(c.leastIn, shot)
    time = Math.max(time + way, at(c.soonest, shot)) + at(c.minutes, shot)
  }
  return time
}

/** Puts a label among those of its node unless one of them is as good; drops those it makes needless. Returns the comparisons. */
function keep(c: Compiled, node: Node, label: Label): number {
  const { labels } = node
  let compared = 0
  for (const other of labels) {
    compared++
    if (dominates(c, node, other, label)) return compared
  }
  compared += labels.length
  let kept = 0
  for (const other of labels) if (!dominates(c, node, label, other)) labels[kept++] = other
  labels.length = kept
  labels.push(label)
  return compared
}
