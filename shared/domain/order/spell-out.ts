import type { OrderProblem, ProblemShot, Transition } from './problem.ts'
import type { Call, Changeover, ScheduledShot, SetMove, WardrobeChange } from './schedule-types.ts'
import { notBefore } from './transitions.ts'
import { type MealBreak, type Turn, latestTurns } from './wardrobe.ts'

export type StepToSpell = {
  planned: ProblemShot
  /** Index of the shot before; -1 for the start of the day. */
  before: number
  step: { startMin: number; endMin: number; lightMin: number; readyMin: number; turns: readonly Turn[] }
  previousEndMin: number
  mealBefore: MealBreak | null
}

/** One shot of the day with its changeover in words and minutes. */
export function scheduledShot(problem: OrderProblem, of: StepToSpell): ScheduledShot {
  const { planned, before, step, mealBefore } = of
  const index = problem.shots.indexOf(planned)
  const from = problem.shots[before]
  const transition = problem.transitions[before + 1]?.[index]
  const earliest = notBefore(problem, index)
  const onSetMin = Math.max(step.lightMin, step.readyMin)
  const changeover: Changeover = {
    fromShotId: from?.id ?? null,
    minutes: step.startMin - of.previousEndMin - (mealBefore ? mealBefore.endMin - mealBefore.startMin : 0),
    lighting: problem.actionLists[transition?.actions ?? 0] ?? [],
    lightingMin: transition?.lightingMin ?? 0,
    changesLight: transition?.changesLight ?? false,
    setMove: setMove(from, planned, transition),
    wardrobe: step.turns.flatMap((turn) => wardrobeChange(problem, turn, step.lightMin)),
    wardrobeWaitMin: onSetMin - step.lightMin,
    holdWaitMin: step.startMin - onSetMin,
  }
  return {
    shotId: planned.id,
    startMin: step.startMin,
    endMin: step.endMin,
    mealBefore,
    changeover,
    notBeforeMin: Number.isFinite(earliest) ? earliest : null,
    made: step.endMin <= problem.hardOutMin,
  }
}

function wardrobeChange(problem: OrderProblem, turn: Turn, lightMin: number): WardrobeChange[] {
  const sitter = problem.sitters[turn.sitter]
  const look = problem.looks[turn.toLook]
  if (!sitter || !look || turn.fromLook === turn.toLook) return []
  return [
    {
      sitterId: sitter.id,
      sitterName: sitter.name,
      lookId: look.id,
      lookName: look.name,
      chairMin: turn.chairMin,
      changeMin: turn.changeMin,
      first: turn.fromLook < 0,
      onClockMin: Math.max(0, turn.readyMin - lightMin),
    },
  ]
}

function setMove(from: ProblemShot | undefined, to: ProblemShot, transition: Transition | undefined): SetMove | null {
  if (!transition) return null
  const { moveMin, strikeMin, dressMin } = transition
  const otherRoom = from !== undefined && from.roomId !== null && to.roomId !== null && from.roomId !== to.roomId
  const otherSet = to.setId !== null && from?.setId !== to.setId
  if (!otherRoom && !otherSet) return null
  return {
    fromSetId: from?.setId ?? null,
    fromSetName: from?.setName ?? '',
    toSetId: to.setId,
    toSetName: to.setName,
    fromRoomName: from?.roomName ?? '',
    toRoomName: to.roomName,
    otherRoom,
    moveMin,
    strikeMin,
    dressMin,
  }
}

/** The call of everybody who is in the day, earliest first. */
export function callsOf(
  problem: OrderProblem,
  shots: readonly ScheduledShot[],
  turns: readonly Turn[],
  meal: MealBreak | null,
): Call[] {
  const scheduled = new Map<string, ScheduledShot>(shots.map((shot) => [shot.shotId, shot]))
  const shotOf = (turn: Turn) => scheduled.get(problem.shots[turn.shot]?.id ?? '')
  const begins = latestTurns(turns, (turn) => shotOf(turn)?.startMin ?? 0, meal)
  const calls = turns.flatMap((turn, at): Call[] => {
    const sitter = problem.sitters[turn.sitter]
    const shot = shotOf(turn)
    if (turn.fromLook >= 0 || !sitter || !shot) return []
    const beginMin = begins[at] ?? shot.startMin
    return [
      {
        sitterId: sitter.id,
        sitterName: sitter.name,
        callMin: Math.floor((beginMin - sitter.travelMin) / 5) * 5,
        beginMin,
        firstShotId: shot.shotId,
        firstStartMin: shot.startMin,
        chairMin: turn.chairMin,
        changeMin: turn.changeMin,
        travelMin: sitter.travelMin,
      },
    ]
  })
  return calls.sort((a, b) => a.callMin - b.callMin || (a.sitterId < b.sitterId ? -1 : 1))
}
