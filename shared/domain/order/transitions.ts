import type { OrderProblem, Transition } from './problem.ts'

/** Minutes of a transition on the clock: lighting, set move, strike and dressing, one after the other. */
export function transitionMinutes(transition: Transition | undefined): number {
  if (!transition) return 0
  return transition.lightingMin + transition.moveMin + transition.strikeMin + transition.dressMin
}

/** The earliest that windows and clock pins let a shot begin; -Infinity without any. */
export function notBefore(problem: OrderProblem, shot: number): number {
  let earliest = -Infinity
  for (const rule of problem.rules) {
    if (rule.kind === 'window' && rule.shot === shot) earliest = Math.max(earliest, rule.fromMin)
    if (rule.kind === 'pin-clock' && rule.shot === shot) earliest = Math.max(earliest, rule.atMin)
  }
  return earliest
}
