// @ts-check
import { spawn } from 'node:child_process'
import { existsSync, readdirSync } from 'node:fs'
import { fileURLToPath } from 'node:url'

// `npm run bench -- <name> [more]`: runs tests/bench/<name>.ts, which prints one JSON line.

const here = fileURLToPath(new URL('.', import.meta.url))
const [name, ...more] = process.argv.slice(2)
const known = readdirSync(here)
  .filter((file) => file.endsWith('.ts'))
  .map((file) => file.slice(0, -3))

if (name === undefined || !/^[a-z-]+$/.test(name) || !existsSync(`${here}${name}.ts`)) {
  process.stderr.write(`Name one of: ${known.join(', ')}\n`)
  process.exit(2)
}
const child = spawn(process.execPath, ['--import', 'tsx', `${here}${name}.ts`, ...more], { stdio: 'inherit' })
for (const signal of /** @type {const} */ (['SIGINT', 'SIGTERM'])) process.on(signal, () => child.kill(signal))
child.on('exit', (code) => process.exit(code ?? 1))
