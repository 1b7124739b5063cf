import { createServer } from 'node:net'
import { networkInterfaces } from 'node:os'

/**
 * @param {number} port
 * @param {string} host
 * @returns {Promise<boolean>}
 */
function canListen(port, host) {
  return new Promise((resolve) => {
    const server = createServer()
    server.once('error', (/** @type {NodeJS.ErrnoException} */ error) => resolve(error.code === 'EADDRNOTAVAIL'))
    server.listen({ port, host, exclusive: true }, () => server.close(() => resolve(true)))
  })
}

/**
 * Whether a port may be used on a host. Where people will say "localhost", the other loopback has to
 * be free as well, or some browsers would reach whoever sits there.
 *
 * @param {number} port
 * @param {string} host
 */
export async function isFree(port, host) {
  if (!(await canListen(port, host))) return false
  return !isLoopback(host) || (await canListen(port, host === '::1' ? '127.0.0.1' : '::1'))
}

/**
 * @param {number} wanted
 * @param {string} host
 * @returns {Promise<number>} `wanted`, or the next free one above it
 */
export async function nextFreePort(wanted, host) {
  for (let port = wanted; port < Math.min(wanted + 200, 65536); port += 1) {
    if (await isFree(port, host)) return port
  }
  return anyFreePort(host)
}

/**
 * @param {string} [host]
 * @returns {Promise<number>}
 */
export function anyFreePort(host = '127.0.0.1') {
  return new Promise((resolve, reject) => {
    const server = createServer()
    server.once('error', reject)
    server.listen(0, host, () => {
      const address = server.address()
      const port = typeof address === 'object' && address !== null ? address.port : 0
      server.close(() => resolve(port))
    })
  })
}

/** @param {string} host */
export function isLoopback(host) {
  return host === 'localhost' || host === '::1' || host.startsWith('127.')
}

/**
 * The address people use and every origin a browser may come from, for a server on `host` and `port`.
 * A public address given by hand is kept; only one that names this machine and the port first wanted
 * follows to the port really taken.
 *
 * @param {{ host: string, port: number, wantedPort: number, publicUrl: string | undefined, trustedOrigins: string[] }} given
 */
export function addressesFor({ host, port, wantedPort, publicUrl, trustedOrigins }) {
  const local = [`http://localhost:${port}`, `http://127.0.0.1:${port}`]
  const away = isLoopback(host) ? [] : lanAddresses(host).map((address) => `http://${address}:${port}`)
  let address = away[0] ?? local[0] ?? ''
  if (publicUrl) {
    const url = new URL(publicUrl)
    if (isLoopback(url.hostname) && url.port === String(wantedPort)) url.port = String(port)
    address = url.origin
  }
  return { publicUrl: address, trustedOrigins: [...new Set([address, ...local, ...away, ...trustedOrigins])] }
}

/** @param {string} host */
function lanAddresses(host) {
  if (host !== '0.0.0.0' && host !== '::') return [host.includes(':') ? `[${host}]` : host]
  return Object.values(networkInterfaces())
    .flatMap((list) => list ?? [])
    .filter((entry) => entry.family === 'IPv4' && !entry.internal)
    .map((entry) => entry.address)
}
