import type { Need } from '#shared/domain/board/schema.ts'
import type { OrderProblem, ProblemSitter, Transition } from '#shared/domain/order/problem.ts'
import type { ProblemRule } from '#shared/domain/order/rules.ts'
import { dayIdSchema, lookIdSchema, ruleIdSchema, sitterIdSchema } from '#shared/ids.ts'
import { plainDay, shotId } from './plain-day.ts'

type Body<T> = T extends unknown ? Omit<T, 'ruleId'> : never
export type RuleBody = Body<ProblemRule>

export type HandShot = { minutes?: number; need?: Need; looks?: readonly string[] }
export type HandLook = { sitter: string; changeMin: number; style?: string }
export type HandSitter = { hours?: readonly [number, number]; chairMin?: number; travelMin?: number }

export type HandDay = {
  shots: readonly HandShot[]
  looks?: Readonly<Record<string, HandLook>>
  sitters?: Readonly<Record<string, HandSitter>>
  rules?: readonly RuleBody[]
  meal?: OrderProblem['meal']
  chairs?: number | null
  hardOutMin?: number
  /** Minutes of light from one shot to another; the default is 20 for rigging and 10 between shots. */
  light?: (from: number, to: number) => number
}

export const ruleId = (number: number) =>
  ruleIdSchema.parse(`00000000-0000-4000-8001-${String(number).padStart(12, '0')}`)
export const sitterId = (number: number) =>
  sitterIdSchema.parse(`00000000-0000-4000-8002-${String(number).padStart(12, '0')}`)

/** A day to work out by hand, lights on at 9:00 (540). Shots are written by their index from 0; looks and sitters by name. */
export function handDay(day: HandDay): OrderProblem {
  const bare = plainDay(
    day.shots.map((shot) => shot.need ?? 'must'),
    day.hardOutMin ?? 1200,
  )
  const sitterNames = [
    ...new Set([...Object.keys(day.sitters ?? {}), ...Object.values(day.looks ?? {}).map((look) => look.sitter)]),
  ]
  const lookNames = Object.keys(day.looks ?? {})
  const sitters = sitterNames.map((name, index): ProblemSitter => {
    const sitter = day.sitters?.[name]
    return {
      id: sitterId(index),
      name,
      hours: sitter?.hours ?? null,
      chairMin: sitter?.chairMin ?? 0,
      travelMin: sitter?.travelMin ?? 0,
    }
  })
  const looks = lookNames.map((name, index) => {
    const look = day.looks?.[name]
    const id = lookIdSchema.parse(`00000000-0000-4000-8003-${String(index).padStart(12, '0')}`)
    return {
      id,
      sitter: sitterNames.indexOf(look?.sitter ?? ''),
      name,
      changeMin: look?.changeMin ?? 0,
      style: look?.style ?? '',
    }
  })
  const light = day.light ?? ((from: number) => (from < 0 ? 20 : 10))
  const transition = (from: number, to: number): Transition => {
    const lightingMin = light(from, to)
    return { lightingMin, changesLight: lightingMin > 0, moveMin: 0, strikeMin: 0, dressMin: 0, actions: 0 }
  }
  return {
    ...bare,
    dayId: dayIdSchema.parse('00000000-0000-4000-8000-0000000000aa'),
    shots: bare.shots.map((shot, index) => ({
      ...shot,
      minutes: day.shots[index]?.minutes ?? 30,
      wears: (day.shots[index]?.looks ?? []).map((name) => {
        const look = lookNames.indexOf(name)
        return { sitter: looks[look]?.sitter ?? 0, firstLook: look, lastLook: look }
      }),
    })),
    sitters,
    looks,
    meal: day.meal ?? null,
    chairs: day.chairs ?? null,
    transitions: [-1, ...day.shots.keys()].map((from) => day.shots.map((_, to) => transition(from, to))),
    rules: (day.rules ?? []).map((rule, index) => ({ ...rule, ruleId: ruleId(index) })),
  }
}

/** Ids of shots by index from 0. */
export const inOrder = (...indices: number[]) => indices.map((index) => shotId(index + 1))
