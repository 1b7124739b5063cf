import WebSocket from 'ws'
import { WebsocketProvider } from 'y-websocket'
import * as Y from 'yjs'
import { pause, until } from '#tests/realtime/support/client.ts'
import type { Seat } from '../client.ts'
import type { Scenario } from './scenario.ts'

const PROVIDERS = 3

/**
 * The real y-websocket client, three of them: each sees what the others do, and none is dropped while nothing happens. It gives up
 * a connection on which it has heard nothing for 30 s, so the server has to say something now and then.
 */
export function idleScenario(seconds: number): Scenario {
  return {
    name: 'idle',
    title: `y-websocket's client, idle for ${seconds} s`,
    head: ['they see each other', 'dropped'],
    run: async (target) => {
      if (target.dialect !== 'yjs') return null
      const [document] = await target.addDocuments(1, PROVIDERS)
      const server = await target.start()
      const providers: WebsocketProvider[] = []
      try {
        for (let i = 0; document && i < PROVIDERS; i++) providers.push(openProvider(document.seat(server, i)))
        await until(() => providers.every(({ synced }) => synced))
        providers.forEach(({ doc }, i) => doc.getMap('items').set(`item-${i}`, i))
        const isThere = ({ doc }: WebsocketProvider) => doc.getMap('items').size === PROVIDERS
        await until(() => providers.every(isThere))
        let dropped = 0
        for (const provider of providers) provider.on('connection-close', () => dropped++)
        await pause(seconds * 1000)
        return {
          line: { bench: 'idle', target: target.name, seconds, providers: PROVIDERS, dropped },
          rows: [['yes', dropped]],
          isGood: dropped === 0,
        }
      } finally {
        providers.forEach((provider) => provider.destroy())
        await server.kill('SIGKILL')
      }
    },
  }
}

function openProvider({ url, headers }: Seat): WebsocketProvider {
  class SeatedSocket extends WebSocket {
    constructor(address: string, protocols: string[]) {
      super(address, protocols, { headers })
    }
  }
  const { origin, pathname } = new URL(url)
  const at = pathname.lastIndexOf('/')
  return new WebsocketProvider(`${origin}${pathname.slice(0, at)}`, pathname.slice(at + 1), new Y.Doc(), {
    // ws has all of a browser's WebSocket that the provider uses.
    WebSocketPolyfill: SeatedSocket as unknown as typeof globalThis.WebSocket,
    disableBc: true,
  })
}
