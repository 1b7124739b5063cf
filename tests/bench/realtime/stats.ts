/** Percentiles of a list, in its own unit (nearest rank); null for an empty one. */
export type Summary = { n: number; p50: number; p95: number; p99: number; max: number }

export function round(value: number, digits = 1): number {
  return Number(value.toFixed(digits))
}

export function summary(values: readonly number[]): Summary | null {
  if (values.length === 0) return null
  const sorted = Float64Array.from(values).sort()
  const at = (share: number) => round(sorted[Math.max(0, Math.ceil(share * sorted.length) - 1)] ?? NaN)
  return { n: sorted.length, p50: at(0.5), p95: at(0.95), p99: at(0.99), max: at(1) }
}

export function median(values: readonly number[]): number {
  return [...values].sort((a, b) => a - b)[Math.floor(values.length / 2)] ?? NaN
}
