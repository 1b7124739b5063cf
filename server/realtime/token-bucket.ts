/** A sustained rate with some room above it. What is taken beyond that is a debt to wait off, never refused. */
export class TokenBucket {
  readonly #perSecond: number
  readonly #capacity: number
  #tokens: number
  #atMs: number

  constructor(perSecond: number, capacity: number, nowMs: number) {
    this.#perSecond = perSecond
    this.#capacity = capacity
    this.#tokens = capacity
    this.#atMs = nowMs
  }

  /** Takes `amount` and returns how long to wait before more is taken, 0 for not at all. Milliseconds. */
  take(amount: number, nowMs: number): number {
    const gained = (Math.max(0, nowMs - this.#atMs) / 1000) * this.#perSecond
    this.#tokens = Math.min(this.#capacity, this.#tokens + gained) - amount
    this.#atMs = nowMs
    return this.#tokens >= 0 ? 0 : Math.ceil((-this.#tokens / this.#perSecond) * 1000)
  }
}
