import { spawn } from 'node:child_process'
import { readFileSync, readlinkSync } from 'node:fs'
import { join } from 'node:path'
import { createInterface } from 'node:readline'
import { rootDir } from './place.mjs'
import { Plain, pause, say } from './say.mjs'

const MAIN = 'server/main.ts'
const DRAIN_S = 20
/** That many ends within a minute, and starting it again is no help any more. */
const MOST_ENDS = 4

/**
 * The server as a child: started, started again when it goes away by itself, drained at the end.
 * It says `ready <address>` on a line of its own once it listens; its other lines are passed on.
 */
export class Server {
  #env
  /** @type {import('node:child_process').ChildProcess | undefined} */
  #child
  #isStopping = false
  #isRestarting = false
  /** @type {number[]} */
  #endsAtMs = []
  /** @type {(reason: Plain) => void} */
  #giveUp
  /** @type {(pid: number) => void} */
  #onPid

  /**
   * @param {Record<string, string | undefined>} env
   * @param {{ giveUp: (reason: Plain) => void, onPid: (pid: number) => void }} listeners
   */
  constructor(env, { giveUp, onPid }) {
    this.#env = env
    this.#giveUp = giveUp
    this.#onPid = onPid
  }

  /** Resolves with the address the server says it listens on; throws when it ends before that. */
  async start() {
    const ready = this.#spawn()
    const result = await ready
    if (typeof result === 'string') {
      void this.#watch()
      return result
    }
    throw new Plain(`The server did not start (${result.how}); what it said stands above.`)
  }

  /** @returns {Promise<string | { how: string }>} */
  #spawn() {
    const withParent = join(rootDir, 'server/start/with-parent.mjs')
    const child = spawn(process.execPath, ['--import', withParent, '--import', 'tsx', join(rootDir, MAIN)], {
      cwd: rootDir,
      env: { ...process.env, ...this.#env },
      // A group of its own: Ctrl-C reaches only us, and we ask it to drain.
      detached: true,
      stdio: ['ignore', 'pipe', 'inherit', 'ipc'],
    })
    this.#child = child
    if (child.pid !== undefined) this.#onPid(child.pid)
    return new Promise((resolve) => {
      if (child.stdout !== null) {
        createInterface({ input: child.stdout }).on('line', (line) => {
          const address = /^ready (\S+)$/.exec(line)?.[1]
          if (address === undefined) say(line)
          else resolve(address)
        })
      }
      child.once('error', (error) => resolve({ how: error.message }))
      child.once('exit', (code, signal) => resolve({ how: signal ?? `exit code ${code}` }))
    })
  }

  async #watch() {
    while (this.#child !== undefined) {
      const how = await endOf(this.#child)
      if (this.#isStopping) return
      const nowMs = performance.now()
      if (!this.#isRestarting) {
        this.#endsAtMs = [...this.#endsAtMs.filter((atMs) => nowMs - atMs < 60_000), nowMs]
        if (this.#endsAtMs.length >= MOST_ENDS) {
          this.#giveUp(
            new Plain(`The server ended ${MOST_ENDS} times within a minute (last: ${how}); what it said stands above.`),
          )
          return
        }
        say(`The server stopped by itself (${how}). Starting it again; what was saved is saved.`)
        await pause(this.#endsAtMs.length > 1 ? 1000 : 0)
        if (this.#isStopping) return
      }
      const wasRestarting = this.#isRestarting
      this.#isRestarting = false
      const result = await this.#spawn()
      if (typeof result === 'string' && !wasRestarting) {
        say(`The server is back after ${((performance.now() - nowMs) / 1000).toFixed(1)} s.`)
      }
    }
  }

  /** For development: drains it and starts it again with the sources as they are now. */
  restart() {
    this.#isRestarting = true
    say('A source of the server changed; starting it again.')
    this.#child?.kill('SIGTERM')
  }

  /** Asks the server to finish what is under way, and waits for it. */
  async stop() {
    this.#isStopping = true
    const child = this.#child
    if (child === undefined || child.exitCode !== null || child.signalCode !== null) return
    say('\nStopping: finishing what is under way …')
    child.kill('SIGTERM')
    const drained = await Promise.race([endOf(child).then(() => true), pause(DRAIN_S * 1000).then(() => false)])
    if (drained) return
    say(`The server did not finish within ${DRAIN_S} s and was stopped; what it had acknowledged is saved.`)
    child.kill('SIGKILL')
    await endOf(child)
  }
}

/**
 * @param {import('node:child_process').ChildProcess} child
 * @returns {Promise<string>} how it ended
 */
function endOf(child) {
  return new Promise((resolve) => {
    const tell = () => resolve(child.signalCode ?? `exit code ${child.exitCode}`)
    if (child.exitCode !== null || child.signalCode !== null) tell()
    else child.once('exit', tell)
  })
}

/**
 * Waits for a server that outlived whoever started it: it notices by itself and drains.
 *
 * @param {number | undefined} pid
 */
export async function awaitOrphanedServer(pid) {
  if (pid === undefined || !isOurServer(pid)) return
  say('A server that an earlier start left behind is finishing; waiting for it.')
  const until = performance.now() + DRAIN_S * 1000
  while (isOurServer(pid) && performance.now() < until) await pause(50)
  if (isOurServer(pid)) process.kill(pid, 'SIGKILL')
}

/** @param {number} pid */
function isOurServer(pid) {
  try {
    return readlinkSync(`/proc/${pid}/cwd`) === rootDir && readFileSync(`/proc/${pid}/cmdline`, 'utf8').includes(MAIN)
  } catch {
    return false
  }
}
