/** Last frame of a message, binary. */
const FIN_BINARY = 0x82

let lastPayload: Uint8Array | null = null
let lastFrame = Buffer.alloc(0)

/**
 * A payload as one unmasked binary websocket frame (RFC 6455, 5.2), ready for the socket. The same payload object for one
 * reader after the other, as in a broadcast, is framed once; a payload must not be changed after it was sent.
 */
export function websocketFrame(payload: Uint8Array): Buffer {
  if (payload === lastPayload) return lastFrame
  const { length } = payload
  const headerLength = length < 126 ? 2 : length < 65_536 ? 4 : 10
  const frame = Buffer.allocUnsafe(headerLength + length)
  frame[0] = FIN_BINARY
  if (headerLength === 2) frame[1] = length
  else if (headerLength === 4) {
    frame[1] = 126
    frame.writeUInt16BE(length, 2)
  } else {
    frame[1] = 127
    frame.writeBigUInt64BE(BigInt(length), 2)
  }
  frame.set(payload, headerLength)
  lastPayload = payload
  lastFrame = frame
  return frame
}
