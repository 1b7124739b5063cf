import { describe, expect, it } from 'vitest'
import { differenceKind, differenceWords, differences } from '#shared/domain/sign-off/differences.ts'
import type { FrozenLook } from '#shared/domain/sign-off/schema.ts'

const base: FrozenLook = {
  version: 1,
  sitter: 'Ada Finch',
  character: 'The Astronomer',
  name: 'Night coat',
  hair: 'loose',
  makeUp: '',
  pieces: [
    { id: 'coat', kind: 'garment', name: 'Night coat, boiled wool', colour: '#23304a' },
    { id: 'gloves', kind: 'accessory', name: 'Gloves, black kid', colour: '#141414' },
  ],
  pictures: ['p1', 'p2'],
}
const words = (after: Partial<FrozenLook>, before: FrozenLook = base) =>
  differences(before, { ...base, ...after }).map(differenceWords)
const [coat, gloves] = base.pieces
if (!coat || !gloves) throw new Error('the sample has two pieces')

describe('differences', () => {
  it('is empty between equal versions', () => {
    expect(differences(base, structuredClone(base))).toEqual([])
  })

  it('names what changed within a piece by its first words', () => {
    expect(words({ pieces: [coat, { ...gloves, name: 'Gloves, grey wool' }] })).toEqual([
      'Gloves: black kid → grey wool',
    ])
    expect(words({ pieces: [coat, { ...gloves, name: 'Gloves' }] })).toEqual(['Gloves: black kid → not said'])
    expect(words({ pieces: [{ ...coat, name: 'Day coat' }, gloves] })).toEqual([
      'Piece: Night coat, boiled wool → Day coat',
    ])
  })

  it('says hair and make-up, also where nothing was said before', () => {
    expect(words({ hair: 'pinned under the collar', makeUp: 'bare' })).toEqual([
      'Hair: loose → pinned under the collar',
      'Make-up: not said → bare',
    ])
  })

  it('says what was added and taken out', () => {
    const loupe = { id: 'loupe', kind: 'prop', name: 'Brass loupe', colour: null }
    expect(words({ pieces: [coat, gloves, loupe] })).toEqual(['Brass loupe: added'])
    expect(words({ pieces: [coat] })).toEqual(['Gloves, black kid: taken out'])
  })

  it('matches pieces by id, not by place', () => {
    expect(words({ pieces: [gloves, coat] })).toEqual([])
  })

  it('says colours in words', () => {
    expect(words({ pieces: [coat, { ...gloves, colour: '#6e7c84' }] })).toEqual([
      'Gloves, black kid, colour: black (#141414) → slate (#6e7c84)',
    ])
    expect(words({ pieces: [coat, { ...gloves, colour: null }] })).toEqual([
      'Gloves, black kid, colour: black (#141414) → not chosen',
    ])
  })

  it('counts pictures, and says when another one comes first', () => {
    expect(words({ pictures: ['p1', 'p2', 'p3', 'p4'] })).toEqual(['2 pictures: added'])
    expect(words({ pictures: ['p1'] })).toEqual(['1 picture: taken out'])
    expect(words({ pictures: ['p2', 'p1'] })).toEqual(['First picture: the earlier one → another one'])
    const three = { ...base, pictures: ['p1', 'p2', 'p3'] }
    expect(words({ pictures: ['p1', 'p3', 'p2'] }, three)).toEqual(['Order of the pictures: as it was → another'])
    expect(words({ pictures: ['p1', 'p2', 'p2'] })).toEqual(['1 picture: added'])
  })

  it('finds a difference whenever the versions differ', () => {
    const changes: Partial<FrozenLook>[] = [
      { sitter: 'x' },
      { character: 'x' },
      { name: 'x' },
      { hair: '' },
      { makeUp: 'x' },
      { pieces: [] },
      { pictures: [] },
      { pieces: [coat, { ...gloves, kind: 'garment' }] },
      { pictures: ['p3', 'p2'] },
      { pictures: ['p1', 'p1'] },
    ]
    for (const change of changes) expect(words(change), JSON.stringify(change)).not.toEqual([])
  })
})

describe('differenceKind', () => {
  it('tells a text that was empty from a thing that was added', () => {
    expect(differenceKind({ what: 'Hair', before: '', after: 'pinned' })).toBe('changed')
    expect(differenceKind({ what: 'Loupe', before: '', after: 'Loupe' })).toBe('added')
    expect(differenceKind({ what: 'Loupe', before: 'Loupe', after: '' })).toBe('taken out')
  })
})

describe('differenceWords', () => {
  it('is one line of plain text', () => {
    expect(differenceWords({ what: 'Hair', before: 'loose', after: '' })).toBe('Hair: loose → not said')
  })
})
