import type { DocumentKind } from '#shared/realtime/documents.ts'

/** Roles in a shoot. A client or crew member belongs to a shoot, never to the studio. */
export const ROLES = ['photographer', 'stylist', 'client', 'crew'] as const
export type Role = (typeof ROLES)[number]

export const STUDIO_ROLES = ['owner', 'member'] as const
export type StudioRole = (typeof STUDIO_ROLES)[number]

/** What can be done inside a shoot, beside the documents. */
export const SHOOT_ACTIONS = [
  'brief.read',
  'brief.write',
  'people.read',
  'people.write',
  'contacts.readAll',
  'contacts.readPhotographer',
  'contacts.readCallSheet',
  'uploads.read',
  'uploads.write',
  'comments.read',
  'comments.write',
  'sign-off.read',
  'sign-off.answer',
  'sign-off.ask',
  'kit.read',
  'recipes.read',
  'minutes.read',
  'sizes.read',
  'sizes.write',
  'piece-costs.read',
  'piece-costs.write',
  'private-notes.read',
  'private-notes.write',
  'money.read',
  'money.write',
  'estimate.read',
  'estimate.accept',
  'call-sheet.read',
  'call-sheet.write',
  'releases.read',
  'releases.write',
  'versions.read',
  'versions.write',
  'links.write',
  'shoot.remove',
] as const
export type ShootAction = (typeof SHOOT_ACTIONS)[number]

const EVERYONE: readonly Role[] = ROLES
const PLANNERS: readonly Role[] = ['photographer', 'stylist']

/** The rights table of the product, as data: who may do what inside a shoot. */
export const SHOOT_RIGHTS: Readonly<Record<ShootAction, readonly Role[]>> = {
  'brief.read': EVERYONE,
  'brief.write': ['photographer'],
  'people.read': EVERYONE,
  'people.write': ['photographer'],
  'contacts.readAll': PLANNERS,
  'contacts.readPhotographer': ['photographer', 'stylist', 'client'],
  'contacts.readCallSheet': ['photographer', 'stylist', 'crew'],
  'uploads.read': EVERYONE,
  'uploads.write': ['photographer', 'stylist', 'client'],
  'comments.read': EVERYONE,
  'comments.write': EVERYONE,
  'sign-off.read': EVERYONE,
  'sign-off.answer': ['client'],
  'sign-off.ask': ['photographer', 'stylist'],
  'kit.read': EVERYONE,
  'recipes.read': EVERYONE,
  'minutes.read': EVERYONE,
  'sizes.read': PLANNERS,
  'sizes.write': PLANNERS,
  'piece-costs.read': PLANNERS,
  'piece-costs.write': PLANNERS,
  'private-notes.read': ['photographer'],
  'private-notes.write': ['photographer'],
  'money.read': ['photographer'],
  'money.write': ['photographer'],
  'estimate.read': ['photographer', 'client'],
  'estimate.accept': ['client'],
  'call-sheet.read': EVERYONE,
  'call-sheet.write': ['photographer'],
  'releases.read': PLANNERS,
  'releases.write': ['photographer'],
  'versions.read': EVERYONE,
  'versions.write': ['photographer', 'stylist', 'client'],
  'links.write': ['photographer'],
  'shoot.remove': ['photographer'],
}

/** Who writes each document; every role reads all five. */
export const DOCUMENT_WRITERS: Readonly<Record<DocumentKind, readonly Role[]>> = {
  board: ['photographer', 'stylist', 'client'],
  plan: ['photographer', 'stylist'],
  looks: ['photographer', 'stylist'],
  lighting: ['photographer', 'crew'],
  day: ['photographer', 'stylist', 'crew'],
}

export const STUDIO_ACTIONS = [
  'studio.read',
  'studio.write',
  'members.write',
  'kit.write',
  'recipes.write',
  'wardrobe.write',
  'minutes.write',
  'shoots.create',
] as const
export type StudioAction = (typeof STUDIO_ACTIONS)[number]

export const STUDIO_RIGHTS: Readonly<Record<StudioAction, readonly StudioRole[]>> = {
  'studio.read': STUDIO_ROLES,
  'studio.write': ['owner'],
  'members.write': ['owner'],
  'kit.write': STUDIO_ROLES,
  'recipes.write': STUDIO_ROLES,
  'wardrobe.write': STUDIO_ROLES,
  'minutes.write': STUDIO_ROLES,
  'shoots.create': STUDIO_ROLES,
}

/** Whether a role in a shoot may do this; no role, no right. */
export function canInShoot(role: Role | null, action: ShootAction): boolean {
  return role !== null && SHOOT_RIGHTS[action].includes(role)
}

/** Whether a role may write a document. Reading needs any role. */
export function canWriteDocument(role: Role | null, kind: DocumentKind): boolean {
  return role !== null && DOCUMENT_WRITERS[kind].includes(role)
}

/** Whether a role in a studio may do this. It gives no look inside a shoot. */
export function canInStudio(role: StudioRole | null, action: StudioAction): boolean {
  return role !== null && STUDIO_RIGHTS[action].includes(role)
}
