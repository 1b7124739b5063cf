import { existsSync, readFileSync, renameSync, statSync } from 'node:fs'
import { join } from 'node:path'
import { debianPackages, installDebianPackages } from './debian.mjs'
import { writeSettings } from './place.mjs'
import { anyFreePort, isFree } from './ports.mjs'
import { PortTaken, findInstallations, makeCluster, startPostgres, stopOrphan } from './postgres.mjs'
import { Plain, pause, say, step } from './say.mjs'

// The private cluster of one checkout: found or made, kept alive, stopped cleanly.

const DATABASE = 'sconce'
const LARGEST_LOG_BYTES = 5_000_000

/**
 * @typedef {import('./place.mjs').Place} Place
 * @typedef {import('./place.mjs').Settings} Settings
 *
 * The programs for this data: of the version that made it, or the newest for data yet to be made.
 *
 * @param {string} [pgData]
 */
export async function ensurePostgres(pgData) {
  const version = pgData === undefined ? undefined : join(pgData, 'PG_VERSION')
  const major = version !== undefined && existsSync(version) ? Number(readFileSync(version, 'utf8').trim()) : undefined
  const find = () => findInstallations().find((one) => major === undefined || one.major === major)
  let found = find()
  if (found !== undefined) return found
  const wanted =
    major === undefined
      ? debianPackages.postgres
      : { ...debianPackages.postgres, name: `PostgreSQL ${major}`, packages: [`postgresql-${major}`] }
  await step(`Installing ${wanted.name} from Debian's packages`, () => installDebianPackages(wanted))
  found = find()
  if (found !== undefined) return found
  throw new Plain(`${wanted.name} was installed, but its programs are not in /usr/lib/postgresql/*/bin or on PATH.`)
}

export class PrivateCluster {
  #place
  #settings
  #bin
  #port = 0
  /** @type {import('./postgres.mjs').RunningPostgres | undefined} */
  #running
  /** @type {Promise<void>} */
  #starting = Promise.resolve()
  #isStopping = false
  /** @type {(reason: Plain) => void} */
  #giveUp = () => {}

  /**
   * @param {Place} place
   * @param {Settings} settings
   * @param {string} bin
   */
  constructor(place, settings, bin) {
    this.#place = place
    this.#settings = settings
    this.#bin = bin
  }

  get port() {
    return this.#port
  }

  /** What the server signs in with: it owns its database and nothing else. */
  get appLogin() {
    return { port: this.#port, user: DATABASE, password: this.#settings.appPassword, database: DATABASE }
  }

  /** @param {string} [database] */
  adminLogin(database = DATABASE) {
    return { port: this.#port, user: 'postgres', password: this.#settings.adminPassword, database }
  }

  start() {
    const starting = this.#start()
    this.#starting = starting.catch(() => {})
    return starting
  }

  async #start() {
    const { pgData } = this.#place
    if (!existsSync(pgData)) {
      this.#settings.isUnserved = true
      writeSettings(this.#place, this.#settings)
      await step('Making the database', () =>
        makeCluster({ bin: this.#bin, data: pgData, password: this.#settings.adminPassword, sync: true }),
      )
    }
    if (await stopOrphan(pgData))
      say('A database that an earlier start left running was stopped first; its data is whole.')
    this.#turnLog()
    const kept = this.#settings.pgPort
    let port = kept !== undefined && (await isFree(kept, '127.0.0.1')) ? kept : await anyFreePort()
    for (let attempt = 0; this.#running === undefined; attempt += 1) {
      try {
        this.#running = await this.#run(port)
      } catch (error) {
        if (!(error instanceof PortTaken) || attempt >= 5) throw error
        port = await anyFreePort()
      }
    }
    this.#port = port
    this.#settings.pgPort = port
    writeSettings(this.#place, this.#settings)
    await this.#ensureDatabase()
  }

  /** @param {number} port */
  #run(port) {
    return startPostgres({ bin: this.#bin, data: this.#place.pgData, log: this.#place.pgLog, port, durable: true })
  }

  #turnLog() {
    const { pgLog, pgLogBefore } = this.#place
    if (existsSync(pgLog) && statSync(pgLog).size > LARGEST_LOG_BYTES) renameSync(pgLog, pgLogBefore)
  }

  async #ensureDatabase() {
    const { urlFor, withConnection } = await import('./sql.mjs')
    await withConnection(urlFor(this.adminLogin('postgres')), async (client) => {
      const password = client.escapeLiteral(this.#settings.appPassword)
      const roles = await client.query('select 1 from pg_roles where rolname = $1', [DATABASE])
      await client.query(`${roles.rowCount === 0 ? 'create' : 'alter'} role ${DATABASE} login password ${password}`)
      // A first start that was cut off leaves half a demo shoot behind, in a database nobody has ever seen.
      if (this.#settings.isUnserved === true) await client.query(`drop database if exists ${DATABASE} with (force)`)
      const databases = await client.query('select 1 from pg_database where datname = $1', [DATABASE])
      if (databases.rowCount === 0) await client.query(`create database ${DATABASE} owner ${DATABASE}`)
    })
  }

  /** From now on the database holds what somebody relies on. */
  keep() {
    if (this.#settings.isUnserved !== true) return
    delete this.#settings.isUnserved
    writeSettings(this.#place, this.#settings)
  }

  /**
   * Starts the database again whenever it goes away by itself, until `stop`. The server keeps trying
   * meanwhile, so the port has to stay the same.
   *
   * @param {(reason: Plain) => void} giveUp
   */
  watch(giveUp) {
    this.#giveUp = giveUp
    void this.#watch()
  }

  async #watch() {
    while (this.#running !== undefined) {
      const exit = await this.#running.exited
      if (this.#isStopping) return
      const how = exit.signal ?? `exit code ${exit.code}`
      say(`The database stopped by itself (${how}). Starting it again; the server keeps trying meanwhile.`)
      const again = this.#startAgain()
      this.#starting = again
      await again
    }
  }

  async #startAgain() {
    this.#running = undefined
    const startedAtMs = performance.now()
    /** @type {unknown} */
    let reason
    while (!this.#isStopping && performance.now() - startedAtMs < 60_000) {
      try {
        this.#running = await this.#run(this.#port)
        say(
          `The database is back after ${((performance.now() - startedAtMs) / 1000).toFixed(1)} s; everything committed is there.`,
        )
        return
      } catch (error) {
        reason = error
        await pause(1000)
      }
    }
    if (this.#isStopping) return
    const message = reason instanceof Error ? reason.message : String(reason)
    this.#giveUp(new Plain(`The database could not be started again within a minute.\n${message}`))
  }

  async stop() {
    this.#isStopping = true
    await this.#starting
    await this.#running?.stop()
  }
}
