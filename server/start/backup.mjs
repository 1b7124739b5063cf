import { existsSync, renameSync, rmSync, statSync, writeFileSync } from 'node:fs'
import { dirname, join, resolve } from 'node:path'
import { sealArchive } from './archive.mjs'
import { PrivateCluster, ensurePostgres } from './cluster.mjs'
import { contentsOf, describeTables } from './contents.mjs'
import { ensurePackages } from './packages.mjs'
import { openPlace, readSettings } from './place.mjs'
import { Plain, run, say, step, tail } from './say.mjs'
import { askHolder, tryHold } from './single.mjs'
import { holdName } from './up.mjs'

/**
 * @typedef {import('./up.mjs').Life} Life
 * @typedef {import('./sql.mjs').Login} Login
 *
 * Writes everything of the embedded database into one file, whether Sconce is running or not.
 *
 * @param {string | undefined} name
 * @param {Life} life
 */
export async function backup(name, life) {
  const file = fileArgument(name, 'backup')
  if (existsSync(file)) throw new Plain(`${file} is there already and was left as it is. Give the backup another name.`)
  if (!existsSync(dirname(file))) throw new Plain(`The folder ${dirname(file)} does not exist. Nothing was written.`)
  await ensurePackages()
  const place = openPlace()
  if (!existsSync(place.pgData))
    throw new Plain('There is no data of this checkout yet, so there is nothing to back up.')
  const settings = readSettings(place)
  const { bin } = await ensurePostgres(place.pgData)
  const cluster = new PrivateCluster(place, settings, bin)
  const hold = await tryHold(holdName, { doing: 'backup' })
  /** @type {Login} */
  let login
  if (hold === undefined) {
    const port = await runningPort()
    login = { ...cluster.adminLogin(), port }
  } else {
    life.toStop(hold.release)
    life.toStop(() => cluster.stop())
    await cluster.start()
    login = cluster.adminLogin()
  }
  await writeBackup(bin, login, file)
}

/** The port of the database of a Sconce that has this checkout. */
async function runningPort() {
  const holder = await askHolder(holdName)
  if (holder?.doing === 'running' && holder.pgPort !== undefined) return holder.pgPort
  throw new Plain(
    `Sconce is ${holder?.doing === 'backup' || holder?.doing === 'restore' ? `in the middle of a ${holder.doing}` : 'starting or stopping'}` +
      ' in this folder. Try again when it is done.',
  )
}

/**
 * Dump and manifest come from one snapshot, so they agree however much is written meanwhile.
 *
 * @param {string} bin
 * @param {Login} login
 * @param {string} file
 */
export async function writeBackup(bin, login, file) {
  const { urlFor, withConnection } = await import('./sql.mjs')
  const unfinished = `${file}.unfinished`
  const removeUnfinished = () => rmSync(unfinished, { force: true })
  process.once('exit', removeUnfinished)
  try {
    writeFileSync(unfinished, '', { mode: 0o600 })
    await step(`Writing ${file}`, () =>
      withConnection(urlFor(login), async (client) => {
        await client.query('begin isolation level repeatable read read only')
        const snapshot = await client.query('select pg_export_snapshot() as id, version() as version')
        const facts = await contentsOf(client)
        const args = ['--format=custom', '--no-owner', '--no-privileges', `--snapshot=${snapshot.rows[0].id}`]
        const dumped = await run(join(bin, 'pg_dump'), [...args, `--file=${unfinished}`, login.database], {
          env: connectionEnv(login),
        })
        if (dumped.code !== 0) throw new Plain(`The backup could not be written:\n${tail(dumped.stderr)}`)
        await client.query('commit')
        const madeAt = new Date().toISOString()
        const manifest = await sealArchive(unfinished, { madeAt, postgres: snapshot.rows[0].version, ...facts })
        renameSync(unfinished, file)
        const sizeMB = (statSync(file).size / 1e6).toFixed(1)
        say(`Backed up ${describeTables(manifest.tables)} into ${file} (${sizeMB} MB).`)
        say('It holds everything, private notes included: keep it where only you can read it.')
      }),
    )
  } finally {
    removeUnfinished()
  }
}

/**
 * What pg_dump and pg_restore need to sign in; only this user can see a process's environment.
 *
 * @param {Login} login
 */
export function connectionEnv({ port, user, password }) {
  return {
    PATH: process.env['PATH'],
    LC_ALL: 'C',
    PGHOST: '127.0.0.1',
    PGPORT: String(port),
    PGUSER: user,
    PGPASSWORD: password,
  }
}

/**
 * @param {string | undefined} name
 * @param {'backup' | 'restore'} what
 */
export function fileArgument(name, what) {
  if (process.env['DATABASE_URL']) {
    throw new Plain(
      `DATABASE_URL is set, and this ${what} is for the embedded database only.\n` +
        "Use the tools of the database's own host (pg_dump, pg_restore), or unset DATABASE_URL.",
    )
  }
  if (name === undefined || name.trim() === '') throw new Plain(`Say which file: npm run ${what} -- FILE`)
  // npm runs scripts in the project's folder and says here where it was called.
  return resolve(process.env['INIT_CWD'] ?? process.cwd(), name)
}
