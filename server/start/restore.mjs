import { spawn } from 'node:child_process'
import { readFileSync } from 'node:fs'
import { join } from 'node:path'
import { pipeline } from 'node:stream/promises'
import { dumpStream, readArchive } from './archive.mjs'
import { connectionEnv, fileArgument, writeBackup } from './backup.mjs'
import { PrivateCluster, ensurePostgres } from './cluster.mjs'
import { contentsOf, describeTables, differences } from './contents.mjs'
import { ensurePackages } from './packages.mjs'
import { openPlace, readSettings, rootDir } from './place.mjs'
import { Plain, say, step, tail } from './say.mjs'
import { askHolder, tryHold } from './single.mjs'
import { holdName } from './up.mjs'

const REPLACED = 'sconce_replaced'

/**
 * Replaces the embedded database by what a backup holds. The backup goes into a database of its own, is
 * compared with its manifest there, and only then takes the place of the present one, in one step.
 *
 * @param {string | undefined} name
 * @param {import('./up.mjs').Life} life
 */
export async function restore(name, life) {
  const file = fileArgument(name, 'restore')
  const hold = await tryHold(holdName, { doing: 'restore' })
  if (hold === undefined) {
    const holder = await askHolder(holdName)
    const where = holder?.url === undefined ? '' : ` at ${holder.url}`
    throw new Plain(
      `Sconce is running from this folder${where} (process ${holder?.pid}). Stop it first, then restore. Nothing was changed.`,
    )
  }
  life.toStop(hold.release)
  await ensurePackages()
  const manifest = await step(`Checking ${file}`, () => readArchive(file))
  if (manifest.lastMigrationMs > newestMigrationMs()) {
    throw new Plain(
      'This backup was made by a newer Sconce than this one. Update the checkout, then restore. Nothing was changed.',
    )
  }
  const place = openPlace()
  const { bin } = await ensurePostgres(place.pgData)
  const cluster = new PrivateCluster(place, readSettings(place), bin)
  life.toStop(() => cluster.stop())
  await cluster.start()
  const { urlFor, withConnection } = await import('./sql.mjs')
  const present = cluster.adminLogin()
  const fresh = cluster.adminLogin('sconce_restoring')
  await withConnection(urlFor(cluster.adminLogin('postgres')), async (admin) => {
    for (const leftover of [fresh.database, REPLACED])
      await admin.query(`drop database if exists ${leftover} with (force)`)
    await admin.query(`create database ${fresh.database} owner ${cluster.appLogin.user} template template0`)
    try {
      await step('Reading the backup into a fresh database', () =>
        fill(bin, fresh, cluster.appLogin.user, file, manifest),
      )
      const found = await step('Comparing it with what the backup says', () => contentsIn(urlFor(fresh)))
      const wrong = differences(manifest, found)
      if (wrong.length > 0) {
        throw new Plain(
          `The restored data is not what was backed up:\n${wrong.join('\n')}\nThe present data was left as it is.`,
        )
      }
      const before = await contentsIn(urlFor(present))
      if (Object.keys(before.tables).length > 0) {
        const stamp = new Date().toISOString().replace(/[-:]|\..*/g, '')
        say('What is there now is kept in a backup of its own:')
        await writeBackup(bin, present, join(place.dataDir, `before-restore-${stamp}.sconce`))
      }
      await beginNewEpoch(urlFor(fresh), Object.keys(before.tables).length > 0 ? urlFor(present) : undefined)
      await admin.query('begin')
      await admin.query(`alter database ${present.database} rename to ${REPLACED}`)
      await admin.query(`alter database ${fresh.database} rename to ${present.database}`)
      await admin.query('commit')
      cluster.keep()
      await admin.query(`drop database ${REPLACED} with (force)`)
    } catch (error) {
      await admin.query('rollback')
      await admin.query(`drop database if exists ${fresh.database} with (force)`)
      throw error
    }
  })
  say(
    `Restored ${describeTables(manifest.tables)}, made ${manifest.madeAt}; every table's rows and content match the backup. Pages that are open have to be loaded again.`,
  )
  say('Start Sconce again with npm start.')
}

/**
 * Puts the documents into an epoch that no browser has a cache of: what was kept on a device of the time after the
 * backup would otherwise be handed back at the next visit, and undo the restore.
 *
 * @param {string} freshUrl
 * @param {string | undefined} presentUrl none where there is nothing yet
 */
async function beginNewEpoch(freshUrl, presentUrl) {
  const { withConnection } = await import('./sql.mjs')
  const highest = 'select coalesce(max(epoch), 0)::int as epoch from rt_doc'
  const inUse =
    presentUrl === undefined
      ? 0
      : await withConnection(presentUrl, async (client) => Number((await client.query(highest)).rows[0].epoch))
  await withConnection(freshUrl, (client) =>
    client.query(`update rt_doc set epoch = greatest($1, (${highest})) + 1`, [inUse]),
  )
}

/** When the newest migration of this checkout was made, in milliseconds since 1970. */
function newestMigrationMs() {
  const journal = JSON.parse(readFileSync(join(rootDir, 'drizzle/meta/_journal.json'), 'utf8'))
  return Math.max(0, ...journal.entries.map((/** @type {{ when: number }} */ entry) => entry.when))
}

/** @param {string} url */
async function contentsIn(url) {
  const { withConnection } = await import('./sql.mjs')
  return withConnection(url, async (client) => {
    await client.query('begin isolation level repeatable read read only')
    return contentsOf(client)
  })
}

/**
 * @param {string} bin
 * @param {import('./sql.mjs').Login} login
 * @param {string} owner
 * @param {string} file
 * @param {import('./archive.mjs').Manifest} manifest
 */
async function fill(bin, login, owner, file, manifest) {
  const args = [
    '--no-owner',
    '--no-privileges',
    `--role=${owner}`,
    '--single-transaction',
    `--dbname=${login.database}`,
  ]
  const child = spawn(join(bin, 'pg_restore'), args, { env: connectionEnv(login), stdio: ['pipe', 'ignore', 'pipe'] })
  let said = ''
  child.stderr.setEncoding('utf8').on('data', (text) => (said += text))
  const ended = new Promise((resolve) => {
    child.once('error', (error) => {
      said += error.message
      resolve(127)
    })
    child.once('close', resolve)
  })
  // When pg_restore gives up early the pipe breaks; its own words say why.
  await pipeline(dumpStream(file, manifest), child.stdin).catch(() => {})
  if ((await ended) !== 0) {
    throw new Plain(`The backup could not be read into a database:\n${tail(said)}\nThe present data was left as it is.`)
  }
}
