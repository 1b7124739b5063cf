import type { Hello } from '#shared/realtime/protocol.ts'

/** The body of a hello frame; undefined when it cannot be read. */
export function parseHello(text: string): Hello | undefined {
  try {
    // Our own server's frame on an authorised socket; a field that is missing shows as a reload, never as a right.
    return JSON.parse(text) as Hello
  } catch {
    return undefined
  }
}

/** The body of a frame that tells of changes: what to fetch again. */
export function parseQueryKeys(text: string): string[][] {
  try {
    const keys: unknown = JSON.parse(text)
    return Array.isArray(keys) ? keys.filter((key): key is string[] => Array.isArray(key)) : []
  } catch {
    return []
  }
}
