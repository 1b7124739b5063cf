import canonicalize from 'canonicalize'
import { toHexString } from 'lib0/buffer'
import { digest } from 'lib0/hash/sha256'
import { encodeUtf8 } from 'lib0/string'
import type { PlannedLook } from '#shared/domain/plan/read-plan.ts'
import type { FrozenLook } from './schema.ts'

/**
 * A look as the client sees it, in the form that is signed: texts in NFC, colours in lower case, pieces by id, pictures
 * by content in shown order. A picture that is not on the server yet (no hash) was not seen by the client and is left out.
 *
 * @param pictureHashes SHA-256 in hex by upload id.
 */
export function freezeLook(
  { look, sitter, pieces }: PlannedLook,
  pictureHashes: ReadonlyMap<string, string>,
): FrozenLook {
  const text = (value: string) => value.normalize('NFC')
  return {
    version: 1,
    sitter: text(sitter?.name ?? ''),
    character: text(sitter?.character ?? ''),
    name: text(look.name),
    hair: text(look.hair),
    makeUp: text(look.makeUp),
    pieces: pieces
      .map((piece) => ({
        id: String(piece.id),
        kind: piece.kind,
        name: text(piece.name),
        colour: piece.colour?.toLowerCase() ?? null,
      }))
      .sort((a, b) => (a.id < b.id ? -1 : a.id > b.id ? 1 : 0)),
    pictures: look.pictureIds.flatMap((id) => pictureHashes.get(id) ?? []),
  }
}

/** A frozen look as canonical JSON (RFC 8785): the same text for the same look on every device. */
export function canonicalLook(frozen: FrozenLook): string {
  const json = canonicalize(frozen)
  if (json === undefined) throw new Error('a frozen look always has a JSON form')
  return json
}

/** What a sign-off is bound to: SHA-256 of the canonical JSON, 64 hexadecimal digits in lower case. */
export function fingerprintOf(frozen: FrozenLook): string {
  return toHexString(digest(encodeUtf8(canonicalLook(frozen))))
}
