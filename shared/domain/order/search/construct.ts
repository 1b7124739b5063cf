import { type Compiled, at, item } from './compiled.ts'

/**
 * Orders to begin from: each next shot is one whose predecessors are done, the cheapest to get to, or the one whose
 * latest time presses most. `urgency` 0 looks at minutes alone, larger values more at latest times.
 */
export function construct(c: Compiled, urgency: number): number[] {
  const order: number[] = []
  const done = new Uint8Array(c.n)
  let from = -1
  let end = c.lightsOn
  while (order.length < c.n) {
    let next = -1
    let least = Infinity
    for (let shot = 0; shot < c.n; shot++) {
      if (at(done, shot) === 1) continue
      const cost = costOf(c, { from, shot, end, place: order.length, done, urgency })
      if (cost < least) {
        least = cost
        next = shot
      }
    }
    end = Math.max(end + at(c.least, (from + 1) * c.n + next), at(c.notBefore, next)) + at(c.minutes, next)
    done[next] = 1
    order.push(next)
    from = next
  }
  return order
}

type Choice = { from: number; shot: number; end: number; place: number; done: Uint8Array; urgency: number }

function costOf(c: Compiled, { from, shot, end, place, done, urgency }: Choice): number {
  const BREACH = 1e5
  let cost = at(c.least, (from + 1) * c.n + shot) + Math.max(0, at(c.notBefore, shot) - end)
  for (const before of item(c.after, shot)) if (at(done, before) === 0) cost += BREACH
  for (const pinned of item(c.places, shot)) if (pinned !== place) cost += BREACH
  for (let other = 0; other < c.n; other++) {
    if (other !== shot && item(c.places, other).includes(place)) cost += BREACH
  }
  for (const block of c.together) {
    const open = block.includes(from) && block.some((member) => at(done, member) === 0)
    if (open && !block.includes(shot)) cost += BREACH
  }
  const latest = Math.min(
    ...item(c.latestStart, shot),
    ...item(c.latestEnd, shot).map((end) => end - at(c.minutes, shot)),
    1e4,
  )
  return cost + urgency * Math.max(0, latest - end)
}
