import { randomUUID } from 'node:crypto'
import { existsSync } from 'node:fs'
import { fileURLToPath } from 'node:url'
import type { BenchDatabase } from '../database.ts'
import { startServerChild } from '../server-child.ts'
import type { BenchDocument, Target } from './target.ts'

/** Servers for the same protocol to compare with. Optional: `npm run bench -- peers` installs them beside their files. */
type Peer = Pick<Target, 'name' | 'dialect' | 'ack' | 'isPersistent' | 'settleMs'>

export const PEERS: readonly Peer[] = [
  { name: 'y-websocket', dialect: 'yjs', ack: 'none', isPersistent: false, settleMs: 500 },
  { name: 'hocuspocus-3', dialect: 'hocuspocus', ack: 'memory', isPersistent: true, settleMs: 4_000 },
  { name: 'hocuspocus-4', dialect: 'hocuspocus', ack: 'memory', isPersistent: true, settleMs: 4_000 },
]

export const folderOf = ({ name }: Pick<Peer, 'name'>) => fileURLToPath(new URL(`../../peers/${name}`, import.meta.url))
export const isInstalled = (peer: Peer) => existsSync(`${folderOf(peer)}/node_modules`)

export function createPeer(peer: Peer, database: BenchDatabase): Target {
  return {
    ...peer,
    start: () =>
      startServerChild({ args: ['server.mjs'], cwd: folderOf(peer), env: { DATABASE_URL: database.peersUrl } }),
    // Whoever names a document has it.
    addDocuments: async (count) =>
      Array.from({ length: count }, (): BenchDocument => {
        const documentName = `bench-${randomUUID()}`
        return {
          docId: null,
          seat: ({ url }) => ({ url: `${url}/${documentName}`, headers: {}, documentName, personName: null }),
          readerSeat: () => null,
        }
      }),
    close: async () => undefined,
  }
}
