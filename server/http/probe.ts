import { within } from '#server/within.ts'

/**
 * Makes a question that is always answered in time: with what `ask` says, or undefined when it fails or takes longer
 * than `limitMs`. Whoever asks while it is under way shares the answer.
 */
export function createProbe<T>(ask: () => Promise<T>, limitMs: number): () => Promise<T | undefined> {
  let underWay: Promise<T | undefined> | null = null
  return () => {
    underWay ??= within(
      limitMs,
      ask().catch(() => undefined),
    ).finally(() => {
      underWay = null
    })
    return underWay
  }
}
