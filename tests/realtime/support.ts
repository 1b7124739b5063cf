import { randomUUID } from 'node:crypto'
import WebSocket from 'ws'
import * as Y from 'yjs'
import * as decoding from 'lib0/decoding'
import { MESSAGE, documentPath } from '#shared/realtime/protocol.ts'
import { syncFrame } from '#tests/realtime/support/client.ts'

/** What somebody gets who asks for a document and tries to change it. */
export type DocumentAccess =
  | { kind: 'upgrade refused'; status: number }
  | { kind: 'closed'; code: number }
  | { kind: 'reads' }
  | { kind: 'reads and writes' }

/**
 * Opens a shoot's document as whoever `headers` say, reads it and tries to write to it, as a browser would.
 *
 * `url` is the server's, `ws://…`; `headers` carry the cookie and the Origin.
 */
export function tryDocument(
  url: string,
  headers: Record<string, string>,
  shootId: string,
  kind: string,
): Promise<DocumentAccess> {
  return new Promise((resolve, reject) => {
    const ws = new WebSocket(`${url}${documentPath(shootId, kind)}?ack=1`, { headers, perMessageDeflate: false })
    const doc = new Y.Doc()
    let hasAsked = false
    const timer = setTimeout(() => finish(null), 10_000)
    const finish = (access: DocumentAccess | null) => {
      clearTimeout(timer)
      ws.terminate()
      doc.destroy()
      if (access) resolve(access)
      else reject(new Error(`no answer for ${kind}`))
    }
    ws.on('error', () => undefined)
    ws.on('unexpected-response', (_, response) => finish({ kind: 'upgrade refused', status: response.statusCode ?? 0 }))
    ws.on('close', (code) => finish({ kind: 'closed', code }))
    ws.on('open', () => ws.send(syncFrame(0, Y.encodeStateVector(doc))))
    ws.on('message', (data: Buffer) => {
      const decoder = decoding.createDecoder(Uint8Array.from(data))
      const type = decoding.readVarUint(decoder)
      if (type === MESSAGE.sync && decoding.readVarUint(decoder) === 1 && !hasAsked) {
        hasAsked = true
        doc.getMap('tried').set(randomUUID(), true)
        ws.send(syncFrame(2, Y.encodeStateAsUpdate(doc)))
      } else if (type === MESSAGE.saved) finish({ kind: 'reads and writes' })
      else if (type === MESSAGE.refused) {
        decoding.readVarUint(decoder)
        const reason = decoding.readVarString(decoder)
        finish(reason === 'read-only' ? { kind: 'reads' } : null)
      }
    })
  })
}
