import { join } from 'node:path'
import { rootDir } from './place.mjs'

const serverPaths = ['/api', '/rt', '/healthz', '/readyz', '/metrics']

/**
 * Vite's own server in front, with hot reload for the pages; what belongs to our server is passed on to it,
 * and that is started again when one of its sources changes.
 *
 * @param {{ host: string, port: number, serverPort: number, onServerChange: () => void }} options
 */
export async function startVite({ host, port, serverPort, onServerChange }) {
  const { createServer } = await import('vite')
  const target = `http://127.0.0.1:${serverPort}`
  const vite = await createServer({
    root: rootDir,
    server: {
      host,
      port,
      strictPort: true,
      proxy: Object.fromEntries(serverPaths.map((path) => [path, { target, ws: true }])),
    },
  })
  const watched = ['server', 'shared', 'drizzle'].map((folder) => join(rootDir, folder))
  vite.watcher.add(watched)
  /** @type {NodeJS.Timeout | undefined} */
  let soon
  vite.watcher.on('all', (_event, path) => {
    if (!watched.some((folder) => path.startsWith(folder)) || !/\.(tsx?|json|sql)$/.test(path)) return
    clearTimeout(soon)
    soon = setTimeout(onServerChange, 150)
  })
  await vite.listen()
  return { stop: () => vite.close() }
}
