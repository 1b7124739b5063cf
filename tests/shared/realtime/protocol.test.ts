import { describe, expect, it } from 'vitest'
import { documentPath, parseDocumentPath } from '#shared/realtime/protocol.ts'

describe('parseDocumentPath', () => {
  const shootId = '3f0c9b52-1111-4222-8333-444455556666'

  it('reads back what documentPath writes', () => {
    expect(parseDocumentPath(documentPath(shootId, 'board'))).toEqual({ shootId, kind: 'board' })
  })

  it.each([
    '/rt/x/board',
    `/rt/${shootId}`,
    `/rt/${shootId}/board/more`,
    `/other/${shootId}/board`,
    `/rt/${shootId}/..%2f`,
  ])('is undefined for %s', (path) => expect(parseDocumentPath(path)).toBeUndefined())
})
