import type { Minutes } from '#shared/domain/plan/minutes.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { type Cost, cheapestPairs } from './assign.ts'
import { angleBetweenDeg, distanceBetween, facePoint, minus } from './geometry.ts'
import {
  type Place,
  addWords,
  aimWords,
  backgroundWords,
  cameraWords,
  moveWords,
  swapWords,
} from './changeover-words.ts'
import type { Background, Camera, Light, Prop } from './schema.ts'
import { inSentence, powerLabel, purposeWord } from './words.ts'

export type ActionKind =
  | 'add'
  | 'strike'
  | 'move'
  | 'aim'
  | 'modifier'
  | 'gel'
  | 'switch'
  | 'power'
  | 'zoom'
  | 'support'
  | 'group'
  | 'panel'
  | 'prop'
  | 'camera'
  | 'lens'
  | 'background'

/** One thing that somebody does in a changeover. `key` is stable for ticks; `group` is the light's letter. */
export type ChangeAction = {
  key: string
  kind: ActionKind
  group: string | null
  what: string
  detail: string
  minutes: number
}

/** Up to this from where it stood (five centimetres, with room for rounding) a thing has not moved, metres (assumption). */
export const MOVED_M = 0.05 + 1e-6
/** A head turned by less than this has not been turned, degrees (assumption). */
export const TURNED_DEG = 5

/** Camera, lens and dressing change no light: they cost minutes but ask for no test frames. */
const NOT_LIGHTING: ReadonlySet<ActionKind> = new Set(['camera', 'lens', 'prop'])

type Around = { from: Place; to: Place; sameRoom: boolean; minutes: Minutes }

function sameKit(a: { kitId: string; name: string } | null, b: { kitId: string; name: string } | null): boolean {
  return a?.kitId === b?.kitId && a?.name === b?.name
}

function sameGels(a: Light, b: Light): boolean {
  const names = (light: Light) =>
    light.gels
      .map((gel) => `${gel.kitId} ${gel.name}`)
      .sort()
      .join()
  return names(a) === names(b)
}

function unitKey(light: Light): string {
  return light.unit.kitId
}

/** What becomes of one light that is in both setups. */
function lightActions(before: Light, after: Light, around: Around): ChangeAction[] {
  const { minutes } = around
  const actions: ChangeAction[] = []
  const name = purposeWord(after.purpose)
  const add = (kind: ActionKind, what: string, detail: string, min: number) =>
    actions.push({ key: `${after.id}:${kind}`, kind, group: after.group, what, detail, minutes: min })
  const moved = !around.sameRoom || distanceBetween(before.at, after.at) > MOVED_M
  const became = before.purpose === after.purpose ? '' : `was the ${purposeWord(before.purpose).toLowerCase()}`
  if (moved) {
    const words = moveWords(name, before.at, after.at, around.from, around.to, around.sameRoom)
    const detail = [became, words.detail].filter((part) => part !== '').join(' · ')
    add('move', words.what, detail, after.support?.numbers.kind === 'boom' ? minutes.boomMove : minutes.standMove)
  } else if (angleBetweenDeg(minus(before.aim, before.at), minus(after.aim, after.at)) > TURNED_DEG) {
    add('aim', `${name}: ${aimWords(after, around.to)}`, became, minutes.powerByHand)
  }
  if (!sameKit(before.modifier, after.modifier)) {
    add('modifier', `${name}: ${swapWords(before.modifier?.name, after.modifier?.name)}`, '', minutes.modifier)
  }
  if (!sameGels(before, after)) {
    const off = before.gels.filter((gel) => !after.gels.some((other) => sameKit(gel, other)))
    const on = after.gels.filter((gel) => !before.gels.some((other) => sameKit(gel, other)))
    const list = (gels: Light['gels']) =>
      gels.length === 0 ? undefined : gels.map((gel) => inSentence(gel.name)).join(' and ')
    const words = off.length + on.length === 0 ? 'change how many of each gel' : swapWords(list(off), list(on))
    add('gel', `${name}: ${words}`, '', minutes.gel)
  }
  if (!sameKit(before.support, after.support)) {
    const words = after.support
      ? `onto ${inSentence(after.support.name)}`
      : `off ${inSentence(before.support?.name ?? 'its support')}`
    add('support', `${name}: ${words}`, '', minutes.support)
  }
  const byHand = after.unit.numbers.remotePower ? minutes.powerRemote : minutes.powerByHand
  const how = after.unit.numbers.remotePower ? 'by remote' : 'by hand'
  if (before.isOn !== after.isOn) add('switch', `${name}: switch ${after.isOn ? 'on' : 'off'}`, how, byHand)
  // What is off has no power to be seen: it is set when it is switched on.
  if (after.isOn && powerLabel(before.power) !== powerLabel(after.power)) {
    add('power', `${name} to ${powerLabel(after.power)}`, `from ${powerLabel(before.power)}, ${how}`, byHand)
  }
  if (before.zoomMm !== after.zoomMm) {
    const words = after.zoomMm === null ? `${name}: zoom no longer set` : `${name}: zoom to ${after.zoomMm} mm`
    add('zoom', words, before.zoomMm === null ? how : `from ${before.zoomMm} mm, ${how}`, byHand)
  }
  if (before.group !== after.group) {
    const words =
      after.group === null ? `${name}: out of group ${before.group ?? ''}` : `${name}: into group ${after.group}`
    add('group', words, before.group === null ? '' : `from ${before.group}`, minutes.powerByHand)
  }
  return actions
}

/** Least minutes first; then the evenest shares among hands, then the least change of purpose and group. */
function pairCost(before: Light, after: Light, around: Around): Cost {
  const spent = lightActions(before, after, around).map((action) => action.minutes)
  const sum = (power: number) => spent.reduce((total, min) => total + min ** power, 0)
  return [
    sum(1),
    sum(2),
    sum(3),
    spent.length,
    before.purpose === after.purpose ? 0 : 1,
    before.group === after.group ? 0 : 1,
    distanceBetween(before.at, after.at),
  ]
}

function grouped<T>(items: readonly T[], keyOf: (item: T) => string): Map<string, T[]> {
  const groups = new Map<string, T[]>()
  for (const item of items) {
    const group = groups.get(keyOf(item))
    if (group) group.push(item)
    else groups.set(keyOf(item), [item])
  }
  return groups
}

type Matched<T> = { stays: [before: T, after: T][]; added: T[]; struck: T[] }

/** Pairs equal things of two setups at least cost; what has no partner is added or struck. */
function match<T>(
  from: readonly T[],
  to: readonly T[],
  keyOf: (item: T) => string,
  cost: (a: T, b: T) => Cost,
): Matched<T> {
  const result: Matched<T> = { stays: [], added: [], struck: [] }
  const before = grouped(from, keyOf)
  const after = grouped(to, keyOf)
  for (const key of new Set([...before.keys(), ...after.keys()])) {
    const left = before.get(key) ?? []
    const right = after.get(key) ?? []
    const pairs = cheapestPairs(left, right, cost)
    const leftTaken = new Set(pairs.map(([index]) => index))
    const rightTaken = new Set(pairs.map(([, index]) => index))
    for (const [i, j] of pairs) {
      const a = left[i]
      const b = right[j]
      if (a !== undefined && b !== undefined) result.stays.push([a, b])
    }
    result.struck.push(...left.filter((_, index) => !leftTaken.has(index)))
    result.added.push(...right.filter((_, index) => !rightTaken.has(index)))
  }
  return result
}

function propKey(prop: Prop): string {
  return [prop.kind, prop.name, prop.widthM, prop.heightM, prop.colour].join('|')
}

function propMoved(before: Prop, after: Prop, sameRoom: boolean): boolean {
  const turned = Math.abs(((after.turnDeg - before.turnDeg + 540) % 360) - 180)
  return !sameRoom || distanceBetween(before.at, after.at) > MOVED_M || turned > TURNED_DEG
}

function propActions(from: readonly Prop[], to: readonly Prop[], around: Around): ChangeAction[] {
  const matched = match(from, to, propKey, (a, b) => [
    propMoved(a, b, around.sameRoom) ? 1 : 0,
    distanceBetween(a.at, b.at),
  ])
  const action = (prop: Prop, verb: string, what: string, detail: string): ChangeAction => ({
    key: `${prop.id}:${verb}`,
    kind: prop.kind === 'prop' ? 'prop' : 'panel',
    group: null,
    what,
    detail,
    minutes: around.minutes.panel,
  })
  return [
    ...matched.struck.map((prop) => action(prop, 'strike', `${prop.name}: strike`, '')),
    ...matched.stays
      .filter(([before, after]) => propMoved(before, after, around.sameRoom))
      .map(([before, after]) => {
        const words = moveWords(after.name, before.at, after.at, around.from, around.to, around.sameRoom)
        return action(after, 'move', words.what, words.detail)
      }),
    ...matched.added.map((prop) => action(prop, 'add', addWords(prop.name, prop.at, around.to), '')),
  ]
}

function cameraActions(from: Camera | null, to: Camera, setupId: string, around: Around): ChangeAction[] {
  const actions: ChangeAction[] = []
  const add = (kind: ActionKind, what: string, min: number) =>
    actions.push({ key: `${setupId}:${kind}`, kind, group: null, what, detail: '', minutes: min })
  if (!from || !around.sameRoom || distanceBetween(from.at, to.at) > MOVED_M) {
    add('camera', cameraWords(from?.at ?? null, to.at, around.to, around.sameRoom), around.minutes.cameraMove)
  }
  if (from && from.focalMm !== to.focalMm) add('lens', `Lens to ${to.focalMm} mm`, around.minutes.lens)
  return actions
}

function sameBackground(a: Background, b: Background): boolean {
  return (
    Math.abs(a.zM - b.zM) <= MOVED_M &&
    a.what === b.what &&
    a.colour.toLowerCase() === b.colour.toLowerCase() &&
    Math.abs(a.widthM - b.widthM) <= MOVED_M &&
    Math.abs(a.heightM - b.heightM) <= MOVED_M
  )
}

/**
 * What has to be done between two setups, light by light: the crew's card and the minutes of a changeover.
 *
 * Lights are matched by the kind of unit; among equal units the pairing that costs least minutes is taken, so that the
 * answer depends on what stands where and not on ids. In another room no light stays: each matched one is a move plus
 * its differences (the background only where it differs: a room's own dressing has minutes of its own). `from` null is
 * rigging from nothing. Minutes are the studio's own; their defaults are common practice, no source. Camera settings
 * (f-number, ISO, shutter) are no action.
 */
export function changeActions(
  from: WholeSetup | null,
  to: WholeSetup,
  options: { sameRoom: boolean; minutes: Minutes },
): ChangeAction[] {
  const { minutes, sameRoom } = options
  const around: Around = { from: facePoint(from ?? to), to: facePoint(to), sameRoom, minutes }
  const matched = match(from?.lights ?? [], to.lights, unitKey, (a, b) => pairCost(a, b, around))
  const order = new Map(to.lights.map((light, index) => [light.id, index]))
  const staying = matched.stays.sort(([, a], [, b]) => (order.get(a.id) ?? 0) - (order.get(b.id) ?? 0))
  const actions: ChangeAction[] = []
  for (const light of matched.struck) {
    const what = `${purposeWord(light.purpose)}: strike`
    actions.push({
      key: `${light.id}:strike`,
      kind: 'strike',
      group: light.group,
      what,
      detail: light.unit.name,
      minutes: minutes.strike,
    })
  }
  for (const [before, after] of staying) actions.push(...lightActions(before, after, around))
  for (const light of to.lights.filter((candidate) => matched.added.includes(candidate))) {
    const detail = [
      light.unit.name,
      ...(light.modifier ? [inSentence(light.modifier.name)] : []),
      ...light.gels.map((gel) => inSentence(gel.name)),
      ...(light.support ? [inSentence(light.support.name)] : []),
      `${light.at[1].toFixed(1)} m up`,
      light.isOn ? powerLabel(light.power) : 'off',
    ].join(' · ')
    const what = addWords(purposeWord(light.purpose), light.at, around.to)
    actions.push({ key: `${light.id}:add`, kind: 'add', group: light.group, what, detail, minutes: minutes.add })
  }
  actions.push(...propActions(from?.props ?? [], to.props, around))
  actions.push(...cameraActions(from?.setup.camera ?? null, to.setup.camera, to.setup.id, around))
  if (!from || !sameBackground(from.setup.background, to.setup.background)) {
    const words = backgroundWords(from?.setup.background ?? null, to.setup.background)
    actions.push({
      key: `${to.setup.id}:background`,
      kind: 'background',
      group: null,
      ...words,
      minutes: minutes.background,
    })
  }
  return actions
}

/** Whether an action changes the light, so that test frames are wanted after it. */
export function changesLight(action: ChangeAction): boolean {
  return !NOT_LIGHTING.has(action.kind)
}

/**
 * Minutes of the actions shared among `hands` people: list scheduling, longest first, ties by key, each to whoever is
 * free first; plus the test frames when anything but camera, lens or dressing changed. Minutes ≥ 0.
 */
export function lightingMinutes(actions: readonly ChangeAction[], hands: number, minutes: Minutes): number {
  if (actions.length === 0) return 0
  const sorted = [...actions].sort((a, b) => b.minutes - a.minutes || (a.key < b.key ? -1 : a.key > b.key ? 1 : 0))
  const busyMin = Array.from({ length: Math.max(1, Math.floor(hands)) }, () => 0)
  for (const action of sorted) {
    const free = busyMin.indexOf(Math.min(...busyMin))
    busyMin[free] = (busyMin[free] ?? 0) + action.minutes
  }
  return Math.max(...busyMin) + (actions.some(changesLight) ? minutes.testFrames : 0)
}
