import { once } from 'node:events'
import { type Socket, connect, createServer } from 'node:net'

/** A way to the database that can be cut: everybody on it is thrown off and nobody gets through. */
export type Proxy = { url: string; cut(): void; mend(): void; close(): Promise<void> }

export async function startProxy(databaseUrl: string): Promise<Proxy> {
  const target = new URL(databaseUrl)
  const open = new Set<Socket>()
  let isCut = false
  const server = createServer((near) => {
    if (isCut) return near.destroy()
    const far = connect(Number(target.port), target.hostname)
    for (const [one, other] of [
      [near, far],
      [far, near],
    ] as const) {
      open.add(one)
      one.on('error', () => undefined)
      one.on('close', () => {
        open.delete(one)
        other.destroy()
      })
      one.pipe(other)
    }
  })
  server.listen(0, '127.0.0.1')
  await once(server, 'listening')
  const address = server.address()
  if (typeof address !== 'object' || address === null) throw new Error('no port')
  const url = new URL(databaseUrl)
  url.port = String(address.port)
  const throwOff = () => open.forEach((socket) => socket.destroy())
  return {
    url: url.href,
    cut: () => {
      isCut = true
      throwOff()
    },
    mend: () => {
      isCut = false
    },
    close: async () => {
      throwOff()
      await new Promise((resolve) => server.close(resolve))
    },
  }
}
