import type * as Y from 'yjs'
import type { Look, Piece, Sitter } from '#shared/domain/looks/schema.ts'
import { type LookId, type PieceId, type SitterId, lookIdSchema, pieceIdSchema, sitterIdSchema } from '#shared/ids.ts'
import { type Collection, LOCAL_ORIGIN, addMember, putItems, readAll, rootOf } from '#shared/realtime/collection.ts'
import { looks, pieces, sitters } from '#shared/realtime/documents.ts'
import { appendKey } from '#shared/realtime/order-keys.ts'
import { newId } from '#src/lib/new-id.ts'

/** Adds a sitter and gives back the id. */
export function hangSitter(doc: Y.Doc, fields: Partial<Sitter> & { name: string }): SitterId {
  const id = sitterIdSchema.parse(newId())
  putItems(doc, sitters, [{ ...fields, id }], Math.random)
  return id
}

/** Hangs a look at the end of its sitter's rail and gives back the id. */
export function hangLook(doc: Y.Doc, fields: Partial<Look> & { name: string; sitterId: SitterId }): LookId {
  const id = lookIdSchema.parse(newId())
  const ranks = [...readAll(doc, looks).items.values()]
    .filter((look) => look.sitterId === fields.sitterId)
    .map((look) => look.rank)
  putItems(doc, looks, [{ ...fields, id, rank: appendKey(ranks, Math.random) }], Math.random)
  return id
}

/** A second look with the same pieces and pictures, as an alternative to the first. */
export function copyLook(doc: Y.Doc, look: Look): LookId {
  const { id, name, ...rest } = look
  return hangLook(doc, {
    ...rest,
    name: `${name}, second version`.slice(0, 80),
    alternativeOf: look.alternativeOf ?? id,
  })
}

/** Adds a new piece to a look and gives back its id. */
export function addNewPiece(doc: Y.Doc, lookId: LookId, fields: Partial<Piece> & { name: string }): PieceId {
  const id = pieceIdSchema.parse(newId())
  putItems(doc, pieces, [{ ...fields, id }], Math.random)
  addMember(doc, looks, lookId, 'pieceIds', id, Math.random)
  return id
}

/** Copies a piece into every look that wears the first. */
export function copyPiece(doc: Y.Doc, piece: Piece): PieceId {
  const id = pieceIdSchema.parse(newId())
  putItems(doc, pieces, [{ ...piece, id, name: `${piece.name}, second`.slice(0, 120) }], Math.random)
  for (const look of readAll(doc, looks).items.values()) {
    if (look.pieceIds.includes(piece.id)) addMember(doc, looks, look.id, 'pieceIds', id, Math.random)
  }
  return id
}

/** A sitter once more with copies of all their looks, for a double or a second cast. */
export function copySitter(doc: Y.Doc, sitter: Sitter, theirLooks: readonly Look[]): SitterId {
  const id = hangSitter(doc, { ...sitter, name: `${sitter.name}, second`.slice(0, 80) })
  for (const { id: _id, ...look } of theirLooks) hangLook(doc, { ...look, sitterId: id })
  return id
}

/** Puts taken-out items back as they were. */
export function putBack(doc: Y.Doc, c: Collection, ids: readonly string[]): void {
  const root = rootOf(doc, c)
  doc.transact(() => {
    for (const id of ids) {
      const item = root.get(id)
      if (isMap(item)) item.set('deleted', false)
    }
  }, LOCAL_ORIGIN)
}

function isMap(value: unknown): value is Y.Map<unknown> {
  return typeof value === 'object' && value !== null && 'set' in value
}
