import { describe, expect, it } from 'vitest'
import * as Y from 'yjs'
import type { ReadPlanInput } from '#shared/domain/plan/read-plan.ts'
import { type Collection, putItems, rootOf } from '#shared/realtime/collection.ts'
import { COLLECTIONS } from '#shared/realtime/documents.ts'
import { boardPart, lightingPart, looksPart, planPart } from '#shared/realtime/plan-parts.ts'
import { id } from '#tests/support/lighting-sample.ts'
import { DAY, GALLERY, planSample } from '#tests/support/plan-sample.ts'

const sample = planSample({
  frames: [
    { id: id(201), box: [0, 0, 100, 80], picture: { uploadId: id(301), state: 'stored', widthPx: 100, heightPx: 80 } },
  ],
  shots: [{ id: id(101), title: 'At the sill', place: [DAY, 'a0'] }],
  sets: [{ id: id(21), name: 'Window', roomId: GALLERY }],
  shotPlans: [{ id: id(101), setId: id(21) }],
  sitters: [{ id: id(41), name: 'Ada Wren' }],
  looks: [{ id: id(51), sitterId: id(41), name: 'Harbour' }],
  setups: [id(61)],
})

/** A document with these items, one thing no schema knows, and one item that is deleted, in each of its collections. */
function docOf(
  collections: Record<string, Collection>,
  part: Record<string, ReadonlyMap<string, { id: string }>>,
): Y.Doc {
  const doc = new Y.Doc()
  for (const [name, c] of Object.entries(collections)) {
    putItems(doc, c, [...(part[name]?.values() ?? [])], () => 0.5)
    rootOf(doc, c).set(id(901), 'not an item')
    rootOf(doc, c).set(id(902), new Y.Map([['deleted', 1_800_000_000_000]]))
  }
  return doc
}

describe.each([
  ['board', boardPart],
  ['plan', planPart],
  ['looks', looksPart],
  ['lighting', lightingPart],
] as const)('the part of the %s document', (kind, partOf: (doc: Y.Doc) => ReadPlanInput[typeof kind]) => {
  it('holds what lives in it and parses', () => {
    expect(partOf(docOf(COLLECTIONS[kind], sample[kind]))).toEqual(sample[kind])
  })
})
