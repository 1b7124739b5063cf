import { type ChildProcess, spawn } from 'node:child_process'
import { once } from 'node:events'
import { join } from 'node:path'
import { createInterface } from 'node:readline'
import { anyFreePort } from '#server/start/ports.mjs'
import { rootDir } from '#tests/architecture/tree.ts'

export type AppProcess = {
  url: string
  port: number
  pid: number
  /** Asks it to drain, waits, and answers its exit code. */
  stop: () => Promise<number | null>
  /** kill -9, and waits until it is gone. */
  kill: () => Promise<unknown>
}

export type AppProcessOptions = {
  databaseUrl: string
  port?: number
  /** Put over the environment the server gets. */
  env?: Record<string, string>
}

/** The real server as a process of its own, on a database of the caller's. Resolves once it listens. */
export async function startAppProcess({ databaseUrl, port: wanted, env }: AppProcessOptions): Promise<AppProcess> {
  const port = wanted ?? (await anyFreePort())
  const url = `http://localhost:${port}`
  // With this it drains by itself when the test run is killed.
  const withParent = join(rootDir, 'server/start/with-parent.mjs')
  const child = spawn(process.execPath, ['--import', withParent, '--import', 'tsx', 'server/main.ts'], {
    cwd: rootDir,
    stdio: ['ignore', 'pipe', 'pipe', 'ipc'],
    env: {
      PATH: process.env['PATH'],
      NODE_ENV: 'test',
      LOG_LEVEL: 'warn',
      DATABASE_URL: databaseUrl,
      HOST: '127.0.0.1',
      PORT: String(port),
      PUBLIC_URL: url,
      TRUSTED_ORIGINS: `http://127.0.0.1:${port}`,
      BETTER_AUTH_SECRET: 'only for tests, and long enough to be taken for one',
      ...env,
    },
  })
  await untilReady(child)
  const pid = child.pid ?? 0
  return { url, port, pid, stop: () => end(child, 'SIGTERM'), kill: () => end(child, 'SIGKILL') }
}

async function untilReady(child: ChildProcess): Promise<void> {
  let said = ''
  const { stdout, stderr } = child
  if (stdout === null || stderr === null) throw new Error('The server has no output to read.')
  stderr.setEncoding('utf8').on('data', (text: string) => {
    said = (said + text).slice(-4000)
  })
  const ready = new Promise<boolean>((resolve) => {
    createInterface({ input: stdout }).on('line', (line) => {
      said = `${said}${line}\n`.slice(-4000)
      if (line.startsWith('ready ')) resolve(true)
    })
    child.once('exit', () => resolve(false))
  })
  if (!(await ready)) throw new Error(`The server did not start:\n${said}`)
}

async function end(child: ChildProcess, signal: NodeJS.Signals): Promise<number | null> {
  if (child.exitCode !== null || child.signalCode !== null) return child.exitCode
  const gone = once(child, 'exit')
  child.kill(signal)
  await gone
  return child.exitCode
}
