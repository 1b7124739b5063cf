/** Counts what one session did wrong lately, over all its connections. */
export class Strikes {
  readonly #memoryMs: number
  readonly #counts = new Map<string, { count: number; atMs: number }>()

  constructor(memoryMs: number) {
    this.#memoryMs = memoryMs
  }

  /** Adds one and returns how many there are. */
  add(sessionId: string, nowMs: number): number {
    for (const [id, { atMs }] of this.#counts) {
      if (nowMs - atMs <= this.#memoryMs) break
      this.#counts.delete(id)
    }
    const count = (this.#counts.get(sessionId)?.count ?? 0) + 1
    // Deleted first, so that the map stays in the order of the last offence.
    this.#counts.delete(sessionId)
    this.#counts.set(sessionId, { count, atMs: nowMs })
    return count
  }
}
