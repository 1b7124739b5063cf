import { readdirSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { stopOrphan } from '../../server/start/postgres.mjs'

/** Test clusters live in folders of this name, followed by the process that made them. */
export const clusterPrefix = 'sconce-test-'

/**
 * Stops and removes the clusters of test runs that are gone: one that was killed could not do it itself.
 */
export async function removeLeftovers() {
  for (const name of readdirSync(tmpdir())) {
    const owner = name.startsWith(clusterPrefix) ? /^\d+/.exec(name.slice(clusterPrefix.length))?.[0] : undefined
    if (owner === undefined || isAlive(Number(owner))) continue
    const folder = join(tmpdir(), name)
    try {
      await stopOrphan(join(folder, 'data'))
      rmSync(folder, { recursive: true, force: true })
    } catch {
      // Another user's, and not ours to clear.
    }
  }
}

/** @param {number} pid */
function isAlive(pid) {
  try {
    process.kill(pid, 0)
    return true
  } catch (error) {
    return error instanceof Error && 'code' in error && error.code === 'EPERM'
  }
}
