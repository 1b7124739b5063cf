import type { Frame } from '#shared/domain/board/schema.ts'
import type { DayShot } from '#shared/domain/day/schema.ts'
import type { Plan, PlannedShot, WholeSetup } from '#shared/domain/plan/read-plan.ts'
import type { ShotPlan } from '#shared/domain/plan/schema.ts'
import type { Brief } from './schema.ts'

/** The lamp's three states: not begun or waiting, under way or changed since, ready. */
export const LAMPS = ['unlit', 'half', 'lit'] as const
export type Lamp = (typeof LAMPS)[number]

/** Sections of a shoot in working order, as far as they are built. */
export const SECTIONS = ['brief', 'board', 'looks', 'lighting', 'order', 'day'] as const
export type Section = (typeof SECTIONS)[number]

/** One lamp with the reason for its state: what is missing next, or what is settled. */
export type Readiness = { section: Section; lamp: Lamp; why: string }

/** How the shots hold the camera with a setup, and the frames of them all. */
export type SetupUse = { orientations: readonly ShotPlan['orientation'][]; frames: number }

export type ReadinessInput = {
  plan: Plan
  /** Living frames of the board. */
  frames: ReadonlyMap<string, Frame>
  /** Where each look stands with the client, by look id; absent: nobody has answered. */
  signOffs: ReadonlyMap<string, 'waiting' | 'signed off' | 'changed since' | 'change asked'>
  /** What happened on the day, by shot id. */
  dayShots: ReadonlyMap<string, DayShot>
  /** The red cautions of a setup as its shots use it (in frame, out of balance, over power), in words; empty when there is none. */
  redCautions: (setup: WholeSetup, use: SetupUse) => readonly string[]
  /** A day as it is ordered now: the rules it breaks, in words, and when it wraps, minutes since midnight. */
  schedule: (dayId: string) => { broken: readonly string[]; wrapMin: number }
}

const NUMBERS = ['No', 'One', 'Two', 'Three', 'Four', 'Five', 'Six', 'Seven', 'Eight', 'Nine']

/** "Two looks", "One look", "14 looks": for the beginning of a sentence. */
function counted(count: number, one: string, many = `${one}s`): string {
  return `${NUMBERS[count] ?? count} ${count === 1 ? one : many}`
}

/** "Friday 18:00" in the shoot's zone. */
function instantInWords(atMs: number, zone: string): string {
  const parts = new Intl.DateTimeFormat('en-GB', {
    timeZone: zone,
    weekday: 'long',
    day: 'numeric',
    month: 'short',
    hour: '2-digit',
    minute: '2-digit',
    hourCycle: 'h23',
  })
  const part = new Map(parts.formatToParts(atMs).map(({ type, value }) => [type, value]))
  return `${part.get('weekday')} ${part.get('day')} ${part.get('month')}, ${part.get('hour')}:${part.get('minute')}`
}

function clock(minutes: number): string {
  return `${String(Math.floor(minutes / 60) % 24).padStart(2, '0')}:${String(Math.round(minutes) % 60).padStart(2, '0')}`
}

function briefReadiness(brief: Brief): Omit<Readiness, 'section'> {
  const steps: [there: boolean, why: string][] = [
    [brief.client.trim() !== '', 'Say who the client is'],
    [brief.date !== null, 'Set a date with the client'],
    [brief.location.name.trim() !== '' || brief.location.address.trim() !== '', 'Say where it happens'],
    [brief.deliverables.length > 0, 'Write down what is promised'],
  ]
  const missing = steps.find(([there]) => !there)
  if (!missing) return { lamp: 'lit', why: 'Client, date, place and deliverables are settled' }
  return { lamp: steps.some(([there]) => there) ? 'half' : 'unlit', why: missing[1] }
}

function boardReadiness({ plan, frames }: ReadinessInput): Omit<Readiness, 'section'> {
  if (frames.size === 0) return { lamp: 'unlit', why: 'Hang the first pictures on the board' }
  if (plan.looks.size === 0) return { lamp: 'half', why: 'No look yet for the pictures on the board' }
  const shown = new Set<string>()
  for (const frame of frames.values()) if (frame.lookId !== null) shown.add(frame.lookId)
  const without = [...plan.looks.values()].filter(({ look }) => !shown.has(look.id))
  const first = without[0]
  if (!first) return { lamp: 'lit', why: 'Every look has a picture on the board' }
  return {
    lamp: 'half',
    why:
      without.length === 1
        ? `No picture on the board for “${first.look.name}”`
        : `${counted(without.length, 'look')} without a picture on the board`,
  }
}

function looksReadiness({ plan, signOffs }: ReadinessInput): Omit<Readiness, 'section'> {
  if (plan.looks.size === 0) return { lamp: 'unlit', why: 'Hang the first look' }
  const used = new Map<string, string>()
  for (const shot of plan.shots.values()) for (const { look } of shot.looks) used.set(look.id, look.name)
  if (used.size === 0) return { lamp: 'half', why: 'No shot uses a look yet' }
  const open = (state: string) =>
    [...used].filter(([id]) => (signOffs.get(id) ?? 'waiting') === state).map(([, name]) => name)
  const asked = open('change asked')
  if (asked[0] !== undefined)
    return {
      lamp: 'half',
      why:
        asked.length === 1
          ? `The client asks for a change to “${asked[0]}”`
          : `The client asks for changes to ${asked.length} looks`,
    }
  const changed = open('changed since')
  if (changed[0] !== undefined)
    return {
      lamp: 'half',
      why:
        changed.length === 1
          ? `“${changed[0]}” changed since it was signed off`
          : `${counted(changed.length, 'look')} changed since they were signed off`,
    }
  const waiting = open('waiting')
  if (waiting.length === 0) return { lamp: 'lit', why: 'Every look in a shot is signed off' }
  const by = plan.brief.signOffByMs === null ? '' : `, by ${instantInWords(plan.brief.signOffByMs, plan.brief.zone)}`
  return { lamp: 'half', why: `${counted(waiting.length, 'look waits', 'looks wait')} for the client${by}` }
}

function lightingReadiness({ plan, redCautions }: ReadinessInput): Omit<Readiness, 'section'> {
  if (plan.setups.size === 0) return { lamp: 'unlit', why: 'Light the first setup' }
  const used = new Map<string, { setup: WholeSetup; use: SetupUse }>()
  for (const { setup, plan: shot } of plan.shots.values()) {
    if (!setup) continue
    const before: SetupUse = used.get(setup.setup.id)?.use ?? { orientations: [], frames: 0 }
    const orientations = before.orientations.includes(shot.orientation)
      ? before.orientations
      : [...before.orientations, shot.orientation]
    used.set(setup.setup.id, { setup, use: { orientations, frames: before.frames + shot.frames } })
  }
  for (const { setup, use } of used.values()) {
    const { name } = setup.setup
    if (!setup.lights.some((light) => light.purpose === 'main')) return { lamp: 'half', why: `“${name}” has no main` }
    const red = redCautions(setup, use)[0]
    if (red !== undefined) return { lamp: 'half', why: `“${name}”: ${red}` }
  }
  const without = plan.days.flatMap((day) => day.shots).filter((shot) => !shot.setup)
  if (without[0])
    return {
      lamp: 'half',
      why:
        without.length === 1
          ? `No setup yet for “${without[0].shot.title}”`
          : `${counted(without.length, 'shot')} without a setup`,
    }
  if (used.size === 0) return { lamp: 'half', why: 'No shot uses a setup yet' }
  return { lamp: 'lit', why: 'Every setup has a main and nothing in its way' }
}

function orderReadiness({ plan, schedule }: ReadinessInput): Omit<Readiness, 'section'> {
  if (plan.shots.size === 0) return { lamp: 'unlit', why: 'Write down the first shot' }
  const placed = plan.days.filter((day) => day.shots.length > 0)
  if (placed.length === 0) return { lamp: 'unlit', why: 'Put the shots into a day' }
  const loose = plan.loose.filter(({ shot }) => shot.need === 'must')
  if (loose[0])
    return {
      lamp: 'half',
      why:
        loose.length === 1
          ? `“${loose[0].shot.title}” must be made and is in no day`
          : `${counted(loose.length, 'shot')} that must be made are in no day`,
    }
  for (const { day } of placed) {
    const { broken, wrapMin } = schedule(day.id)
    if (broken[0] !== undefined) return { lamp: 'half', why: broken[0] }
    if (wrapMin > day.hardOutMin)
      return { lamp: 'half', why: `Wrap at ${clock(wrapMin)} is after the hard out at ${clock(day.hardOutMin)}` }
  }
  return { lamp: 'lit', why: 'Every rule is kept and the day ends in time' }
}

function dayReadiness({ plan, dayShots }: ReadinessInput): Omit<Readiness, 'section'> {
  const must = [...plan.shots.values()].filter(({ shot }) => shot.need === 'must')
  const stateOf = ({ shot }: PlannedShot) => dayShots.get(shot.id)?.event?.state ?? 'waiting'
  const got = must.filter((shot) => stateOf(shot) === 'got').length
  if (must.length > 0 && got === must.length) return { lamp: 'lit', why: 'Every must-have shot is got' }
  const begun = [...plan.shots.values()].some((shot) => stateOf(shot) !== 'waiting')
  if (!begun) return { lamp: 'unlit', why: 'The day has not begun' }
  return {
    lamp: 'half',
    why: must.length === 0 ? 'No shot is marked as a must' : `${got} of ${must.length} must-have shots got`,
  }
}

/**
 * How far each section of a shoot is, in working order, each with one sentence: what is missing next, or that it is
 * settled. Half lit is anything between nothing and ready.
 */
export function readinessOf(input: ReadinessInput): Readiness[] {
  return [
    { section: 'brief', ...briefReadiness(input.plan.brief) },
    { section: 'board', ...boardReadiness(input) },
    { section: 'looks', ...looksReadiness(input) },
    { section: 'lighting', ...lightingReadiness(input) },
    { section: 'order', ...orderReadiness(input) },
    { section: 'day', ...dayReadiness(input) },
  ]
}

/** What to do next for a shoot: the first section that is not ready. Null when every lamp is lit. */
export function nextStep(readiness: readonly Readiness[]): Readiness | null {
  return readiness.find(({ lamp }) => lamp !== 'lit') ?? null
}
