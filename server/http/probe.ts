/**
 * Makes a question that is always answered in time: with what `ask` says, or undefined when it fails or takes longer
 * than `limitMs`. Whoever asks while it is under way shares the answer.
 */
export function createProbe<T>(ask: () => Promise<T>, limitMs: number): () => Promise<T | undefined> {
  let underWay: Promise<T | undefined> | null = null
  return () => {
    underWay ??= inTime(ask(), limitMs).finally(() => {
      underWay = null
    })
    return underWay
  }
}

async function inTime<T>(asked: Promise<T>, limitMs: number): Promise<T | undefined> {
  let timer: NodeJS.Timeout | undefined
  const late = new Promise<undefined>((resolve) => {
    timer = setTimeout(() => resolve(undefined), limitMs)
  })
  const answered = asked.catch(() => undefined)
  return Promise.race([answered, late]).finally(() => clearTimeout(timer))
}
