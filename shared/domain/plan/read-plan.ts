import type { Frame, Shot } from '#shared/domain/board/schema.ts'
import { LOOSE } from '#shared/domain/board/schema.ts'
import type { Light, Prop, Setup, SitterPlace } from '#shared/domain/lighting/schema.ts'
import type { Look, Piece, Sitter } from '#shared/domain/looks/schema.ts'
import type { Brief, Room } from '#shared/domain/shoots/schema.ts'
import type { Minutes } from './minutes.ts'
import type { Day, RoomMove, Rule, Set as ShootSet, ShotPlan } from './schema.ts'
import { shotPlanSchema } from './schema.ts'

/** Items of the documents by id, as the collections read them. */
export type ReadPlanInput = {
  brief: Brief
  minutes: Minutes
  board: { frames: ReadonlyMap<string, Frame>; shots: ReadonlyMap<string, Shot> }
  plan: {
    days: ReadonlyMap<string, Day>
    sets: ReadonlyMap<string, ShootSet>
    moves: ReadonlyMap<string, RoomMove>
    shotPlans: ReadonlyMap<string, ShotPlan>
    rules: ReadonlyMap<string, Rule>
  }
  looks: {
    sitters: ReadonlyMap<string, Sitter>
    looks: ReadonlyMap<string, Look>
    pieces: ReadonlyMap<string, Piece>
  }
  lighting: {
    setups: ReadonlyMap<string, Setup>
    lights: ReadonlyMap<string, Light>
    sitterPlaces: ReadonlyMap<string, SitterPlace>
    props: ReadonlyMap<string, Prop>
  }
}

/** A setup with all that stands in it, in a stable order. */
export type WholeSetup = {
  setup: Setup
  lights: Light[]
  places: SitterPlace[]
  props: Prop[]
}

export type PlannedLook = {
  look: Look
  sitter: Sitter | null
  pieces: Piece[]
}

/** A shot with everything it needs resolved; what is missing is null and named in `missing`. */
export type PlannedShot = {
  /** Number in the running order: derived, 1-based over all days; loose shots have none. */
  number: number | null
  shot: Shot
  plan: ShotPlan
  set: ShootSet | null
  room: Room | null
  setup: WholeSetup | null
  looks: PlannedLook[]
  cover: Frame | null
  missing: ('set' | 'setup' | 'look')[]
}

export type PlannedDay = { day: Day; shots: PlannedShot[] }

/** What screens, order search, call sheet, phone and server share. */
export type Plan = {
  brief: Brief
  minutes: Minutes
  days: PlannedDay[]
  loose: PlannedShot[]
  /** Every living shot by id. */
  shots: Map<string, PlannedShot>
  setups: Map<string, WholeSetup>
  looks: Map<string, PlannedLook>
  sets: ReadonlyMap<string, ShootSet>
  moves: ReadonlyMap<string, RoomMove>
  rules: Rule[]
}

/** By key, ties by id. */
function byRank(a: { rank: string; id: string }, b: { rank: string; id: string }): number {
  return a.rank < b.rank ? -1 : a.rank > b.rank ? 1 : a.id < b.id ? -1 : 1
}

function byPlace(a: Shot, b: Shot): number {
  return a.place[1] < b.place[1] ? -1 : a.place[1] > b.place[1] ? 1 : a.id < b.id ? -1 : 1
}

/** Id of the move between two rooms: the same in both directions. */
export function moveId(roomA: string, roomB: string): string {
  return roomA < roomB ? `${roomA}:${roomB}` : `${roomB}:${roomA}`
}

/** Setups with their lights, places and props, by setup id. */
export function wholeSetups(lighting: ReadPlanInput['lighting']): Map<string, WholeSetup> {
  const setups = new Map<string, WholeSetup>()
  for (const setup of [...lighting.setups.values()].sort(byRank)) {
    setups.set(setup.id, { setup, lights: [], places: [], props: [] })
  }
  for (const light of [...lighting.lights.values()].sort(byRank)) setups.get(light.setupId)?.lights.push(light)
  const byId = (a: { id: string }, b: { id: string }) => (a.id < b.id ? -1 : 1)
  for (const place of [...lighting.sitterPlaces.values()].sort(byId)) setups.get(place.setupId)?.places.push(place)
  for (const prop of [...lighting.props.values()].sort(byId)) setups.get(prop.setupId)?.props.push(prop)
  return setups
}

/** Looks with sitter and pieces in their order, sorted by sitter's id and the look's rank. */
export function plannedLooks(looks: ReadPlanInput['looks']): Map<string, PlannedLook> {
  const sorted = [...looks.looks.values()].sort((a, b) =>
    a.sitterId === b.sitterId ? byRank(a, b) : a.sitterId < b.sitterId ? -1 : 1,
  )
  return new Map(
    sorted.map((look) => [
      look.id,
      {
        look,
        sitter: looks.sitters.get(look.sitterId) ?? null,
        pieces: look.pieceIds.flatMap((id) => looks.pieces.get(id) ?? []),
      },
    ]),
  )
}

/**
 * The read model of a shoot: documents and tables joined, shots in running order and numbered. A shot whose list is
 * no living day is loose. Days are sorted by date (undated last), then id.
 */
export function readPlan(input: ReadPlanInput): Plan {
  const setups = wholeSetups(input.lighting)
  const looks = plannedLooks(input.looks)
  const rooms = new Map(input.brief.rooms.map((room) => [String(room.id), room]))
  const days = [...input.plan.days.values()].sort((a, b) => {
    const left = a.date ?? '9999'
    const right = b.date ?? '9999'
    return left < right ? -1 : left > right ? 1 : a.id < b.id ? -1 : 1
  })
  const shots = new Map<string, PlannedShot>()
  const lists = new Map<string, PlannedShot[]>(days.map((day) => [String(day.id), []]))
  const loose: PlannedShot[] = []
  for (const shot of [...input.board.shots.values()].sort(byPlace)) {
    const plan = input.plan.shotPlans.get(shot.id) ?? shotPlanSchema.parse({ id: shot.id })
    const set = plan.setId === null ? null : (input.plan.sets.get(plan.setId) ?? null)
    const setup = plan.setupId === null ? null : (setups.get(plan.setupId) ?? null)
    const shotLooks = shot.lookIds.flatMap((id) => looks.get(id) ?? [])
    const missing: PlannedShot['missing'] = []
    if (!set) missing.push('set')
    if (!setup) missing.push('setup')
    if (shotLooks.length === 0) missing.push('look')
    const planned: PlannedShot = {
      number: null,
      shot,
      plan,
      set,
      room: set?.roomId ? (rooms.get(set.roomId) ?? null) : null,
      setup,
      looks: shotLooks,
      cover: shot.coverFrameId === null ? null : (input.board.frames.get(shot.coverFrameId) ?? null),
      missing,
    }
    shots.set(shot.id, planned)
    const list = shot.place[0] === LOOSE ? undefined : lists.get(shot.place[0])
    if (list) list.push(planned)
    else loose.push(planned)
  }
  let number = 0
  for (const list of lists.values()) for (const planned of list) planned.number = ++number
  return {
    brief: input.brief,
    minutes: input.minutes,
    days: days.map((day) => ({ day, shots: lists.get(day.id) ?? [] })),
    loose,
    shots,
    setups,
    looks,
    sets: input.plan.sets,
    moves: input.plan.moves,
    rules: [...input.plan.rules.values()].sort((a, b) => (a.id < b.id ? -1 : 1)),
  }
}
