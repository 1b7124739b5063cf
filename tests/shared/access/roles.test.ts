import { describe, expect, it } from 'vitest'
import {
  ROLES,
  SHOOT_ACTIONS,
  STUDIO_ACTIONS,
  canInShoot,
  canInStudio,
  canWriteDocument,
  type Role,
  type ShootAction,
} from '#shared/access/roles.ts'
import { DOCUMENT_KINDS, type DocumentKind } from '#shared/realtime/documents.ts'

/** Written out by hand from the product's rights table, photographer / stylist / client / crew. */
const DOCUMENTS: Record<DocumentKind, [boolean, boolean, boolean, boolean]> = {
  board: [true, true, true, false],
  plan: [true, true, false, false],
  looks: [true, true, false, false],
  lighting: [true, false, false, true],
  day: [true, true, false, true],
}

describe('canWriteDocument', () => {
  it.each(DOCUMENT_KINDS)('follows the rights table for %s', (kind) => {
    expect(ROLES.map((role) => canWriteDocument(role, kind))).toEqual(DOCUMENTS[kind])
    expect(canWriteDocument(null, kind)).toBe(false)
  })
})

const ACTIONS: [ShootAction, [boolean, boolean, boolean, boolean]][] = [
  ['brief.write', [true, false, false, false]],
  ['brief.read', [true, true, true, true]],
  ['people.write', [true, false, false, false]],
  ['comments.write', [true, true, true, true]],
  ['sign-off.answer', [false, false, true, false]],
  ['sizes.read', [true, true, false, false]],
  ['piece-costs.read', [true, true, false, false]],
  ['private-notes.read', [true, false, false, false]],
  ['money.read', [true, false, false, false]],
  ['estimate.read', [true, false, true, false]],
  ['contacts.readAll', [true, true, false, false]],
  ['contacts.readPhotographer', [true, true, true, false]],
  ['links.write', [true, false, false, false]],
  ['money.write', [true, false, false, false]],
  ['estimate.accept', [false, false, true, false]],
  ['call-sheet.read', [true, true, true, true]],
  ['call-sheet.write', [true, false, false, false]],
  ['releases.read', [true, true, false, false]],
  ['releases.write', [true, false, false, false]],
  ['versions.write', [true, true, true, false]],
  ['shoot.remove', [true, false, false, false]],
]

describe('canInShoot', () => {
  it.each(ACTIONS)('%s', (action, expected) => {
    expect(ROLES.map((role: Role) => canInShoot(role, action))).toEqual(expected)
  })

  it('gives nothing to somebody without a role, a studio owner included', () => {
    expect(SHOOT_ACTIONS.some((action) => canInShoot(null, action))).toBe(false)
  })
})

describe('canInStudio', () => {
  it('lets a member edit the kit room and start shoots, not the people', () => {
    expect(canInStudio('member', 'kit.write')).toBe(true)
    expect(canInStudio('member', 'shoots.create')).toBe(true)
    expect(canInStudio('member', 'members.write')).toBe(false)
    expect(canInStudio('owner', 'members.write')).toBe(true)
    expect(STUDIO_ACTIONS.some((action) => canInStudio(null, action))).toBe(false)
  })
})
