import { spawnSync } from 'node:child_process'
import { PEERS, folderOf } from './realtime/targets/peers.ts'

/** Installs the servers that `npm run bench -- load --peers` compares with, each beside its own package.json. */
for (const peer of PEERS) {
  process.stdout.write(`${peer.name}\n`)
  // No scripts: what only runs for a comparison need not run anything while it is installed. Engines as they come: one
  // declares a newer Node.js and runs on this one.
  const { status } = spawnSync('npm', ['ci', '--ignore-scripts', '--no-audit', '--no-fund', '--engine-strict=false'], {
    cwd: folderOf(peer),
    stdio: 'inherit',
  })
  if (status !== 0) process.exit(status ?? 1)
}
