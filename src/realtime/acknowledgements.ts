/**
 * Counts own edits against the server's cumulative acknowledgements. Pure: the socket tells it what went out and what
 * came back. An edit is a local transaction; a message is a sync step 2 or update of the present connection.
 */
export type Acknowledgements = {
  /** A local transaction happened. */
  edited(): void
  /** A new connection: its messages are counted from one. */
  connected(): void
  /** An update-carrying message left; it covers every edit made so far. */
  sent(): void
  /** The first `n` messages of this connection are durable. */
  saved(n: number): void
  /** Own edits not yet called durable. */
  unsent(): number
  /** The step 2 that answers the server's first question has been acknowledged, so everything known here is safe. */
  settled(): boolean
}

/** @param carriedOver edits known from an earlier visit that were never acknowledged. */
export function countAcknowledgements(carriedOver: number): Acknowledgements {
  let edits = carriedOver
  let safe = 0
  let sentMessages = 0
  let savedMessages = 0
  /** For each unacknowledged message, the number of edits it covers. */
  let covers: number[] = []
  return {
    edited() {
      edits++
    },
    connected() {
      sentMessages = 0
      savedMessages = 0
      covers = []
    },
    sent() {
      sentMessages++
      covers.push(edits)
    },
    saved(n) {
      while (savedMessages < n && covers.length > 0) {
        savedMessages++
        safe = Math.max(safe, covers.shift() ?? 0)
      }
    },
    unsent: () => edits - safe,
    settled: () => savedMessages > 0 && savedMessages === sentMessages,
  }
}
