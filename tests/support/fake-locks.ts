type Callback = (lock: { name: string } | null) => unknown
type Options = { ifAvailable?: boolean; signal?: AbortSignal }

/** The browser's locks for pages that live in one test: exclusive, first come first served. */
export function fakeLocks(): Pick<LockManager, 'request'> {
  const held = new Map<string, Promise<unknown>>()
  async function request(name: string, options: Options, callback: Callback): Promise<unknown> {
    const { ifAvailable = false, signal } = options
    signal?.throwIfAborted()
    if (ifAvailable && held.has(name)) return callback(null)
    while (held.has(name)) {
      await Promise.race([held.get(name), rejectedWhenAborted(signal)])
    }
    const done = (async () => callback({ name }))()
    const over = done.then(
      () => held.delete(name),
      () => held.delete(name),
    )
    held.set(name, over)
    return done
  }
  // Only the form with options is used.
  return { request: request as unknown as LockManager['request'] }
}

function rejectedWhenAborted(signal: AbortSignal | undefined): Promise<never> {
  return new Promise((_resolve, reject) => {
    signal?.addEventListener('abort', () => reject(new DOMException('Aborted.', 'AbortError')), { once: true })
  })
}
