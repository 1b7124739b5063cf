import type { Advice } from '#shared/domain/day/advice.ts'
import type { Need } from '#shared/domain/board/schema.ts'
import { clockLabel, listLabel } from '#shared/domain/order/clock.ts'
import type { PlannedShot } from '#shared/domain/plan/read-plan.ts'
import { SAVE_SIGNS, type SaveState, sinceWords } from '#src/realtime/save-state.ts'

export const NEED_WORDS: Readonly<Record<Need, string>> = {
  must: 'needed by the client',
  should: 'wanted',
  could: 'if there is time',
}

/** "Dome · night coat · upright · needed by the client" */
export function shotLine({ set, looks, plan, shot }: PlannedShot): string {
  return [set?.name, ...looks.map(({ look }) => look.name), plan.orientation, NEED_WORDS[shot.need]]
    .filter((part) => part !== undefined && part !== '')
    .join(' · ')
}

/** "18 min behind", "5 min ahead", "On time". */
export function behindWords(behindMin: number): string {
  if (behindMin === 0) return 'On time'
  return behindMin > 0 ? `${behindMin} min behind` : `${-behindMin} min ahead`
}

/** What is saved where, as on every screen, with how much waits on this phone and since when. */
export function saveWords(state: SaveState): string {
  const { words } = SAVE_SIGNS[state.kind]
  if (state.kind === 'offline' && state.unsent > 0) {
    const since = state.sinceMs === null ? '' : ` ${sinceWords(state.sinceMs, Date.now())}`
    return `On this device · ${state.unsent} to send${since}`
  }
  return state.kind === 'not-saved' ? `${words}: ${state.why}` : words
}

/** What to trim or leave so as to be out in time. */
export function adviceWords(
  advice: Advice,
  hardOutMin: number,
  shotOf: (id: string) => PlannedShot | undefined,
): string {
  const name = (id: string) => `shot ${shotOf(id)?.number ?? '?'}`
  const out = `To be out by ${clockLabel(hardOutMin)}`
  switch (advice.kind) {
    case 'trim':
      return `${out}, trim ${name(advice.shotId)} to ${advice.toMin} min.`
    case 'leave':
      return `${out}, leave ${listLabel(advice.shotIds.map(name))}.`
    case 'late': {
      const late = `${Math.ceil(advice.byMin)} min past the hard out at ${clockLabel(hardOutMin)}`
      return advice.shotIds.length === 0
        ? `As it stands the day ends ${late}. Everything left is needed by the client: speak to them.`
        : `Even without ${listLabel(advice.shotIds.map(name))} the day ends ${late}. Speak to the client.`
    }
  }
}
