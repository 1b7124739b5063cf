import pg from 'pg'
import type { RealtimeLog } from './settings.ts'
import { reasonOf } from './update-log.ts'

export type Listening = { stop(): Promise<void> }

const RETRY_MIN_MS = 250
const RETRY_MAX_MS = 5_000
/** A connection that died silently would never tell us anything again. */
const PROBE_MS = 20_000

/**
 * Listens on a channel over a connection of its own, for as long as it takes. `onConnected` runs after every
 * connection: what was said in between is lost, so whoever listens looks for itself then.
 */
export function listen(options: {
  databaseUrl: string
  channel: string
  log: RealtimeLog
  onPayload: (payload: string) => void
  onConnected: () => void
  onLost?: () => void
}): Listening {
  const { databaseUrl, channel, log, onPayload, onConnected, onLost } = options
  let client: pg.Client | null = null
  let timer: NodeJS.Timeout | null = null
  let isStopped = false
  let attempts = 0

  async function connect(): Promise<void> {
    const mine = new pg.Client({
      connectionString: databaseUrl,
      connectionTimeoutMillis: 5_000,
      query_timeout: 10_000,
      keepAlive: true,
      options: '-c timezone=UTC',
    })
    client = mine
    mine.on('error', () => lost(mine))
    mine.on('end', () => lost(mine))
    mine.on('notification', (message) => onPayload(message.payload ?? ''))
    try {
      await mine.connect()
      await mine.query(`listen ${pg.escapeIdentifier(channel)}`)
    } catch (error) {
      log.warn({ channel, error: reasonOf(error) }, 'not listening, trying again')
      lost(mine)
      return
    }
    if (client !== mine) return
    attempts = 0
    onConnected()
    timer = setInterval(() => void mine.query('select 1').catch(() => lost(mine)), PROBE_MS)
  }

  function lost(which: pg.Client): void {
    if (client !== which) return
    client = null
    if (timer) clearInterval(timer)
    which.end().catch(() => undefined)
    if (isStopped) return
    onLost?.()
    const waitMs = Math.min(RETRY_MAX_MS, RETRY_MIN_MS * 2 ** Math.min(attempts++, 8)) * (0.5 + Math.random() / 2)
    timer = setTimeout(() => void connect(), waitMs)
  }

  void connect()

  return {
    stop: async () => {
      isStopped = true
      if (timer) clearTimeout(timer)
      const last = client
      client = null
      await last?.end().catch(() => undefined)
    },
  }
}
