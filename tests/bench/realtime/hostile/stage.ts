import type { RealtimeSettings } from '#server/realtime/settings.ts'
import { BenchClient } from '../client.ts'
import type { BenchDatabase } from '../database.ts'
import type { ServerChild } from '../server-child.ts'
import type { BenchDocument, Target } from '../targets/target.ts'

/** `isGood` is null where the question could not be put. */
export type Answer = { question: string; isGood: boolean | null; detail?: string }

/** What one kind of misbehaviour is tried on: a server of its own and a document with seats for many. */
export type Stage = {
  target: Target
  server: ServerChild
  database: BenchDatabase
  document: BenchDocument
  open(seat: number, document?: BenchDocument): BenchClient
}

export type HostileCase = {
  name: string
  limits?: Partial<RealtimeSettings>
  isFor?(target: Target): boolean
  run(stage: Stage): Promise<Answer[]>
}

export const SEATS = 20

/** Puts one case's questions to a server started for it. */
export async function onStage(hostile: HostileCase, target: Target, database: BenchDatabase): Promise<Answer[]> {
  const [document] = await target.addDocuments(1, SEATS)
  if (!document) throw new Error('no document')
  const server = await target.start(hostile.limits)
  const opened: BenchClient[] = []
  const open = (seat: number, which = document) => {
    const client = new BenchClient(which.seat(server, seat), { dialect: target.dialect })
    opened.push(client)
    return client
  }
  try {
    return await hostile.run({ target, server, database, document, open })
  } catch (error) {
    const detail = `could not be asked: ${error instanceof Error ? error.message : String(error)}`
    return [{ question: hostile.name, isGood: false, detail }]
  } finally {
    opened.forEach((client) => client.vanish())
    await server.kill('SIGKILL')
  }
}
