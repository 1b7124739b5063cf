import { describe, expect, it } from 'vitest'
import * as Y from 'yjs'
import { dayIdSchema } from '#shared/ids.ts'
import { readAll } from '#shared/realtime/collection.ts'
import { DOCUMENT_KINDS, days } from '#shared/realtime/documents.ts'
import { firstContent } from '#shared/realtime/first-content.ts'

describe('firstContent', () => {
  it('holds one day and nothing else', () => {
    const id = dayIdSchema.parse('3f0c9b52-1111-4222-8333-444455556666')
    const content = firstContent({ id, date: '2027-10-14' }, () => 0.5)
    expect(Object.keys(content).sort()).toEqual([...DOCUMENT_KINDS].sort())
    const doc = new Y.Doc()
    Y.applyUpdate(doc, content.plan)
    expect([...readAll(doc, days).items.values()]).toMatchObject([{ id, date: '2027-10-14', hands: 2, chairs: null }])
  })
})
