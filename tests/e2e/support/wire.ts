import type { BrowserContext } from '@playwright/test'
import WebSocket from 'ws'
import { WebsocketProvider } from 'y-websocket'
import * as Y from 'yjs'

/** The cookies and the page's address, as the browser of this context would send them. */
async function headersOf(context: BrowserContext, baseURL: string): Promise<{ cookie: string; origin: string }> {
  const cookies = await context.cookies(baseURL)
  return { cookie: cookies.map(({ name, value }) => `${name}=${value}`).join('; '), origin: new URL(baseURL).origin }
}

function socketUrl(baseURL: string): string {
  return baseURL.replace(/^http/, 'ws')
}

/** Opens a socket as this person without any page of ours, sends one frame and answers the code it is closed with; minus the status of a refused upgrade. */
export async function closeCodeOf(
  context: BrowserContext,
  baseURL: string,
  path: string,
  frame?: Uint8Array | string,
): Promise<number> {
  const socket = new WebSocket(`${socketUrl(baseURL)}${path}?ack=1`, { headers: await headersOf(context, baseURL) })
  socket.on('error', () => undefined)
  return new Promise((resolve) => {
    socket.on('open', () => frame !== undefined && socket.send(frame))
    socket.on('close', (code) => resolve(code))
    socket.on('unexpected-response', (_request, response) => {
      resolve(-(response.statusCode ?? 0))
      socket.terminate()
    })
  })
}

export type RawDocument = { doc: Y.Doc; close: () => void }

/** One of a shoot's documents as a bare Yjs client of this person, in step with the server. */
export async function openRaw(
  context: BrowserContext,
  baseURL: string,
  shoot: string,
  kind: string,
): Promise<RawDocument> {
  const headers = await headersOf(context, baseURL)
  class WithCookies extends WebSocket {
    constructor(url: string | URL, protocols?: string | string[]) {
      super(url, protocols, { headers })
    }
  }
  const doc = new Y.Doc()
  const provider = new WebsocketProvider(`${socketUrl(baseURL)}/rt/${shoot.replace('/shoots/', '')}`, kind, doc, {
    // It asks for the browser's own type of socket, of which it uses what both have.
    WebSocketPolyfill: WithCookies as unknown as typeof globalThis.WebSocket,
    disableBc: true,
  })
  await new Promise<void>((resolve) => provider.on('sync', (isSynced: boolean) => isSynced && resolve()))
  return {
    doc,
    close: () => {
      provider.destroy()
      doc.destroy()
    },
  }
}
