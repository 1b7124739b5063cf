import { createHash } from 'node:crypto'
import { accessSync, constants, existsSync, readFileSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { rootDir, shortHash } from './place.mjs'
import { Plain, run, step, tail } from './say.mjs'
import { takeTurn } from './single.mjs'

const OLDEST_NODE = [20, 19]

/** @param {string} version as in `process.versions.node` */
export function isNodeRecentEnough(version) {
  const [major = 0, minor = 0] = version.split('.').map(Number)
  const [oldestMajor = 0, oldestMinor = 0] = OLDEST_NODE
  return major > oldestMajor || (major === oldestMajor && minor >= oldestMinor)
}

export function checkNode() {
  if (isNodeRecentEnough(process.versions.node)) return
  throw new Plain(
    `Sconce needs Node.js ${OLDEST_NODE.join('.')} or newer; this is ${process.versions.node}.\n` +
      'Install a newer one (Node.js 20 is enough) and start again.',
  )
}

/** What the installed packages depend on: the lock file, and which Node they were installed for. */
function wantedPackages() {
  return createHash('sha256')
    .update(readFileSync(join(rootDir, 'package-lock.json')))
    .update(`${process.platform} ${process.arch} ${process.versions.modules}`)
    .digest('hex')
}

const remembered = join(rootDir, 'node_modules/.sconce-lock')

function packagesAreCurrent() {
  return existsSync(remembered) && readFileSync(remembered, 'utf8') === wantedPackages()
}

/** Runs `npm ci` unless the packages in node_modules are those of the lock file. */
export async function ensurePackages() {
  if (packagesAreCurrent()) return
  const target = existsSync(join(rootDir, 'node_modules')) ? join(rootDir, 'node_modules') : rootDir
  try {
    accessSync(target, constants.W_OK)
  } catch {
    throw new Plain(
      `The packages have to be installed, and this user may not write to ${target}.\n` +
        'Start once as the owner of this folder, or make a clone of your own.',
    )
  }
  await takeTurn(`packages-${shortHash(rootDir)}`, 'installing', async () => {
    if (packagesAreCurrent()) return
    await step('Installing the packages (about a minute)', async () => {
      const npm = process.env['npm_execpath']
      const [program, first] = npm?.endsWith('.js') ? [process.execPath, [npm]] : ['npm', []]
      const done = await run(program, [...first, 'ci', '--include=dev', '--no-audit', '--no-fund'], { cwd: rootDir })
      if (done.code !== 0) {
        throw new Plain(
          `npm ci did not succeed:\n${tail(done.stdout + done.stderr, 25)}\n\n` +
            'Check the connection to the package registry and start again; nothing else was changed.',
        )
      }
      writeFileSync(remembered, wantedPackages())
    })
  })
}
