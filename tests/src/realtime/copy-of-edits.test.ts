import { describe, expect, it } from 'vitest'
import * as Y from 'yjs'
import { patchItem, putItems, removeItems, upsertItem } from '#shared/realtime/collection.ts'
import { notes, shotPlans, shots } from '#shared/realtime/documents.ts'
import { copyOfEdits } from '#src/realtime/copy-of-edits.ts'
import type { LeftBehind } from '#src/realtime/left-behind.ts'

const id = (n: number) => `00000000-0000-4000-8000-${String(n).padStart(12, '0')}`
const note = (n: number, text: string) => ({
  id: id(n),
  box: [0, 0, 100, 50] as [number, number, number, number],
  text,
})
const left = (kind: LeftBehind['kind']): LeftBehind => ({
  cache: `rt:ines:shoot:${kind}:1`,
  kind,
  edits: 3,
  sinceMs: Date.UTC(2026, 11, 1, 14, 5),
})
const SHOOT = { id: 'shoot', title: 'Leaf, Brass & Star' }
const NOW_MS = Date.UTC(2026, 11, 1, 15)

/** A document and the same one as another device has it. */
function pair() {
  const mine = new Y.Doc()
  putItems(mine, notes, [note(1, 'same'), note(2, 'was'), note(3, 'gone here'), note(4, 'gone there')], () => 0.5)
  const theirs = new Y.Doc()
  Y.applyUpdate(theirs, Y.encodeStateAsUpdate(mine))
  patchItem(mine, notes, id(2), { text: 'felt collar' })
  removeItems(mine, notes, [id(3)], 5)
  putItems(mine, notes, [note(5, 'new here')], () => 0.5)
  removeItems(theirs, notes, [id(4)], 5)
  putItems(theirs, notes, [note(6, 'new there')], () => 0.5)
  return { mine, theirs }
}

describe('copyOfEdits', () => {
  it('lists what differs from the shoot, by name, as it is here and there', () => {
    const { mine, theirs } = pair()
    const copy = copyOfEdits(SHOOT, [{ left: left('board'), mine, theirs }], [], NOW_MS)
    expect(copy).toMatchObject({
      shoot: SHOOT,
      savedAt: '2026-12-01T15:00:00.000Z',
      documents: [
        {
          document: 'board',
          changesNotInTheShoot: 3,
          since: '2026-12-01T14:05:00.000Z',
          lists: 'what differs from the shoot',
        },
      ],
    })
    const items = copy.documents[0]?.collections['notes'] ?? []
    expect(items.map(({ id: one, name }) => [one, name]).sort()).toEqual([
      [id(2), 'felt collar'],
      [id(3), 'gone here'],
      [id(4), 'gone there'],
      [id(5), 'new here'],
    ])
    expect(items.find(({ id: one }) => one === id(2))).toMatchObject({
      here: { text: 'felt collar' },
      inTheShoot: { text: 'was' },
    })
    expect(items.find(({ id: one }) => one === id(3))).toMatchObject({ here: null, inTheShoot: { text: 'gone here' } })
    expect(items.find(({ id: one }) => one === id(5))).toMatchObject({ here: { text: 'new here' }, inTheShoot: null })
  })

  it('lists everything of this device when the shoot is not known', () => {
    const { mine } = pair()
    const [document] = copyOfEdits(SHOOT, [{ left: left('board'), mine, theirs: null }], [], NOW_MS).documents
    expect(document?.lists).toBe('everything on this device')
    expect(document?.collections['notes']?.map(({ name }) => name).sort()).toEqual([
      'felt collar',
      'gone there',
      'new here',
      'same',
    ])
  })

  it('names the plan of a shot after the shot on the board', () => {
    const board = new Y.Doc()
    putItems(board, shots, [{ id: id(9), title: 'Star in the dome', place: ['loose', 'a0'] }], () => 0.5)
    const plan = new Y.Doc()
    upsertItem(plan, shotPlans, { id: id(9), minutes: 12 })
    const copy = copyOfEdits(
      SHOOT,
      [{ left: left('plan'), mine: plan, theirs: null }],
      [{ kind: 'board', doc: board }],
      0,
    )
    expect(copy.documents[0]?.collections['shotPlans']?.map(({ name }) => name)).toEqual(['Star in the dome'])
  })

  it('keeps what no schema knows', () => {
    const mine = new Y.Doc()
    mine.getMap('notes').set(id(1), new Y.Map([['colour of the future', 7]]))
    const copy = copyOfEdits(SHOOT, [{ left: left('board'), mine, theirs: new Y.Doc() }], [], NOW_MS)
    expect(copy.documents[0]?.collections['notes']).toEqual([
      { id: id(1), name: '', here: { 'colour of the future': 7 }, inTheShoot: null },
    ])
  })

  it('is plain text that reads back as the same', () => {
    const { mine, theirs } = pair()
    const copy = copyOfEdits(SHOOT, [{ left: left('board'), mine, theirs }], [], NOW_MS)
    expect(JSON.parse(JSON.stringify(copy))).toEqual(copy)
  })
})
