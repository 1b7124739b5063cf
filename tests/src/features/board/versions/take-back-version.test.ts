import { describe, expect, it } from 'vitest'
import * as Y from 'yjs'
import { dayIdSchema, noteIdSchema, shotIdSchema } from '#shared/ids.ts'
import { patchItem, putItems, readAll, removeItems, rootOf, upsertItem } from '#shared/realtime/collection.ts'
import { COLLECTIONS, days, notes, shotPlans, shots } from '#shared/realtime/documents.ts'
import {
  type KeptKind,
  openVersion,
  takeBackVersion,
  versionDifferences,
} from '#src/features/board/versions/take-back-version.ts'
import { createUndo } from '#src/realtime/undo-manager.ts'

const uuid = (n: number) => `00000000-0000-4000-8000-${String(n).padStart(12, '0')}`
const NOTE = noteIdSchema.parse(uuid(1))
const SHOT = shotIdSchema.parse(uuid(2))
const LATER = shotIdSchema.parse(uuid(3))
const DAY = dayIdSchema.parse(uuid(4))

function openDoc(kind: KeptKind) {
  const doc = new Y.Doc()
  const undo = createUndo(
    doc,
    Object.values(COLLECTIONS[kind]).map((c) => rootOf(doc, c)),
  )
  return { doc, undo }
}

/** A board and a plan that have gone on since they were kept. */
function sinceKept() {
  const now = { board: openDoc('board'), plan: openDoc('plan') }
  const { board, plan } = now
  putItems(board.doc, notes, [{ id: NOTE, box: [0, 0, 80, 40], text: 'Tänk på ljuset 🕯' }], () => 0.5)
  putItems(board.doc, shots, [{ id: SHOT, title: 'Dusk', place: ['loose', 'a0'] }], () => 0.5)
  upsertItem(plan.doc, shotPlans, { id: SHOT, minutes: 20 })
  const base64 = ({ doc }: { doc: Y.Doc }) => Buffer.from(Y.encodeStateAsUpdate(doc)).toString('base64')
  const states = { board: base64(board), plan: base64(plan) }
  removeItems(board.doc, notes, [NOTE], 5)
  putItems(board.doc, shots, [{ id: LATER, title: 'Dawn', place: ['loose', 'a1'] }], () => 0.5)
  upsertItem(plan.doc, shotPlans, { id: SHOT, minutes: 45 })
  upsertItem(plan.doc, shotPlans, { id: LATER, minutes: 30 })
  putItems(plan.doc, days, [{ id: DAY }], () => 0.5)
  const minutes = () => readAll(plan.doc, shotPlans).items.get(SHOT)?.minutes
  const text = () => readAll(board.doc, notes).items.get(NOTE)?.text
  return { now, past: openVersion(states, now), seen: () => [text(), minutes()] }
}

describe('takeBackVersion', () => {
  it('is a step of its own, undone in both documents by one', () => {
    const { now, past, seen } = sinceKept()
    patchItem(now.board.doc, shots, SHOT, { title: 'Blue hour' })
    expect(takeBackVersion(now, past, ['board', 'plan'], 9)).toEqual(['board', 'plan'])
    patchItem(now.board.doc, shots, SHOT, { note: 'After it' })
    expect(seen()).toEqual(['Tänk på ljuset 🕯', 20])
    now.board.undo.undo()
    expect(seen()).toEqual(['Tänk på ljuset 🕯', 20])
    now.board.undo.undo()
    expect(seen()).toEqual([undefined, 45])
    expect(readAll(now.board.doc, shots).items.get(SHOT)?.title).toBe('Blue hour')
  })

  it('leaves a document alone whose writer the person is not', () => {
    const { now, past, seen } = sinceKept()
    expect(takeBackVersion(now, past, ['board'], 9)).toEqual(['board'])
    expect(seen()).toEqual(['Tänk på ljuset 🕯', 45])
    now.board.undo.undo()
    expect(seen()).toEqual([undefined, 45])
  })

  it('writes nothing where nothing differs', () => {
    const { now, past } = sinceKept()
    takeBackVersion(now, past, ['board', 'plan'], 9)
    expect(takeBackVersion(now, past, ['board', 'plan'], 9)).toEqual([])
  })
})

describe('versionDifferences', () => {
  const told = (kinds: readonly KeptKind[]) => {
    const { now, past } = sinceKept()
    return Object.fromEntries(
      [...versionDifferences(now, past, kinds)].filter(([, { back, gone, changed }]) => back + gone + changed > 0),
    )
  }

  it('counts what the plan says of a shot as the shot, once', () => {
    expect(told(['board', 'plan'])).toEqual({
      note: { back: 1, gone: 0, changed: 0 },
      shot: { back: 0, gone: 1, changed: 1 },
      day: { back: 0, gone: 1, changed: 0 },
    })
  })

  it('leaves out what stays', () => {
    expect(told(['board'])).toEqual({
      note: { back: 1, gone: 0, changed: 0 },
      shot: { back: 0, gone: 1, changed: 0 },
    })
  })
})
