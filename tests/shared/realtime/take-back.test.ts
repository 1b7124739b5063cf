import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import * as Y from 'yjs'
import type { Picture } from '#shared/domain/board/schema.ts'
import { dayIdSchema, frameIdSchema, lookIdSchema, noteIdSchema, shotIdSchema, uploadIdSchema } from '#shared/ids.ts'
import {
  type Collection,
  addMember,
  orderMembers,
  patchItem,
  putItems,
  readAll,
  removeItems,
  removeMember,
  rootOf,
  upsertItem,
} from '#shared/realtime/collection.ts'
import { COLLECTIONS, days, frames, notes, shotPlans, shots } from '#shared/realtime/documents.ts'
import { differencesOf, openPast, takeBack } from '#shared/realtime/take-back.ts'
import { createUndo } from '#src/realtime/undo-manager.ts'

const uuid = (n: number) => `00000000-0000-4000-8000-${String(n).padStart(12, '0')}`
const NOW_MS = Date.UTC(2027, 9, 14)
const random = () => 0.4
const KINDS = ['board', 'plan'] as const
type Kind = (typeof KINDS)[number]

/** Content as people read it, of every collection, as plain values. */
function contentOf(doc: Y.Doc, kind: Kind): Record<string, Record<string, unknown>> {
  const collections: readonly Collection[] = Object.values(COLLECTIONS[kind])
  return Object.fromEntries(collections.map((c) => [c.root, Object.fromEntries(readAll(doc, c).items)]))
}

function unreadableOf(doc: Y.Doc, kind: Kind): unknown[] {
  const collections: readonly Collection[] = Object.values(COLLECTIONS[kind])
  return collections.flatMap((c) => readAll(doc, c).unreadable)
}

function undoOf(doc: Y.Doc, kind: Kind): Y.UndoManager {
  return createUndo(
    doc,
    Object.values(COLLECTIONS[kind]).map((c) => doc.getMap(c.root)),
  )
}

function sync(a: Y.Doc, b: Y.Doc): void {
  Y.applyUpdate(b, Y.encodeStateAsUpdate(a, Y.encodeStateVector(b)))
  Y.applyUpdate(a, Y.encodeStateAsUpdate(b, Y.encodeStateVector(a)))
}

/** One thing somebody does, by number: what, to which item, with what. */
type Step = { what: number; n: number; value: number }
const stepsArb = (maxLength: number) =>
  fc.array(fc.record({ what: fc.nat(10), n: fc.nat(4), value: fc.nat(6) }), { maxLength })

const lookId = (n: number) => lookIdSchema.parse(uuid(900 + n))

/** Does a step; who does what cannot be done does nothing. Answers the id it touched. */
function act(doc: Y.Doc, kind: Kind, { what, n, value }: Step, origin: unknown): string {
  const box: [number, number, number, number] = [value * 10, n * 10, 80, 40]
  if (kind === 'plan') {
    const shotId = shotIdSchema.parse(uuid(100 + n))
    const dayId = dayIdSchema.parse(uuid(200 + n))
    const steps = [
      () => upsertItem(doc, shotPlans, { id: shotId, minutes: value + 1 }, origin),
      () => upsertItem(doc, shotPlans, { id: shotId, lens: `${value} mm` }, origin),
      () => removeItems(doc, shotPlans, [shotId], value + 1, origin),
      () => rootOf(doc, days).has(dayId) || putItems(doc, days, [{ id: dayId, hands: value + 1 }], random, origin),
      () =>
        patchItem(doc, days, dayId, { meal: value < 3 ? null : { minutes: 30 + value, latestAfterMin: 300 } }, origin),
      () => removeItems(doc, days, [dayId], value + 1, origin),
    ]
    const at = what % steps.length
    steps[at]?.()
    return at < 3 ? shotId : dayId
  }
  const noteId = noteIdSchema.parse(uuid(n))
  const shotId = shotIdSchema.parse(uuid(100 + n))
  const steps = [
    () =>
      rootOf(doc, notes).has(noteId) || putItems(doc, notes, [{ id: noteId, box, text: `${value}` }], random, origin),
    () => patchItem(doc, notes, noteId, { box }, origin),
    () => patchItem(doc, notes, noteId, { text: `said ${value}` }, origin),
    () => removeItems(doc, notes, [noteId], value + 1, origin),
    () => {
      // What the server does after 30 days.
      const map = rootOf(doc, notes).get(noteId)
      if (map instanceof Y.Map && typeof map.get('deleted') === 'number') rootOf(doc, notes).delete(noteId)
    },
    () =>
      rootOf(doc, shots).has(shotId) ||
      putItems(
        doc,
        shots,
        [{ id: shotId, title: 'Dusk', place: ['loose', 'a0'], lookIds: [lookId(n)] }],
        random,
        origin,
      ),
    () => patchItem(doc, shots, shotId, { place: ['loose', `a${value}`] }, origin),
    () => addMember(doc, shots, shotId, 'lookIds', lookId(value), random, origin),
    () => removeMember(doc, shots, shotId, 'lookIds', lookId(value), origin),
    () => orderMembers(doc, shots, shotId, 'lookIds', [lookId(value), lookId(n)], random, origin),
    () => removeItems(doc, shots, [shotId], value + 1, origin),
  ]
  steps[what]?.()
  return what < 5 ? noteId : shotId
}

const THEIRS = 'somebody before'

/** A document with a history, and its past part of the way through it. */
function historyOf(kind: Kind, before: readonly Step[], after: readonly Step[]): { doc: Y.Doc; past: Y.Doc } {
  const doc = new Y.Doc()
  for (const step of before) act(doc, kind, step, THEIRS)
  const state = Y.encodeStateAsUpdate(doc)
  for (const step of after) act(doc, kind, step, THEIRS)
  return { doc, past: openPast(kind, state, doc) }
}

describe('takeBack', () => {
  it.each(KINDS)('makes a %s of any history what it was, and one undo makes it what it became', (kind) => {
    fc.assert(
      fc.property(stepsArb(25), stepsArb(25), (before, after) => {
        const { doc, past } = historyOf(kind, before, after)
        const then = contentOf(past, kind)
        const became = contentOf(doc, kind)
        const undo = undoOf(doc, kind)
        const isWritten = takeBack(doc, kind, past, NOW_MS)
        expect(contentOf(doc, kind)).toEqual(then)
        expect(undo.undoStack).toHaveLength(isWritten ? 1 : 0)
        undo.undo()
        expect(contentOf(doc, kind)).toEqual(became)
        undo.redo()
        expect(contentOf(doc, kind)).toEqual(then)
        expect(takeBack(doc, kind, past, NOW_MS)).toBe(false)
      }),
      { numRuns: 300 },
    )
  })

  it.each(KINDS)('merges with what another person does to a %s at the same time, and so does its undo', (kind) => {
    fc.assert(
      fc.property(stepsArb(20), stepsArb(20), stepsArb(6), fc.boolean(), (before, after, meanwhile, isFirst) => {
        const { doc, past } = historyOf(kind, before, after)
        const other = new Y.Doc()
        doc.clientID = isFirst ? 10 : 20
        other.clientID = isFirst ? 20 : 10
        sync(doc, other)
        const became = contentOf(doc, kind)
        const undo = undoOf(doc, kind)
        takeBack(doc, kind, past, NOW_MS)
        // The server alone purges.
        const theirs = meanwhile.filter(({ what }) => kind === 'plan' || what !== 4)
        const touched = new Set(theirs.map((step) => act(other, kind, step, THEIRS)))
        sync(doc, other)
        expect(contentOf(other, kind)).toEqual(contentOf(doc, kind))
        undo.undo()
        sync(doc, other)
        expect(contentOf(other, kind)).toEqual(contentOf(doc, kind))
        expect(unreadableOf(doc, kind)).toEqual([])
        const without = (content: ReturnType<typeof contentOf>) =>
          Object.values(content).flatMap((items) => Object.entries(items).filter(([id]) => !touched.has(id)))
        expect(without(contentOf(doc, kind))).toEqual(without(became))
      }),
      { numRuns: 300 },
    )
  })

  it('keeps what somebody else hung meanwhile, through undo as well', () => {
    const { doc, past } = historyOf('board', [], [{ what: 0, n: 1, value: 1 }])
    const other = new Y.Doc()
    sync(doc, other)
    const undo = undoOf(doc, 'board')
    takeBack(doc, 'board', past, NOW_MS)
    act(other, 'board', { what: 0, n: 2, value: 2 }, THEIRS)
    sync(doc, other)
    expect([...readAll(doc, notes).items.keys()]).toEqual([uuid(2)])
    undo.undo()
    expect([...readAll(doc, notes).items.keys()].sort()).toEqual([uuid(1), uuid(2)])
  })

  it('never deletes by its undo what others have put into an item that was born again', () => {
    const { doc, past } = historyOf('board', [{ what: 0, n: 1, value: 1 }], [])
    removeItems(doc, notes, [uuid(1)], 5, THEIRS)
    rootOf(doc, notes).delete(uuid(1))
    const other = new Y.Doc()
    const undo = undoOf(doc, 'board')
    takeBack(doc, 'board', past, NOW_MS)
    sync(doc, other)
    patchItem(other, notes, uuid(1), { text: 'theirs' }, THEIRS)
    undo.undo()
    sync(doc, other)
    expect(readAll(other, notes).items.size).toBe(0)
    undo.redo()
    sync(doc, other)
    expect(readAll(other, notes).items.get(noteIdSchema.parse(uuid(1)))?.text).toBe('theirs')
  })

  it('leaves roots, items and fields that no schema knows as they are', () => {
    const doc = new Y.Doc()
    putItems(doc, notes, [{ id: noteIdSchema.parse(uuid(1)), box: [0, 0, 80, 40], text: 'then' }], random)
    const past = openPast('board', Y.encodeStateAsUpdate(doc), doc)
    patchItem(doc, notes, uuid(1), { text: 'now' })
    const note = rootOf(doc, notes).get(uuid(1))
    if (note instanceof Y.Map) note.set('hologram', 3)
    rootOf(doc, notes).set(uuid(2), new Y.Map([['hologram', 4]]))
    rootOf(doc, notes).set(uuid(3), 'not even a map')
    doc.getMap('holograms').set('a', 1)
    takeBack(doc, 'board', past, NOW_MS)
    expect(doc.getMap('notes').toJSON()).toEqual({
      [uuid(1)]: { box: [0, 0, 80, 40], z: 0, text: 'then', deleted: false, hologram: 3 },
      [uuid(2)]: { hologram: 4 },
      [uuid(3)]: 'not even a map',
    })
    expect(doc.getMap('holograms').toJSON()).toEqual({ a: 1 })
  })

  it('writes over nothing that a later schema put in the place of an item', () => {
    const doc = new Y.Doc()
    putItems(doc, notes, [{ id: noteIdSchema.parse(uuid(1)), box: [0, 0, 80, 40], text: 'then' }], random)
    const past = openPast('board', Y.encodeStateAsUpdate(doc), doc)
    rootOf(doc, notes).set(uuid(1), 'no map any more')
    expect(differencesOf(doc, past, notes).back).toEqual([])
    expect(takeBack(doc, 'board', past, NOW_MS)).toBe(false)
    expect(doc.getMap('notes').toJSON()).toEqual({ [uuid(1)]: 'no map any more' })
  })

  it('brings no old field back with the first new one of an item that lives by being written', () => {
    const id = shotIdSchema.parse(uuid(1))
    const doc = new Y.Doc()
    const past = openPast('plan', Y.encodeStateAsUpdate(doc), doc)
    upsertItem(doc, shotPlans, { id, minutes: 45, lens: '85 mm' })
    takeBack(doc, 'plan', past, NOW_MS)
    upsertItem(doc, shotPlans, { id, frames: 12 })
    expect(readAll(doc, shotPlans).items.get(id)).toMatchObject({ minutes: 20, lens: '', frames: 12 })
  })
})

describe('openPast', () => {
  const UPLOAD = uploadIdSchema.parse(uuid(50))
  const ID = frameIdSchema.parse(uuid(1))
  const picture = (state: Picture['state']) => ({ uploadId: UPLOAD, state, widthPx: 80, heightPx: 60 })

  it('shows a picture that has arrived since, and taking back leaves it arrived', () => {
    const doc = new Y.Doc()
    putItems(doc, frames, [{ id: ID, box: [0, 0, 80, 60], picture: picture('waiting'), caption: 'then' }], random)
    const state = Y.encodeStateAsUpdate(doc)
    patchItem(doc, frames, ID, { picture: picture('stored'), palette: ['#204060'], exposure: 'f/8', caption: 'now' })
    const past = openPast('board', state, doc)
    const then = { picture: picture('stored'), palette: ['#204060'], exposure: 'f/8', caption: 'then' }
    expect(readAll(past, frames).items.get(ID)).toMatchObject(then)
    takeBack(doc, 'board', past, NOW_MS)
    expect(readAll(doc, frames).items.get(ID)).toMatchObject(then)
  })

  it('knows of a picture from a frame that was removed since, and waits for one that is still on its way', () => {
    const doc = new Y.Doc()
    putItems(doc, frames, [{ id: ID, box: [0, 0, 80, 60], picture: picture('waiting') }], random)
    const state = Y.encodeStateAsUpdate(doc)
    expect(readAll(openPast('board', state, doc), frames).items.get(ID)?.picture.state).toBe('waiting')
    patchItem(doc, frames, ID, { picture: picture('stored') })
    removeItems(doc, frames, [ID], 5)
    expect(readAll(openPast('board', state, doc), frames).items.get(ID)?.picture.state).toBe('stored')
  })
})

describe('differencesOf', () => {
  it('says what comes back, what goes and what changes, and nothing of what is the same', () => {
    const steps = (...all: [what: number, n: number, value: number][]) =>
      all.map(([what, n, value]) => ({ what, n, value }))
    const { doc, past } = historyOf(
      'board',
      steps([0, 0, 0], [0, 1, 1], [0, 2, 2]),
      steps([3, 0, 0], [2, 1, 5], [0, 3, 3]),
    )
    expect(differencesOf(doc, past, notes)).toEqual({ back: [uuid(0)], gone: [uuid(3)], changed: [uuid(1)] })
    expect(differencesOf(doc, doc, notes)).toEqual({ back: [], gone: [], changed: [] })
  })

  it('is empty after taking back, for any history', () => {
    fc.assert(
      fc.property(stepsArb(20), stepsArb(20), (before, after) => {
        const { doc, past } = historyOf('board', before, after)
        takeBack(doc, 'board', past, NOW_MS)
        for (const c of [notes, shots]) expect(differencesOf(doc, past, c)).toEqual({ back: [], gone: [], changed: [] })
      }),
    )
  })
})
