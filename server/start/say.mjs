import { spawn } from 'node:child_process'

/** A failure that is told in its own words, without a stack. */
export class Plain extends Error {}

/** @param {string} text */
export function say(text) {
  process.stdout.write(`${text}\n`)
}

// A terminal that has gone away must not take the data down with it.
for (const stream of [process.stdout, process.stderr]) stream.on('error', () => {})

/**
 * Says what is being done, does it, and says how long it took when that was noticeable.
 *
 * @template T
 * @param {string} what
 * @param {() => Promise<T>} work
 * @returns {Promise<T>}
 */
export async function step(what, work) {
  const startedAtMs = performance.now()
  say(`${what} …`)
  const result = await work()
  const tookS = (performance.now() - startedAtMs) / 1000
  if (tookS >= 1) say(`  ${what}: done in ${tookS.toFixed(tookS < 10 ? 1 : 0)} s`)
  return result
}

/** @param {number} ms */
export function pause(ms) {
  return new Promise((resolve) => setTimeout(resolve, ms))
}

/**
 * @typedef {{ code: number, stdout: string, stderr: string }} Finished
 *
 * Runs a program to its end and hands back what it printed; never throws for its exit code.
 * A program that cannot be started at all has the code 127. It ends with us, unless it is `detached`.
 *
 * @param {string} command
 * @param {string[]} args
 * @param {import('node:child_process').SpawnOptions} [options]
 * @returns {Promise<Finished>}
 */
export function run(command, args, options = {}) {
  return new Promise((resolve) => {
    const child = spawn(command, args, { ...options, stdio: ['ignore', 'pipe', 'pipe'] })
    const endWithUs = () => void child.kill()
    if (options.detached !== true) process.once('exit', endWithUs)
    let stdout = ''
    let stderr = ''
    child.stdout?.setEncoding('utf8').on('data', (text) => (stdout += text))
    child.stderr?.setEncoding('utf8').on('data', (text) => (stderr += text))
    child.on('error', (error) => resolve({ code: 127, stdout, stderr: stderr + error.message }))
    child.on('close', (code) => {
      process.off('exit', endWithUs)
      resolve({ code: code ?? 1, stdout, stderr })
    })
  })
}

/**
 * The last lines of a program's output, for a message.
 *
 * @param {string} text
 * @param {number} [lines]
 */
export function tail(text, lines = 15) {
  return text.trimEnd().split('\n').slice(-lines).join('\n')
}

/**
 * Under npm, this process is to end with npm however that ends; without it nobody would see that we
 * are still there.
 *
 * @param {() => void} stop
 */
export function stopWithNpm(stop) {
  if (process.env['npm_lifecycle_event'] === undefined) return
  const parent = process.ppid
  const timer = setInterval(() => {
    if (process.ppid === parent) return
    clearInterval(timer)
    stop()
  }, 300)
  timer.unref()
}
