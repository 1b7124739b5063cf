import { once } from 'node:events'
import { createServer } from 'node:http'
import { describe, expect, it } from 'vitest'
import { WebSocket, WebSocketServer } from 'ws'
import { websocketFrame } from '#server/realtime/framing.ts'

describe('websocketFrame', () => {
  it('is understood by a websocket client, in order with what the library sends itself', async () => {
    // The lengths at which the header changes, and around them: RFC 6455, 5.2.
    const payloads = [0, 1, 125, 126, 127, 65_535, 65_536, 200_000].map((length) =>
      Uint8Array.from({ length }, (_, i) => i % 251),
    )
    const sockets = new WebSocketServer({ noServer: true, perMessageDeflate: false })
    const server = createServer()
    server.on('upgrade', (request, socket, head) => {
      sockets.handleUpgrade(request, socket, head, (ws) => {
        for (const payload of payloads) {
          socket.write(websocketFrame(payload))
          ws.send('and')
        }
        expect(websocketFrame(payloads[7] ?? new Uint8Array())).toBe(websocketFrame(payloads[7] ?? new Uint8Array()))
        ws.close()
      })
    })
    server.listen(0, '127.0.0.1')
    await once(server, 'listening')
    const address = server.address()
    const port = typeof address === 'object' && address !== null ? address.port : 0
    const client = new WebSocket(`ws://127.0.0.1:${port}/`)
    const heard: (Uint8Array | string)[] = []
    client.on('message', (data: Buffer, isBinary) => heard.push(isBinary ? Uint8Array.from(data) : data.toString()))
    await once(client, 'close')
    server.close()
    expect(heard).toEqual(payloads.flatMap((payload) => [payload, 'and']))
  })
})
