import type * as Y from 'yjs'
import type { ReadPlanInput } from '#shared/domain/plan/read-plan.ts'
import { readAll } from './collection.ts'
import { COLLECTIONS } from './documents.ts'

/** What the read model of a shoot takes from each of its documents: living items that parse. */

export function boardPart(doc: Y.Doc): ReadPlanInput['board'] {
  const { frames, shots } = COLLECTIONS.board
  return { frames: readAll(doc, frames).items, shots: readAll(doc, shots).items }
}

export function planPart(doc: Y.Doc): ReadPlanInput['plan'] {
  const { days, sets, moves, shotPlans, rules } = COLLECTIONS.plan
  return {
    days: readAll(doc, days).items,
    sets: readAll(doc, sets).items,
    moves: readAll(doc, moves).items,
    shotPlans: readAll(doc, shotPlans).items,
    rules: readAll(doc, rules).items,
  }
}

export function looksPart(doc: Y.Doc): ReadPlanInput['looks'] {
  const { sitters, looks, pieces } = COLLECTIONS.looks
  return {
    sitters: readAll(doc, sitters).items,
    looks: readAll(doc, looks).items,
    pieces: readAll(doc, pieces).items,
  }
}

export function lightingPart(doc: Y.Doc): ReadPlanInput['lighting'] {
  const { setups, lights, sitterPlaces, props } = COLLECTIONS.lighting
  return {
    setups: readAll(doc, setups).items,
    lights: readAll(doc, lights).items,
    sitterPlaces: readAll(doc, sitterPlaces).items,
    props: readAll(doc, props).items,
  }
}
