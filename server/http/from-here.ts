import type { IncomingMessage } from 'node:http'
import { isLoopback } from '#server/start/ports.mjs'

const OWN_NAMES = new Set(['localhost', '127.0.0.1', '[::1]'])
const PROXY_HEADERS = new Set(['forwarded', 'via', 'x-real-ip', 'x-client-ip', 'true-client-ip', 'cf-connecting-ip'])

/**
 * Whether a request was made on this machine: over loopback, by a name of this machine (a page elsewhere can point a
 * name of its own at 127.0.0.1), and not passed on by a proxy, whose requests come over loopback whoever sent them.
 */
export function isFromHere({ socket, headers }: Pick<IncomingMessage, 'socket' | 'headers'>): boolean {
  const address = (socket.remoteAddress ?? '').replace(/^::ffff:/, '')
  const name = (headers.host ?? '').replace(/:\d+$/, '').toLowerCase()
  const isPassedOn = Object.keys(headers).some(
    (header) => header.startsWith('x-forwarded') || PROXY_HEADERS.has(header),
  )
  return isLoopback(address) && OWN_NAMES.has(name) && !isPassedOn
}
