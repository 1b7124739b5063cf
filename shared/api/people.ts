import { z } from 'zod'
import { invitationIdSchema, userIdSchema } from '#shared/ids.ts'
import { ROLES, STUDIO_ROLES } from '#shared/access/roles.ts'

const roleSchema = z.enum(ROLES)

/** GET /api/shoots/:shootId/people. E-mails only where `contacts.*` allows; else null. */
export const peopleSchema = z.object({
  people: z.array(
    z.object({
      userId: userIdSchema,
      name: z.string(),
      initials: z.string(),
      colour: z.string(),
      role: roleSchema,
      email: z.string().nullable(),
      you: z.boolean(),
    }),
  ),
  /** Open invitations, for the photographer only. */
  invitations: z.array(
    z.object({
      id: invitationIdSchema,
      email: z.string(),
      name: z.string(),
      role: roleSchema,
      sentAtMs: z.number(),
      expiresAtMs: z.number(),
      expired: z.boolean(),
    }),
  ),
})
export type People = z.infer<typeof peopleSchema>

/** POST /api/shoots/:shootId/invitations → people; DELETE …/invitations/:invitationId; POST …/invitations/:invitationId/resend */
export const invitationInputSchema = z.object({
  email: z.email('this is not an e-mail address').max(254),
  name: z.string().trim().max(80).default(''),
  role: roleSchema,
})
/** PATCH /api/shoots/:shootId/people/:userId; DELETE the same: remove, or leave when it is oneself. */
export const roleInputSchema = z.object({ role: roleSchema })

/** GET /api/invitations/:token: what the page of the letter shows; uses nothing up. */
export const invitationPageSchema = z.object({
  kind: z.enum(['shoot', 'studio']),
  title: z.string(),
  inviter: z.string(),
  role: z.union([roleSchema, z.enum(STUDIO_ROLES)]),
  email: z.string(),
  name: z.string(),
})
export type InvitationPage = z.infer<typeof invitationPageSchema>
/** POST /api/invitations/:token/accept { name } → where to go; sets the session cookie. 410 GONE with a sentence when expired, used or withdrawn. */
export const acceptInvitationSchema = z.object({ name: z.string().trim().min(1, 'say what we call you').max(80) })
export const acceptedInvitationSchema = z.object({ to: z.string() })
