import { createHash } from 'node:crypto'
import { existsSync, mkdirSync, readFileSync, readdirSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { rootDir, shortHash } from './place.mjs'
import { Plain, run, step, tail } from './say.mjs'
import { takeTurn } from './single.mjs'

/** Everything the built client is made of. */
const sources = ['index.html', 'vite.config.ts', 'tsconfig.json', 'package-lock.json', 'src', 'shared', 'public']

/**
 * A hash over the names and contents of files and folders, so that a deleted file counts as a change and a
 * file that was only touched does not.
 *
 * @param {string} base
 * @param {string[]} names
 */
export function fingerprintOf(base, names) {
  const hash = createHash('sha256')
  for (const name of names) {
    const path = join(base, name)
    if (!existsSync(path)) continue
    const entries = /** @type {string[]} */ ([name])
    for (let entry = entries.pop(); entry !== undefined; entry = entries.pop()) {
      const children = readFolder(join(base, entry))
      if (children === undefined)
        hash
          .update(`${entry}\0`)
          .update(readFileSync(join(base, entry)))
          .update('\0')
      else entries.push(...children.map((child) => `${entry}/${child}`))
    }
  }
  return hash.digest('hex')
}

/** @param {string} path @returns {string[] | undefined} undefined for a file */
function readFolder(path) {
  try {
    return readdirSync(path).sort()
  } catch {
    return undefined
  }
}

const marker = join(rootDir, 'dist/.sources')

function isBuilt() {
  const built = existsSync(join(rootDir, 'dist/client/index.html')) && existsSync(marker)
  return built && readFileSync(marker, 'utf8') === fingerprintOf(rootDir, sources)
}

/** Builds the client unless dist holds what these sources make. */
export async function ensureBuilt() {
  if (isBuilt()) return
  await takeTurn(`build-${shortHash(rootDir)}`, 'building', async () => {
    if (isBuilt()) return
    await step('Building the pages', async () => {
      const wanted = fingerprintOf(rootDir, sources)
      const vite = join(rootDir, 'node_modules/vite/bin/vite.js')
      const env = { ...process.env, NODE_ENV: 'production' }
      const done = await run(process.execPath, [vite, 'build'], { cwd: rootDir, env })
      if (done.code !== 0) throw new Plain(`The pages could not be built:\n${tail(done.stdout + done.stderr, 30)}`)
      mkdirSync(join(rootDir, 'dist'), { recursive: true })
      writeFileSync(marker, wanted)
    })
  })
}
