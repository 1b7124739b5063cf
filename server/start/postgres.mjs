import { execFileSync, spawn } from 'node:child_process'
import {
  chownSync,
  closeSync,
  existsSync,
  mkdirSync,
  openSync,
  readFileSync,
  readdirSync,
  readlinkSync,
  realpathSync,
  renameSync,
  rmSync,
  statSync,
  writeFileSync,
} from 'node:fs'
import { delimiter, dirname, join } from 'node:path'
import { isRoot } from './place.mjs'
import { Plain, pause, run, tail } from './say.mjs'

// One PostgreSQL cluster as a child of this process: found, made, started, watched, stopped.

const programs = ['initdb', 'postgres', 'pg_dump', 'pg_restore']

/**
 * @typedef {{ bin: string, major: number }} Installation
 *
 * Every complete installation on this machine, newest first: Debian's folders, then PATH.
 *
 * @returns {Installation[]}
 */
export function findInstallations() {
  const debian = '/usr/lib/postgresql'
  const versions = existsSync(debian) ? readdirSync(debian) : []
  const folders = [
    ...versions.sort((a, b) => Number(b) - Number(a)).map((version) => join(debian, version, 'bin')),
    ...(process.env['PATH'] ?? '').split(delimiter),
  ]
  const found = []
  for (const bin of new Set(folders)) {
    if (bin === '' || !programs.every((program) => existsSync(join(bin, program)))) continue
    const major = Number(/ (\d+)/.exec(execFileSync(join(bin, 'postgres'), ['--version'], { encoding: 'utf8' }))?.[1])
    if (major >= 13) found.push({ bin, major })
  }
  return found
}

/**
 * Who runs the database: PostgreSQL refuses root, so as root it is the packages' own system user.
 *
 * @returns {{ uid: number, gid: number } | undefined} undefined for "whoever we are"
 */
function runsAs() {
  if (!isRoot) return undefined
  try {
    const id = (/** @type {string} */ kind) =>
      Number(execFileSync('id', [kind, 'postgres'], { encoding: 'utf8', stdio: 'pipe' }))
    return { uid: id('-u'), gid: id('-g') }
  } catch {
    throw new Plain(
      'PostgreSQL does not run as root, and there is no system user "postgres" to run it as.\n' +
        "Make one (useradd --system postgres), or start as a normal user; Debian's package makes it by itself.",
    )
  }
}

/** cwd "/" because the system user may not be able to enter the folder we were started in. */
function asDatabaseUser() {
  return { ...runsAs(), cwd: '/', env: { PATH: process.env['PATH'], LC_ALL: 'C', TZ: 'UTC' } }
}

/** @param {string} path */
export function giveToDatabaseUser(path) {
  const owner = runsAs()
  if (owner !== undefined) chownSync(path, owner.uid, owner.gid)
}

/**
 * Makes a cluster whose only role is the superuser `postgres`. It appears under its name when it is
 * complete, so one that was interrupted is made again.
 *
 * @param {{ bin: string, data: string, password: string, sync: boolean }} options
 */
export async function makeCluster({ bin, data, password, sync }) {
  const unfinished = `${data}.unfinished`
  const passwordFile = `${data}.password`
  rmSync(unfinished, { recursive: true, force: true })
  mkdirSync(unfinished, { mode: 0o700 })
  giveToDatabaseUser(unfinished)
  writeFileSync(passwordFile, password, { mode: 0o600 })
  giveToDatabaseUser(passwordFile)
  try {
    const args = ['-D', unfinished, '-U', 'postgres', '-A', 'scram-sha-256', `--pwfile=${passwordFile}`]
    const more = ['-E', 'UTF8', '--no-locale', '--data-checksums', ...(sync ? [] : ['--no-sync'])]
    const done = await run(join(bin, 'initdb'), [...args, ...more], asDatabaseUser())
    if (done.code !== 0) {
      const reach = isRoot ? `\nThe system user "postgres" must be able to enter ${dirname(data)}.` : ''
      throw new Plain(`The database could not be made in ${data}:\n${tail(done.stdout + done.stderr)}${reach}`)
    }
    renameSync(unfinished, data)
  } finally {
    rmSync(passwordFile, { force: true })
    rmSync(unfinished, { recursive: true, force: true })
  }
}

/**
 * @typedef {{ code: number | null, signal: NodeJS.Signals | null }} Exit
 * @typedef {{ port: number, pid: number, exited: Promise<Exit>, stop: () => Promise<void> }} RunningPostgres
 */

export class PortTaken extends Error {}

const safeSettings = ['fsync=on', 'synchronous_commit=on', 'full_page_writes=on']
const fastSettings = ['fsync=off', 'synchronous_commit=off', 'full_page_writes=off']

/**
 * Starts a cluster on loopback and resolves when it takes connections. Throws PortTaken when somebody
 * else has the port, Plain with the end of the log for anything else.
 *
 * `durable: false` is for tests that throw their data away; everything else survives a power cut.
 *
 * @param {{ bin: string, data: string, log: string, port: number, durable: boolean }} options
 * @returns {Promise<RunningPostgres>}
 */
export async function startPostgres(options) {
  // A postmaster that was killed leaves its lock file and, for a moment, its children. It clears both up by
  // itself once the last of them is gone.
  for (let attempt = 0; ; attempt += 1) {
    const result = await startOnce(options)
    if (!('failure' in result)) return result
    const passing = /lock file "postmaster.pid" already exists|shared memory block .* still in use/.test(result.failure)
    if (/could not bind|could not create any TCP/i.test(result.failure)) throw new PortTaken(result.failure)
    if (!passing || attempt >= 40) {
      throw new Plain(`The database did not start. Its log (${options.log}) ends with:\n${result.failure}`)
    }
    await pause(250)
  }
}

/**
 * @param {{ bin: string, data: string, log: string, port: number, durable: boolean }} options
 * @returns {Promise<RunningPostgres | { failure: string }>}
 */
async function startOnce({ bin, data, log, port, durable }) {
  const logFd = openSync(log, 'a', 0o600)
  const logStart = statSync(log).size
  const settings = [
    'listen_addresses=127.0.0.1',
    'unix_socket_directories=',
    'timezone=UTC',
    'log_timezone=UTC',
    'max_connections=200',
    ...(durable ? safeSettings : fastSettings),
  ]
  // A session of its own: Ctrl-C reaches only us, and we stop the server before the database.
  const child = spawn(
    join(bin, 'postgres'),
    ['-D', data, '-p', String(port), ...settings.flatMap((one) => ['-c', one])],
    {
      ...asDatabaseUser(),
      detached: true,
      stdio: ['ignore', logFd, logFd],
    },
  )
  closeSync(logFd)
  /** @type {Exit | undefined} */
  let exit
  /** @type {Promise<Exit>} */
  const exited = new Promise((resolve) => {
    const end = (/** @type {Exit} */ how) => {
      exit = how
      resolve(how)
    }
    child.once('error', () => end({ code: 127, signal: null }))
    child.once('exit', (code, signal) => end({ code, signal }))
  })
  while (exit === undefined) {
    const found = readPidFile(data)
    if (found !== undefined && found.pid === child.pid && found.status === 'ready') {
      return { port, pid: found.pid, exited, stop: () => stopProcess(found.pid, () => exit !== undefined) }
    }
    await pause(15)
  }
  return { failure: tail(readFileSync(log).subarray(logStart).toString('utf8')) || 'postgres could not be run' }
}

/**
 * What the postmaster wrote about itself: its first line is its process, its fourth its port, its eighth whether
 * it takes connections.
 *
 * @param {string} data
 */
function readPidFile(data) {
  try {
    const lines = readFileSync(join(data, 'postmaster.pid'), 'utf8').split('\n')
    return { pid: Number(lines[0]), port: Number(lines[3]), status: lines[7]?.trim() }
  } catch {
    return undefined
  }
}

/**
 * Stops a postmaster that an earlier start left behind. A lock file that names a process which is
 * not a postmaster of this folder is only a leftover, and is removed.
 *
 * @param {string} data
 * @returns {Promise<boolean>} whether there was one to stop
 */
export async function stopOrphan(data) {
  const found = readPidFile(data)
  // Elsewhere there is no telling whose process it is, and PostgreSQL's own caution has to do.
  if (found === undefined || process.platform !== 'linux') return false
  const folder = realpathSync(data)
  if (worksIn(found.pid, folder)) {
    await stopProcess(found.pid, () => !worksIn(found.pid, folder))
    return true
  }
  // Its backends may outlive it for a moment; while one does, the file is what protects the data.
  for (let tries = 0; tries < 40 && anyWorksIn(folder); tries += 1) await pause(250)
  if (!anyWorksIn(folder)) rmSync(join(data, 'postmaster.pid'), { force: true })
  return false
}

/**
 * PostgreSQL's processes make the data folder their working directory.
 *
 * @param {number} pid
 * @param {string} folder
 */
function worksIn(pid, folder) {
  try {
    return readlinkSync(`/proc/${pid}/cwd`) === folder
  } catch {
    return false
  }
}

/** @param {string} folder */
function anyWorksIn(folder) {
  return readdirSync('/proc').some((entry) => /^\d+$/.test(entry) && worksIn(Number(entry), folder))
}

/**
 * Fast shutdown, which ends sessions and writes everything out; after half a minute an immediate one,
 * from which the next start recovers.
 *
 * @param {number} pid
 * @param {() => boolean} isGone
 */
async function stopProcess(pid, isGone) {
  for (const [signal, seconds] of /** @type {const} */ ([
    ['SIGINT', 30],
    ['SIGQUIT', 10],
    ['SIGKILL', 5],
  ])) {
    if (isGone()) return
    try {
      process.kill(pid, signal)
    } catch {
      // Gone between the question and the signal.
    }
    const until = performance.now() + seconds * 1000
    while (!isGone() && performance.now() < until) await pause(10)
  }
}
