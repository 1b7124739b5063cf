import { colourWords } from './colour-words.ts'
import type { FrozenLook, LookDifference } from './schema.ts'

type FrozenPiece = FrozenLook['pieces'][number]

/**
 * What differs between two versions of a look, in words, in the order a person reads it. Pieces are matched by id.
 * A thing that was added has `after` equal to `what` and `before` empty; one taken out the other way round.
 */
export function differences(before: FrozenLook, after: FrozenLook): LookDifference[] {
  const line = (what: string, from: string, to: string): LookDifference[] =>
    from === to ? [] : [{ what, before: from, after: to }]
  return [
    ...line('Sitter', before.sitter, after.sitter),
    ...line('Character', before.character, after.character),
    ...line('Name of the look', before.name, after.name),
    ...pieceDifferences(before.pieces, after.pieces),
    ...line('Hair', before.hair, after.hair),
    ...line('Make-up', before.makeUp, after.makeUp),
    ...pictureDifferences(before.pictures, after.pictures),
  ]
}

function pieceDifferences(before: readonly FrozenPiece[], after: readonly FrozenPiece[]): LookDifference[] {
  const earlier = new Map(before.map((piece) => [piece.id, piece]))
  const later = new Map(after.map((piece) => [piece.id, piece]))
  return [
    ...after.flatMap((piece) => {
      const old = earlier.get(piece.id)
      return old ? changedPiece(old, piece) : []
    }),
    ...after.flatMap((piece) => (earlier.has(piece.id) ? [] : [{ what: piece.name, before: '', after: piece.name }])),
    ...before.flatMap((piece) => (later.has(piece.id) ? [] : [{ what: piece.name, before: piece.name, after: '' }])),
  ]
}

function changedPiece(before: FrozenPiece, after: FrozenPiece): LookDifference[] {
  const found: LookDifference[] = []
  if (before.name !== after.name) found.push(renamed(before.name, after.name))
  if (before.kind !== after.kind) found.push({ what: `${after.name}, kind`, before: before.kind, after: after.kind })
  if (before.colour !== after.colour) {
    const words = (colour: string | null) => (colour === null ? 'not chosen' : colourWords(colour))
    found.push({ what: `${after.name}, colour`, before: words(before.colour), after: words(after.colour) })
  }
  return found
}

/** "Gloves, black kid" and "Gloves, grey wool" share their first words: Gloves: black kid → grey wool. */
function renamed(before: string, after: string): LookDifference {
  const [head, ...rest] = before.split(', ')
  const [newHead, ...newRest] = after.split(', ')
  if (head !== undefined && head === newHead) {
    return { what: head, before: rest.join(', '), after: newRest.join(', ') }
  }
  return { what: 'Piece', before, after }
}

function pictureDifferences(before: readonly string[], after: readonly string[]): LookDifference[] {
  const added = countMissing(after, before)
  const removed = countMissing(before, after)
  const found: LookDifference[] = []
  const pictures = (count: number) => (count === 1 ? '1 picture' : `${count} pictures`)
  if (added > 0) found.push({ what: pictures(added), before: '', after: pictures(added) })
  if (removed > 0) found.push({ what: pictures(removed), before: pictures(removed), after: '' })
  const heroBefore = before[0]
  const heroAfter = after[0]
  if (heroBefore !== undefined && heroAfter !== undefined && heroBefore !== heroAfter) {
    found.push({ what: 'First picture', before: 'the earlier one', after: 'another one' })
  } else if (added === 0 && removed === 0 && before.join() !== after.join()) {
    found.push({ what: 'Order of the pictures', before: 'as it was', after: 'another' })
  }
  return found
}

/** How many of `list` are not in `other`, each counted as often as it stands there. */
function countMissing(list: readonly string[], other: readonly string[]): number {
  const left = new Map<string, number>()
  for (const item of other) left.set(item, (left.get(item) ?? 0) + 1)
  let missing = 0
  for (const item of list) {
    const count = left.get(item) ?? 0
    if (count > 0) left.set(item, count - 1)
    else missing += 1
  }
  return missing
}

/** How a difference is to be read: added, taken out, or changed from one to the other (an empty side: "not said"). */
export function differenceKind({ what, before, after }: LookDifference): 'added' | 'taken out' | 'changed' {
  if (before === '' && after === what) return 'added'
  return after === '' && before === what ? 'taken out' : 'changed'
}

/** A difference as one line of plain text: `Gloves: black kid → grey wool`, `Brass loupe: added`. */
export function differenceWords(difference: LookDifference): string {
  const kind = differenceKind(difference)
  if (kind !== 'changed') return `${difference.what}: ${kind}`
  return `${difference.what}: ${difference.before || 'not said'} → ${difference.after || 'not said'}`
}
