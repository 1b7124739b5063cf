import * as Y from 'yjs'

/**
 * `gap`: well-formed, yet builds on what this document lacks. Not an offence: somebody may edit before having
 * answered sync step 1.
 */
export type Verdict = { kind: 'fits'; structs: number } | { kind: 'undecodable' } | { kind: 'gap' }

/**
 * Judges an update without touching the document.
 *
 * `Y.applyUpdate` is not atomic: it can throw half way, or keep rubbish as pending in the document and in all that the
 * document encodes. So: decode apart from it, then demand that everything the update builds on is known. Known means
 * in the document or earlier in the update; a struct may not refer to its own future.
 */
export function examine(doc: Y.Doc, update: Uint8Array): Verdict {
  let decoded: ReturnType<typeof Y.decodeUpdate>
  try {
    decoded = Y.decodeUpdate(update)
  } catch {
    return { kind: 'undecodable' }
  }
  const ends = new Map<number, number>()
  const known = (client: number) => ends.get(client) ?? Y.getState(doc.store, client)

  let section: number | null = null
  for (const struct of decoded.structs) {
    const { client, clock } = struct.id
    // Nothing that is made has no length. The document would hold it, and throw for whoever opens what it encodes.
    if (struct.length < 1) return { kind: 'undecodable' }
    // A second section of the same client replaces the first when it is applied.
    if (client !== section && ends.has(client)) return { kind: 'undecodable' }
    section = client
    const have = known(client)
    const end = clock + struct.length
    // Yjs would take it and encode what nobody can decode.
    if (!Number.isSafeInteger(client) || !Number.isSafeInteger(end)) return { kind: 'undecodable' }
    if (struct instanceof Y.Skip ? end > have : clock > have) return { kind: 'gap' }
    ends.set(client, Math.max(have, end))
  }
  for (const struct of decoded.structs) {
    if (!(struct instanceof Y.Item)) continue
    const { client, clock } = struct.id
    for (const id of [struct.origin, struct.rightOrigin, struct.parent]) {
      if (!(id instanceof Y.ID)) continue
      if (id.client === client ? id.clock >= clock : id.clock >= known(id.client)) return { kind: 'gap' }
    }
    if (struct.origin && Y.compareIDs(struct.origin, struct.rightOrigin)) return { kind: 'undecodable' }
  }
  for (const [client, ranges] of decoded.ds.clients) {
    // Where the document ends, one without length makes `Y.applyUpdate` throw half way.
    if (ranges.some((range) => range.len < 1)) return { kind: 'undecodable' }
    if (ranges.some((range) => range.clock + range.len > known(client))) return { kind: 'gap' }
  }
  return { kind: 'fits', structs: decoded.structs.length }
}

/**
 * Whether a step 2 holds nothing that the document lacks. It always lists every deletion its sender knows of, so a
 * reader's answer is seldom empty though it brings nothing. Bytes that do not decode bring something.
 */
export function bringsNothing(doc: Y.Doc, update: Uint8Array): boolean {
  let decoded: ReturnType<typeof Y.decodeUpdate>
  try {
    decoded = Y.decodeUpdate(update)
  } catch {
    return false
  }
  if (decoded.structs.length > 0) return false
  const ours = Y.createDeleteSetFromStructStore(doc.store)
  return Y.equalDeleteSets(Y.mergeDeleteSets([ours, decoded.ds]), ours)
}

/** Whether something waits in the document for what it lacks. `examine` lets nothing of the kind through. */
export function hasPending(doc: Y.Doc): boolean {
  return doc.store.pendingStructs !== null || doc.store.pendingDs !== null
}

/** Forgets what waits, so that it is neither stored nor sent to anybody. */
export function dropPending(doc: Y.Doc): void {
  doc.store.pendingStructs = null
  doc.store.pendingDs = null
}

/**
 * The part of a well-formed update that the document can take: what a client integrated itself, without what waits in
 * it for something nobody has. Worked out on a copy; undefined when even that fails. Costs a copy of the document.
 */
export function withoutGaps(doc: Y.Doc, update: Uint8Array): Uint8Array | undefined {
  const copy = new Y.Doc()
  try {
    Y.applyUpdate(copy, Y.encodeStateAsUpdate(doc))
    Y.applyUpdate(copy, update)
    dropPending(copy)
    const rest = Y.encodeStateAsUpdate(copy, Y.encodeStateVector(doc))
    return examine(doc, rest).kind === 'fits' ? rest : undefined
  } catch {
    return undefined
  } finally {
    copy.destroy()
  }
}
