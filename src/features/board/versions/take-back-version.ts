import type * as Y from 'yjs'
import type { VersionStates } from '#shared/api/versions.ts'
import { COLLECTIONS } from '#shared/realtime/documents.ts'
import { type Differences, differencesOf, openPast, takeBack } from '#shared/realtime/take-back.ts'
import { linkNewestSteps } from '#src/realtime/linked-undo.ts'

/** The documents that a version keeps. */
export const KEPT_KINDS = ['board', 'plan'] as const
export type KeptKind = (typeof KEPT_KINDS)[number]

type Open = { doc: Y.Doc; undo: Y.UndoManager }
export type OpenKept = Readonly<Record<KeptKind, Open>>
export type PastDocs = Readonly<Record<KeptKind, Y.Doc>>

/** Both documents as they stood, copies of their own. */
export function openVersion(
  states: Pick<VersionStates, KeptKind>,
  now: Readonly<Record<KeptKind, { doc: Y.Doc }>>,
): PastDocs {
  const open = (kind: KeptKind) =>
    openPast(
      kind,
      Uint8Array.from(atob(states[kind]), (char) => char.charCodeAt(0)),
      now[kind].doc,
    )
  return { board: open('board'), plan: open('plan') }
}

/**
 * Makes the documents of these kinds what they were, as one step of the hand. Others see it happen; one undo, in either
 * document, takes it back. Returns the kinds that differed.
 */
export function takeBackVersion(now: OpenKept, past: PastDocs, kinds: readonly KeptKind[], nowMs: number): KeptKind[] {
  for (const kind of kinds) now[kind].undo.stopCapturing()
  const written = kinds.filter((kind) => takeBack(now[kind].doc, kind, past[kind], nowMs))
  for (const kind of kinds) now[kind].undo.stopCapturing()
  if (written.length === KEPT_KINDS.length) linkNewestSteps(now.board.undo, now.plan.undo)
  return written
}

/** How many things taking a version back does what to, by their word. */
export type VersionDifferences = ReadonlyMap<string, { back: number; gone: number; changed: number }>

/** What taking back these kinds changes, in the order in which it is told. */
export function versionDifferences(
  now: Readonly<Record<KeptKind, { doc: Y.Doc }>>,
  past: PastDocs,
  kinds: readonly KeptKind[],
): VersionDifferences {
  const { frames, notes, tags, areas, palettes, shots } = COLLECTIONS.board
  const { days, sets, moves, shotPlans, rules } = COLLECTIONS.plan
  const of = (kind: KeptKind, c: Parameters<typeof differencesOf>[2]): Differences =>
    kinds.includes(kind) ? differencesOf(now[kind].doc, past[kind], c) : { back: [], gone: [], changed: [] }
  const told: readonly [word: string, Differences][] = [
    ['frame', of('board', frames)],
    ['note', of('board', notes)],
    ['tag', of('board', tags)],
    ['area', of('board', areas)],
    ['palette', of('board', palettes)],
    ['shot', withPlans(of('board', shots), of('plan', shotPlans))],
    ['day', of('plan', days)],
    ['set', of('plan', sets)],
    ['room move', of('plan', moves)],
    ['order rule', of('plan', rules)],
  ]
  return new Map(
    told.map(([word, { back, gone, changed }]) => [
      word,
      { back: back.length, gone: gone.length, changed: changed.length },
    ]),
  )
}

/** What the plan says of a shot is a part of the shot: it changes when either does. */
function withPlans(shots: Differences, plans: Differences): Differences {
  const counted = new Set([...shots.back, ...shots.gone])
  const planned = [...plans.back, ...plans.gone, ...plans.changed].filter((id) => !counted.has(id))
  return { ...shots, changed: [...new Set([...shots.changed, ...planned])] }
}
