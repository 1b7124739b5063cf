import type { WebsocketProvider } from 'y-websocket'

const FIRST_MINUTES_MS = 120_000
/** The server sends something every 15 s; five more for a slow way. A connection that is silent for longer is dead. */
const SILENCE_MS = 20_000
/** An attempt that has no answer for so long is given up. */
const CONNECTING_MS = 10_000
/** A connection that lasted for so long in step was a good one; a shorter one counts as a failed attempt. */
const GOOD_MS = 10_000

/**
 * How long to wait for the next attempt: soon at first, at most 3 s in the first two minutes, then 30 s. Spread over the
 * whole time, so that those who fell together do not return together.
 *
 * @param attempt 0 for the first after a connection was lost
 * @param random in [0, 1)
 */
export function reconnectDelayMs(attempt: number, downForMs: number, random: number): number {
  const capMs = downForMs < FIRST_MINUTES_MS ? 3_000 : 30_000
  return Math.min(capMs, 500 * 2 ** attempt) * (0.1 + 0.9 * random)
}

export type Reconnecting = {
  /** Connects now, and from now on whenever the connection is lost. Nothing happens once it is destroyed. */
  start(): void
  /** Stays away until `start`. */
  stop(): void
  destroy(): void
}

/**
 * Brings a document's connection back: with a pause that grows, and at once when the page wakes, is shown again or has a
 * network again. Half-open sockets (a phone that slept) look open and bring nothing; by their silence they are known.
 *
 * @param onFailed told the number of attempts without success after each of them
 */
export function keepConnected(provider: WebsocketProvider, onFailed: (failures: number) => void): Reconnecting {
  let isWanted = false
  let attempt = 0
  let downSinceMs: number | null = null
  let syncedAtMs: number | null = null
  let startedAtMs = 0
  let isDestroyed = false
  let timer: ReturnType<typeof setTimeout> | undefined
  let givingUp: ReturnType<typeof setTimeout> | undefined

  const connect = () => {
    clearTimeout(timer)
    if (!isWanted || provider.ws !== null) return
    startedAtMs = Date.now()
    clearTimeout(givingUp)
    givingUp = setTimeout(() => {
      if (provider.wsconnecting) provider.disconnect()
    }, CONNECTING_MS)
    provider.connect()
  }

  const handleClose = () => {
    // Its own timer has no spread and then finds nothing to do.
    provider.shouldConnect = false
    clearTimeout(givingUp)
    clearTimeout(timer)
    if (syncedAtMs !== null && Date.now() - syncedAtMs > GOOD_MS) {
      attempt = 0
      downSinceMs = null
    }
    syncedAtMs = null
    if (!isWanted) return
    downSinceMs ??= Date.now()
    timer = setTimeout(connect, reconnectDelayMs(attempt, Date.now() - downSinceMs, Math.random()))
    attempt++
    onFailed(attempt)
  }
  const handleSync = (isSynced: boolean) => {
    if (isSynced) syncedAtMs ??= Date.now()
  }
  const handleClosedForGood = () => {
    isWanted = false
    clearTimeout(timer)
  }
  provider.on('connection-close', handleClose)
  provider.on('sync', handleSync)
  provider.on('closed', handleClosedForGood)

  /** Connects at once, also in place of a connection that only looks like one. */
  const refresh = (isNetworkNew: boolean) => {
    if (!isWanted) return
    const heardMs = Date.now() - (provider.wsconnected ? provider.wsLastMessageReceived : startedAtMs)
    const limitMs = provider.wsconnected ? SILENCE_MS : 1_000
    if (provider.ws !== null && (isNetworkNew || heardMs > limitMs)) provider.disconnect()
    attempt = 0
    connect()
  }
  const handleSeen = () => {
    if (document.visibilityState === 'visible') refresh(false)
  }
  const handleOnline = () => refresh(true)
  window.addEventListener('online', handleOnline)
  window.addEventListener('pageshow', handleSeen)
  document.addEventListener('visibilitychange', handleSeen)
  document.addEventListener('resume', handleSeen)

  return {
    start() {
      if (isDestroyed) return
      isWanted = true
      connect()
    },
    stop() {
      isWanted = false
      provider.disconnect()
    },
    destroy() {
      isDestroyed = true
      isWanted = false
      clearTimeout(timer)
      clearTimeout(givingUp)
      window.removeEventListener('online', handleOnline)
      window.removeEventListener('pageshow', handleSeen)
      document.removeEventListener('visibilitychange', handleSeen)
      document.removeEventListener('resume', handleSeen)
    },
  }
}
