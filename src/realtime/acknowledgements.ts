/**
 * What an update-carrying message holds: one edit's `update`; `all` that is known here (the step 2 that answers the
 * server's question); `nothing` (the empty step 2 of somebody who may not write).
 */
export type MessageContent = 'update' | 'all' | 'nothing'

/**
 * Counts own edits against the server's cumulative acknowledgements. Pure: the socket tells it what went out and what
 * came back. An edit is a local transaction; a message is a sync step 2 or update of the present connection.
 */
export type Acknowledgements = {
  /** Local transactions happened, or edits of a page that is gone were taken over into this document. */
  edited(edits?: number): void
  /** A new connection: its messages are counted from one. */
  connected(): void
  /** An update-carrying message left. */
  sent(content: MessageContent): void
  /** The first `n` messages of this connection are durable. */
  saved(n: number): void
  /** Message `n` was not taken: it covers nothing, nor do the updates after it, until a step 2 brings everything. */
  refused(n: number): void
  /** Own edits not yet called durable. */
  unsent(): number
  /** Everything sent on this connection has been acknowledged, beginning with the step 2 that holds all. */
  settled(): boolean
}

type Message = { content: MessageContent; covers: number }

export function countAcknowledgements(): Acknowledgements {
  let edits = 0
  let safe = 0
  let sentMessages = 0
  let savedMessages = 0
  /** Not yet acknowledged, oldest first, each with the number of edits it makes safe. */
  let waiting: Message[] = []
  let isHolding = false
  return {
    edited(more = 1) {
      edits += more
    },
    connected() {
      sentMessages = 0
      savedMessages = 0
      waiting = []
      isHolding = false
    },
    sent(content) {
      if (content === 'all') isHolding = false
      sentMessages++
      waiting.push({ content, covers: content === 'nothing' || isHolding ? 0 : edits })
    },
    saved(n) {
      while (savedMessages < n) {
        const message = waiting.shift()
        if (!message) return
        savedMessages++
        safe = Math.max(safe, message.covers)
      }
    },
    refused(n) {
      isHolding = true
      for (const [index, message] of waiting.entries()) {
        const number = savedMessages + 1 + index
        if (number > n && message.content === 'all') {
          isHolding = false
          return
        }
        if (number >= n) message.covers = 0
      }
    },
    unsent: () => edits - safe,
    settled: () => savedMessages > 0 && savedMessages === sentMessages,
  }
}
