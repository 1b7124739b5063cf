import { z } from 'zod'
import { ROLES, type Role, STUDIO_ROLES, type StudioRole } from '#shared/access/roles.ts'

/** An invitation's role column holds a shoot's or a studio's role. @throws when it is of the other kind */
export function roleFrom(text: string): Role {
  return z.enum(ROLES).parse(text)
}

export function studioRoleFrom(text: string): StudioRole {
  return z.enum(STUDIO_ROLES).parse(text)
}
