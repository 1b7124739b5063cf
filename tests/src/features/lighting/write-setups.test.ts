import { describe, expect, it } from 'vitest'
import * as Y from 'yjs'
import { lights, props, setups, sitterPlaces } from '#shared/realtime/documents.ts'
import { LOCAL_ORIGIN, patchItem, readAll } from '#shared/realtime/collection.ts'
import { mirrored } from '#shared/domain/lighting/mirror.ts'
import { wholeSetups } from '#shared/domain/plan/read-plan.ts'
import { putSetup, removeSetup, restoreSetup, rewriteSetup } from '#src/features/lighting/write-setups.ts'
import { FULL_WARM, OCTA, light, whole } from '#tests/support/lighting-sample.ts'

const setup = whole({
  lights: [light(1, { purpose: 'main', at: [-1, 2, 1], aim: [0, 1.5, 0], modifier: OCTA, gels: [FULL_WARM] })],
  props: [{}],
})

function read(doc: Y.Doc) {
  return wholeSetups({
    setups: readAll(doc, setups).items,
    lights: readAll(doc, lights).items,
    sitterPlaces: readAll(doc, sitterPlaces).items,
    props: readAll(doc, props).items,
  }).get(setup.setup.id)
}

describe('putSetup', () => {
  it('writes a setup that reads back as it was', () => {
    const doc = new Y.Doc()
    putSetup(doc, setup)
    expect(read(doc)).toEqual(setup)
  })
})

describe('restoreSetup', () => {
  it('brings back all of what removeSetup took away', () => {
    const doc = new Y.Doc()
    putSetup(doc, setup)
    removeSetup(doc, setup)
    expect(read(doc)).toBeUndefined()
    restoreSetup(doc, setup)
    expect(read(doc)).toEqual(setup)
  })
})

describe('rewriteSetup', () => {
  it('mirrors a setup in one change that one undo takes back, and leaves what it does not touch', () => {
    const doc = new Y.Doc()
    putSetup(doc, setup)
    const undo = new Y.UndoManager(
      [setups, lights, props, sitterPlaces].map((c) => doc.getMap(c.root)),
      {
        trackedOrigins: new Set([LOCAL_ORIGIN]),
        captureTimeout: 0,
      },
    )
    const updates: Uint8Array[] = []
    doc.on('update', (update: Uint8Array) => updates.push(update))
    const other = mirrored(setup)
    rewriteSetup(doc, other)
    expect(read(doc)).toEqual(other)
    expect(updates).toHaveLength(1)
    const id = setup.lights[0]?.id ?? ''
    patchItem(doc, lights, id, { note: 'sandbag' }, 'somebody else')
    undo.undo()
    expect(read(doc)).toEqual({ ...setup, lights: setup.lights.map((entry) => ({ ...entry, note: 'sandbag' })) })
  })
})
