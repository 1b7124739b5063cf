/** Milliseconds. */
export type Quantiles = { p50: number; p95: number; p99: number; max: number }

/** The latest durations of something, in milliseconds, for an operator to look at. */
export class Recent {
  readonly #size: number
  readonly #values: number[] = []
  #next = 0

  /** @param size how many are remembered. */
  constructor(size: number) {
    this.#size = size
  }

  add(ms: number): void {
    this.#values[this.#next] = ms
    this.#next = (this.#next + 1) % this.#size
  }

  /** The value that a share of the remembered does not exceed (nearest rank); zeros when there are none. */
  percentiles(): Quantiles {
    const sorted = [...this.#values].sort((a, b) => a - b)
    const at = (share: number) => sorted[Math.max(0, Math.ceil(share * sorted.length) - 1)] ?? 0
    return { p50: at(0.5), p95: at(0.95), p99: at(0.99), max: at(1) }
  }
}
