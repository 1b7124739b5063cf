import { existsSync } from 'node:fs'
import { dirname } from 'node:path'
import { isRoot } from './place.mjs'
import { Plain, run, tail } from './say.mjs'

/** Without it Debian's package would make and start a cluster of its own on port 5432. */
const NO_MAIN_CLUSTER = '/etc/postgresql-common/createcluster.d/no-main.conf'

/**
 * @typedef {{ name: string, packages: string[], needed: string }} Wanted
 */

/** @type {Record<'postgres' | 'chromium', Wanted>} */
export const debianPackages = {
  postgres: { name: 'PostgreSQL', packages: ['postgresql'], needed: 'keeps the data' },
  chromium: { name: 'Chromium', packages: ['chromium'], needed: 'runs the browser tests' },
}

/**
 * The commands that install packages, in order, for somebody who is root or puts sudo before them.
 *
 * @param {string[]} packages
 * @param {{ dropInIsThere: boolean }} found
 * @returns {string[][]}
 */
export function installCommands(packages, { dropInIsThere }) {
  const writeDropIn = `mkdir -p ${dirname(NO_MAIN_CLUSTER)} && echo 'create_main_cluster = false' > ${NO_MAIN_CLUSTER}`
  const keepQuiet = packages.includes('postgresql') && !dropInIsThere ? [['sh', '-c', writeDropIn]] : []
  const apt = ['env', 'DEBIAN_FRONTEND=noninteractive', 'apt-get', '-o', 'DPkg::Lock::Timeout=300', '-y']
  return [...keepQuiet, [...apt, 'update'], [...apt, '--no-install-recommends', 'install', ...packages]]
}

/**
 * Installs Debian packages: directly as root, through `sudo -n` otherwise. Where that is not
 * possible, says what to do.
 *
 * @param {Wanted} wanted
 */
export async function installDebianPackages(wanted) {
  const byHand = [
    `${wanted.name} ${wanted.needed}, and it is not installed here.`,
    'Install it as an administrator with',
    `  sudo apt-get update && sudo apt-get install -y --no-install-recommends ${wanted.packages.join(' ')}`,
    'and start again.',
  ].join('\n')
  if (!existsSync('/usr/bin/apt-get')) {
    throw new Plain(
      `${wanted.name} ${wanted.needed}, and it is not installed here. This system has no apt-get, so it cannot be\n` +
        'installed for you: install it with your own package manager, see that its programs are on PATH, and start again.',
    )
  }
  if (!isRoot && (await run('sudo', ['-n', 'true'])).code !== 0) {
    throw new Plain(`${byHand}\n(It was not installed for you because sudo wants a password or is not there.)`)
  }
  for (const command of installCommands(wanted.packages, { dropInIsThere: existsSync(NO_MAIN_CLUSTER) })) {
    const [program = '', ...args] = isRoot ? command : ['sudo', '-n', ...command]
    // Cut off in the middle it would leave the system's package data to be repaired by hand.
    const done = await run(program, args, { detached: true })
    // A failing update may only mean that one of several mirrors is away; the install decides.
    if (done.code !== 0 && !command.includes('update')) {
      throw new Plain(`${wanted.name} could not be installed:\n${tail(done.stdout + done.stderr)}\n\n${byHand}`)
    }
  }
}
