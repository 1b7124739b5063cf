/**
 * The wire between a browser and a shoot's documents, `/rt/:shootId/:kind`.
 *
 * A frame holds one message: `[varUint type][body]`, binary, in the encoding of lib0.
 *
 * | type | name | direction | body |
 * | --- | --- | --- | --- |
 * | 0 | sync | both | y-protocols/sync: step 1 (0), step 2 (1), update (2) |
 * | 1 | presence | both | y-protocols/awareness update; from a client only its own single state |
 * | 3 | query presence | to server | empty; answered with everybody's presence |
 * | 100 | saved | to client | varUint n: the first n update-carrying sync messages (step 2 or update) of this connection are durable |
 * | 101 | refused | to client | varUint n, varString reason (`Refusal`): message n was not taken; with `database-down`: not stored yet, and a 100 follows once it is |
 * | 102 | hello | to client | varString JSON `Hello`; the first frame of every connection |
 * | 103 | changed | to client | varString JSON: array of query keys to fetch again; on the `board` socket only |
 *
 * A client says which epoch its cache is of with `?epoch=n`; another one than the document's is closed with 4409. With
 * `?user=id` it says whose edits it holds; when somebody else is signed in by now it is closed with 4401.
 * 100–103 are sent only to clients that ask with `?ack=1`. Every well-formed, permitted update is answered by a
 * cumulative 100 after the transaction that stores it has committed with `synchronous_commit = on`. Deletes are
 * covered, which is why the acknowledgement is a count and not a state vector.
 */
export const MESSAGE = {
  sync: 0,
  presence: 1,
  queryPresence: 3,
  saved: 100,
  refused: 101,
  hello: 102,
  changed: 103,
} as const

export const REFUSALS = ['read-only', 'too-large', 'full', 'invalid', 'frozen', 'database-down'] as const
export type Refusal = (typeof REFUSALS)[number]

/**
 * Close codes. 4400–4499 are permanent: the client stops and says why. Others are transient: it returns by itself.
 */
export const CLOSE = {
  /** Server is going down or restarting. */
  restart: 1012,
  /** Try again later: a room failed to load, a slow reader, a full database queue, too many sockets of one person. */
  tryAgain: 1013,
  /** Three undecodable updates in one session. */
  abuse: 4400,
  /** Signed out or session expired. */
  signedOut: 4401,
  /** No access (any more). */
  noAccess: 4403,
  /** No such document. */
  unknown: 4404,
  /** The document was rebuilt: drop the cache of the old epoch. */
  epoch: 4409,
  /** Too many people in one document. */
  crowded: 4429,
  /** The role changed: come back and be told the new one. */
  roleChanged: 4205,
} as const

export type Hello = {
  role: 'photographer' | 'stylist' | 'client' | 'crew'
  mayWrite: boolean
  epoch: number
  /** Lowest document schema a writer must know. */
  schema: number
  frozen: string | null
}

/** Path of a document's socket below the origin. */
export function documentPath(shootId: string, kind: string): string {
  return `/rt/${shootId}/${kind}`
}

/** Shoot and kind of a socket's path, or undefined when it is not one of ours. */
export function parseDocumentPath(path: string): { shootId: string; kind: string } | undefined {
  const match = /^\/rt\/([0-9a-f-]{36})\/([a-z]{2,20})$/i.exec(path)
  return match?.[1] && match[2] ? { shootId: match[1].toLowerCase(), kind: match[2] } : undefined
}

/** Presence of one person, as peers see it. `user` is written by the server from the session. */
export type Presence = {
  user: { id: string; name: string; initials: string; colour: string; role: string }
  /** Section of the shoot they look at. */
  at?: string
  /** Pointer on the wall, wall units. */
  pointer?: [number, number]
  /** Ids selected. */
  selected?: string[]
  /** Boxes being dragged, by id, wall units. */
  dragging?: Record<string, [number, number, number, number]>
  /** A part of a setup being dragged in its drawings: id → [x, y, z] in metres. */
  moving?: Record<string, [number, number, number]>
}

export const LIMITS = {
  maxFrameBytes: 4 * 1024 * 1024,
  maxUpdateBytes: 1024 * 1024,
  messagesPerSecond: 100,
  bytesPerSecond: 256 * 1024,
  presenceBytes: 2048,
  socketsPerUser: 60,
  connectionsPerDocument: 200,
  stateBytes: 8 * 1024 * 1024,
  structsPerMinute: 50000,
} as const
