type Work<T> = () => Promise<T>

/** Runs at most `limit` pieces of work at once; the others wait in turn. */
export function queueOf(limit: number): <T>(work: Work<T>) => Promise<T> {
  let running = 0
  const waiting: (() => void)[] = []
  return async (work) => {
    if (running >= limit) await new Promise<void>((resolve) => waiting.push(resolve))
    else running += 1
    try {
      return await work()
    } finally {
      // The place goes to the next in line, or is given back.
      const next = waiting.shift()
      if (next) next()
      else running -= 1
    }
  }
}
