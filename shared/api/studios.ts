import { z } from 'zod'
import { studioIdSchema, userIdSchema } from '#shared/ids.ts'
import { lineSchema } from '#shared/domain/text.ts'
import { STUDIO_ROLES } from '#shared/access/roles.ts'

/** GET /api/session */
export const sessionSchema = z.object({
  user: z.object({ id: userIdSchema, name: z.string(), email: z.string(), initials: z.string(), colour: z.string() }),
  studios: z.array(z.object({ id: studioIdSchema, name: z.string(), role: z.enum(STUDIO_ROLES) })),
  /** `/letters` exists: no SMTP_URL and bound to loopback. */
  letters: z.boolean(),
})
export type Session = z.infer<typeof sessionSchema>

/** POST /api/studios → studio; PATCH /api/studios/:studioId */
export const studioInputSchema = z.object({ name: lineSchema(80) })
export const studioSchema = z.object({
  id: studioIdSchema,
  name: z.string(),
  role: z.enum(STUDIO_ROLES),
  people: z.number().int(),
})
export type Studio = z.infer<typeof studioSchema>

/** GET /api/studios/:studioId/people; DELETE /api/studios/:studioId/people/:userId; PATCH …/:userId { role } */
export const studioPeopleSchema = z.object({
  people: z.array(
    z.object({
      userId: userIdSchema,
      name: z.string(),
      email: z.string(),
      initials: z.string(),
      colour: z.string(),
      role: z.enum(STUDIO_ROLES),
    }),
  ),
  invitations: z.array(
    z.object({
      id: z.string(),
      email: z.string(),
      role: z.enum(STUDIO_ROLES),
      expiresAtMs: z.number(),
      sentAtMs: z.number(),
    }),
  ),
})
export type StudioPeople = z.infer<typeof studioPeopleSchema>
/** POST /api/studios/:studioId/invitations; DELETE …/invitations/:invitationId */
export const studioInvitationInputSchema = z.object({ email: z.email().max(254), role: z.enum(STUDIO_ROLES) })
export const studioRoleInputSchema = z.object({ role: z.enum(STUDIO_ROLES) })
