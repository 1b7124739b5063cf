import type { Role, StudioRole } from '#shared/access/roles.ts'

/** What each role in a shoot may do, in one line. */
export const ROLE_LINES: Readonly<Record<Role, string>> = {
  photographer: 'Leads the shoot: may change everything, invites people, sees costs and private notes.',
  stylist: 'Builds looks and the running order, sees sizes and what pieces cost.',
  client: 'Pins on the board, comments, and signs the looks off.',
  crew: 'Sees the plan, sets up lights, and follows the list on the day.',
}

export const STUDIO_ROLE_LINES: Readonly<Record<StudioRole, string>> = {
  owner: 'Runs the studio: its people, its kit room, its minutes, and may start shoots.',
  member: 'Uses and changes the kit room and the minutes, and may start shoots.',
}

const NAMES: Readonly<Record<Role | StudioRole, string>> = {
  photographer: 'Photographer',
  stylist: 'Stylist',
  client: 'Client',
  crew: 'Crew',
  owner: 'Owner',
  member: 'Member',
}

export function roleName(role: Role | StudioRole): string {
  return NAMES[role]
}

/** "the photographer", "crew": in the middle of a sentence. */
export function asRole(role: Role | StudioRole): string {
  return role === 'crew' ? 'crew' : role === 'owner' ? 'an owner' : `a ${role}`
}
