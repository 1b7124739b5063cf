import { type ChildProcess, spawn } from 'node:child_process'
import { once } from 'node:events'
import { connect } from 'node:net'
import { performance } from 'node:perf_hooks'
import { fileURLToPath } from 'node:url'
import { z } from 'zod'
import { anyFreePort } from '#server/start/ports.mjs'
import { pause } from '#tests/realtime/support/client.ts'
import { type Profile, profileSchema } from './profile.ts'

const rootDir = fileURLToPath(new URL('../../..', import.meta.url))
const probe = new URL('./probe.mjs', import.meta.url).href

const START_MS = 20_000
const STOP_MS = 15_000
const ANSWER_MS = 20_000

const memorySchema = z.object({ heapUsed: z.number(), external: z.number(), rss: z.number() })
/** Bytes. `held` is what a collection of garbage leaves in the heap and in buffers outside it. */
export type Memory = { held: number; rss: number }

/** A server that is measured: a process of its own on a port of its own. */
export type ServerChild = {
  /** `ws://…` */
  url: string
  pid: number
  isAlive(): boolean
  /** What it holds after a collection of garbage. */
  memory(): Promise<Memory>
  startProfile(): Promise<void>
  stopProfile(): Promise<Profile>
  kill(signal: NodeJS.Signals): Promise<void>
}

/** Starts a server and resolves when its port answers; it is told HOST and PORT by environment. */
export async function startServerChild(options: {
  /** What follows `node`. */
  args: readonly string[]
  cwd?: string
  env: Record<string, string>
}): Promise<ServerChild> {
  const port = await anyFreePort()
  const child = spawn(process.execPath, ['--expose-gc', '--import', probe, ...options.args], {
    cwd: options.cwd ?? rootDir,
    env: {
      PATH: process.env['PATH'],
      HOME: process.env['HOME'],
      HOST: '127.0.0.1',
      PORT: String(port),
      ...options.env,
    },
    stdio: ['ignore', 'ignore', 'pipe', 'ipc'],
  })
  let said = ''
  child.stderr?.setEncoding('utf8').on('data', (text: string) => {
    said = (said + text).slice(-4000)
  })
  const isAlive = () => child.exitCode === null && child.signalCode === null
  const startedMs = performance.now()
  while (!(await answers(port))) {
    if (isAlive() && performance.now() - startedMs < START_MS) {
      await pause(25)
      continue
    }
    child.kill('SIGKILL')
    throw new Error(`the server did not start:\n${said}`)
  }
  return {
    url: `ws://127.0.0.1:${port}`,
    pid: child.pid ?? 0,
    isAlive,
    memory: async () => {
      const { heapUsed, external, rss } = memorySchema.parse(await ask(child, 'memory'))
      return { held: heapUsed + external, rss }
    },
    startProfile: async () => void (await ask(child, 'profile start')),
    stopProfile: async () => profileSchema.parse(await ask(child, 'profile stop')),
    kill: async (signal) => {
      if (!isAlive()) return
      const exited = once(child, 'exit')
      child.kill(signal)
      const timer = setTimeout(() => child.kill('SIGKILL'), STOP_MS)
      await exited
      clearTimeout(timer)
    },
  }
}

function answers(port: number): Promise<boolean> {
  return new Promise((resolve) => {
    const socket = connect({ port, host: '127.0.0.1' })
    const end = (isThere: boolean) => {
      socket.destroy()
      resolve(isThere)
    }
    socket.once('connect', () => end(true))
    socket.once('error', () => end(false))
  })
}

/** A question to `probe.mjs` in the server. */
function ask(child: ChildProcess, question: string): Promise<unknown> {
  return new Promise((resolve, reject) => {
    const timer = setTimeout(() => end(reject, new Error(`no answer to "${question}"`)), ANSWER_MS)
    const onMessage = (message: unknown) => {
      const answered = z.object({ question: z.string(), answer: z.unknown().optional() }).safeParse(message)
      if (answered.data?.question === question) end(resolve, answered.data.answer)
    }
    const end = <T>(settle: (value: T) => void, value: T) => {
      clearTimeout(timer)
      child.off('message', onMessage)
      settle(value)
    }
    child.on('message', onMessage)
    child.send(question)
  })
}
