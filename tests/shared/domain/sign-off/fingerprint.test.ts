import { createHash } from 'node:crypto'
import { describe, expect, it } from 'vitest'
import { lookSchema, pieceSchema, sitterSchema } from '#shared/domain/looks/schema.ts'
import type { PlannedLook } from '#shared/domain/plan/read-plan.ts'
import { canonicalLook, fingerprintOf, freezeLook } from '#shared/domain/sign-off/fingerprint.ts'

const uuid = (digit: number) => `00000000-0000-4000-8000-${String(digit).padStart(12, '0')}`
const hashes = new Map([
  [uuid(8), 'a'.repeat(64)],
  [uuid(9), 'b'.repeat(64)],
])

function nightCoat(): PlannedLook {
  return {
    look: lookSchema.parse({
      id: uuid(1),
      sitterId: uuid(2),
      name: 'Night coat',
      hair: 'pinned',
      pieceIds: [uuid(4), uuid(3)],
      pictureIds: [uuid(8), uuid(9)],
    }),
    sitter: sitterSchema.parse({ id: uuid(2), name: 'Ada Finch', character: 'The Astronomer' }),
    pieces: [
      pieceSchema.parse({
        id: uuid(4),
        name: 'Gloves, grey wool',
        kind: 'accessory',
        colour: '#6E7C84',
        status: 'pulled',
      }),
      pieceSchema.parse({ id: uuid(3), name: 'Night coat, boiled wool', colour: '#23304A' }),
    ],
  }
}

describe('freezeLook', () => {
  it('holds what the client sees, pieces by id, pictures by content in shown order', () => {
    expect(freezeLook(nightCoat(), hashes)).toEqual({
      version: 1,
      sitter: 'Ada Finch',
      character: 'The Astronomer',
      name: 'Night coat',
      hair: 'pinned',
      makeUp: '',
      pieces: [
        { id: uuid(3), kind: 'garment', name: 'Night coat, boiled wool', colour: '#23304a' },
        { id: uuid(4), kind: 'accessory', name: 'Gloves, grey wool', colour: '#6e7c84' },
      ],
      pictures: ['a'.repeat(64), 'b'.repeat(64)],
    })
  })

  it('leaves out a picture that is not on the server yet', () => {
    expect(freezeLook(nightCoat(), new Map([[uuid(9), 'b'.repeat(64)]])).pictures).toEqual(['b'.repeat(64)])
  })
})

describe('fingerprintOf', () => {
  const of = (planned: PlannedLook) => fingerprintOf(freezeLook(planned, hashes))
  const original = of(nightCoat())

  it('does not change with status, source, dates, notes, minutes or the order of pieces', () => {
    const other = nightCoat()
    other.pieces = other.pieces
      .map((piece) => ({
        ...piece,
        status: 'packed' as const,
        source: 'Theatre hire',
        dueBack: '2026-10-16',
        note: 'private',
      }))
      .reverse()
    other.look = { ...other.look, note: 'for us', changeMin: 30, rank: 'b' }
    expect(of(other)).toBe(original)
  })

  it.each<[string, (planned: PlannedLook) => void]>([
    ['name', (planned) => (planned.look.name = 'Day coat')],
    ['hair', (planned) => (planned.look.hair = 'loose')],
    ['make-up', (planned) => (planned.look.makeUp = 'bare')],
    ['sitter', (planned) => (planned.sitter = null)],
    ['a colour', (planned) => planned.pieces.forEach((piece) => (piece.colour = null))],
    ['a piece less', (planned) => planned.pieces.pop()],
    ['the order of the pictures', (planned) => planned.look.pictureIds.reverse()],
  ])('changes with %s', (_what, change) => {
    const other = nightCoat()
    change(other)
    expect(of(other)).not.toBe(original)
  })

  it('is the same for composed and decomposed letters', () => {
    const composed = nightCoat()
    composed.look.hair = 'chignon tressé'.normalize('NFC')
    const decomposed = nightCoat()
    decomposed.look.hair = 'chignon tressé'.normalize('NFD')
    expect(of(decomposed)).toBe(of(composed))
  })

  it('is the SHA-256 of the canonical JSON, as Node computes it', () => {
    const frozen = freezeLook(nightCoat(), hashes)
    expect(fingerprintOf(frozen)).toBe(createHash('sha256').update(canonicalLook(frozen), 'utf8').digest('hex'))
  })
})

describe('canonicalLook', () => {
  it('orders keys and has no spaces (RFC 8785)', () => {
    const { pieces: _pieces, ...frozen } = freezeLook(nightCoat(), new Map())
    expect(canonicalLook({ ...frozen, pieces: [] })).toBe(
      '{"character":"The Astronomer","hair":"pinned","makeUp":"","name":"Night coat","pictures":[],"pieces":[],"sitter":"Ada Finch","version":1}',
    )
  })
})
