import { type ChildProcess, spawn } from 'node:child_process'
import { once } from 'node:events'
import { fileURLToPath } from 'node:url'
import type { RealtimeSettings } from '#server/realtime/settings.ts'

export type ServerChild = { url: string; pid: number; kill(signal: NodeJS.Signals): Promise<void> }

const entry = fileURLToPath(new URL('./server-process.ts', import.meta.url))

/** Starts `server-process.ts` on the database at this address. */
export async function startServerChild(
  databaseUrl: string,
  limits: Partial<RealtimeSettings> = {},
): Promise<ServerChild> {
  const child = spawn(process.execPath, ['--import', 'tsx', entry], {
    cwd: fileURLToPath(new URL('../../..', import.meta.url)),
    env: {
      PATH: process.env['PATH'],
      HOME: process.env['HOME'],
      DATABASE_URL: databaseUrl,
      REALTIME_LIMITS: JSON.stringify(limits),
    },
    stdio: ['ignore', 'pipe', 'inherit'],
  })
  const port = await portOf(child)
  return {
    url: `ws://127.0.0.1:${port}`,
    pid: child.pid ?? 0,
    kill: async (signal) => {
      if (child.exitCode !== null || child.signalCode !== null) return
      const exited = once(child, 'exit')
      child.kill(signal)
      await exited
    },
  }
}

function portOf(child: ChildProcess): Promise<number> {
  return new Promise((resolve, reject) => {
    let said = ''
    child.stdout?.setEncoding('utf8').on('data', (text: string) => {
      said += text
      const port = /ready (\d+)/.exec(said)?.[1]
      if (port !== undefined) resolve(Number(port))
    })
    child.on('exit', (code) => reject(new Error(`the server ended with ${code} before it was ready`)))
  })
}
