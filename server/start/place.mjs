import { createHash, randomBytes } from 'node:crypto'
import { mkdirSync, readFileSync, realpathSync, renameSync, writeFileSync } from 'node:fs'
import { homedir } from 'node:os'
import { join } from 'node:path'
import { fileURLToPath } from 'node:url'
import { Plain } from './say.mjs'

/** The folder of this checkout. */
export const rootDir = realpathSync(fileURLToPath(new URL('../..', import.meta.url)))

export const isRoot = process.getuid?.() === 0

/** @param {string} text */
export function shortHash(text) {
  return createHash('sha256').update(text).digest('hex').slice(0, 12)
}

/**
 * Where a checkout's data lies: never inside the checkout, which may be deleted, and which the
 * database's own system user may not be able to enter.
 *
 * @param {string} checkout
 * @param {{ isRoot: boolean, home: string, env: Record<string, string | undefined> }} who
 */
export function dataDirFor(checkout, who) {
  if (who.env['SCONCE_DATA_DIR']) return who.env['SCONCE_DATA_DIR']
  const base = who.isRoot ? '/var/lib' : who.env['XDG_DATA_HOME'] || join(who.home, '.local/share')
  return join(base, 'sconce', shortHash(checkout))
}

/**
 * @typedef {{ dataDir: string, pgData: string, pgLog: string, pgLogBefore: string, settingsFile: string }} Place
 *
 * @returns {Place}
 */
export function openPlace() {
  const dataDir = dataDirFor(rootDir, { isRoot, home: homedir(), env: process.env })
  try {
    // The database's system user has to pass through, so only what is secret is closed.
    mkdirSync(dataDir, { recursive: true, mode: isRoot ? 0o755 : 0o700 })
  } catch (error) {
    throw new Plain(
      `The folder for the data, ${dataDir}, cannot be made: ${String(error)}\n` +
        'Set SCONCE_DATA_DIR to a folder that this user may write to, and start again.',
    )
  }
  return {
    dataDir,
    pgData: join(dataDir, 'postgres'),
    pgLog: join(dataDir, 'postgres.log'),
    pgLogBefore: join(dataDir, 'postgres.log.before'),
    settingsFile: join(dataDir, 'settings.json'),
  }
}

/**
 * What is remembered between starts. Holds passwords, so only the owner may read it.
 *
 * @typedef {{
 *   checkout: string, authSecret: string, adminPassword: string, appPassword: string, pgPort?: number, serverPid?: number,
 *   isUnserved?: boolean,
 * }} Settings `isUnserved` from the making of the cluster until the server has once been ready on it
 *
 * @param {Place} place
 * @returns {Settings}
 */
export function readSettings(place) {
  /** @type {Partial<Settings>} */
  let kept = {}
  try {
    kept = JSON.parse(readFileSync(place.settingsFile, 'utf8'))
  } catch (error) {
    if (!(error instanceof Error && 'code' in error && error.code === 'ENOENT')) {
      throw new Plain(`${place.settingsFile} cannot be read: ${String(error)}\nNothing was changed.`)
    }
  }
  const secret = () => randomBytes(32).toString('base64url')
  const settings = {
    ...kept,
    checkout: rootDir,
    authSecret: kept.authSecret ?? secret(),
    adminPassword: kept.adminPassword ?? secret(),
    appPassword: kept.appPassword ?? secret(),
  }
  writeSettings(place, settings)
  return settings
}

/**
 * Written beside and moved over, so a start that dies here leaves the old ones whole.
 *
 * @param {Place} place
 * @param {Settings} settings
 */
export function writeSettings(place, settings) {
  const next = `${place.settingsFile}.next`
  writeFileSync(next, `${JSON.stringify(settings, null, 2)}\n`, { mode: 0o600 })
  renameSync(next, place.settingsFile)
}
