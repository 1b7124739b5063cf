import { createServer, connect } from 'node:net'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { rmSync } from 'node:fs'
import { pause } from './say.mjs'

// A socket in the kernel's own name space: it goes with the process however that dies, so it is
// never stale, and whoever finds it taken can ask the holder what it is doing.
/** @param {string} name */
function addressOf(name) {
  return process.platform === 'linux' ? `\0sconce-${name}` : join(tmpdir(), `sconce-${name}.sock`)
}

/**
 * @typedef {{ doing: 'starting' | 'running' | 'stopping' | 'backup' | 'restore' | 'installing' | 'building', pid: number, url?: string, pgPort?: number | undefined }} Holder
 * @typedef {{ tell: (holder: Omit<Holder, 'pid'>) => void, release: () => Promise<void> }} Hold
 *
 * Takes the name for this process, or hands back undefined when somebody has it.
 *
 * @param {string} name
 * @param {Omit<Holder, 'pid'>} first
 * @returns {Promise<Hold | undefined>}
 */
export async function tryHold(name, first) {
  let telling = { ...first, pid: process.pid }
  const server = createServer((socket) => {
    socket.on('error', () => {})
    socket.end(JSON.stringify(telling))
  })
  const taken = await new Promise((resolve, reject) => {
    server.once('error', (/** @type {NodeJS.ErrnoException} */ error) =>
      error.code === 'EADDRINUSE' ? resolve(true) : reject(error),
    )
    server.listen(addressOf(name), () => resolve(false))
  })
  if (taken) {
    if (process.platform === 'linux' || (await askHolder(name)) !== undefined) return undefined
    rmSync(addressOf(name), { force: true })
    return tryHold(name, first)
  }
  server.unref()
  return {
    tell: (holder) => {
      telling = { ...holder, pid: process.pid }
    },
    release: () => new Promise((resolve) => server.close(() => resolve())),
  }
}

/**
 * What the holder of a name says it is doing; undefined when there is none.
 *
 * @param {string} name
 * @returns {Promise<Holder | undefined>}
 */
export function askHolder(name) {
  return new Promise((resolve) => {
    const socket = connect(addressOf(name))
    let text = ''
    socket.setTimeout(3000, () => socket.destroy())
    socket.setEncoding('utf8').on('data', (part) => (text += part))
    socket.on('error', () => {})
    socket.on('close', () => {
      try {
        resolve(JSON.parse(text))
      } catch {
        resolve(undefined)
      }
    })
  })
}

/**
 * Does the work while nobody else with this name is at it, waiting for the turn.
 *
 * @template T
 * @param {string} name
 * @param {Holder['doing']} doing
 * @param {() => Promise<T>} work
 * @returns {Promise<T>}
 */
export async function takeTurn(name, doing, work) {
  let hold = await tryHold(name, { doing })
  while (hold === undefined) {
    await pause(250)
    hold = await tryHold(name, { doing })
  }
  try {
    return await work()
  } finally {
    await hold.release()
  }
}
