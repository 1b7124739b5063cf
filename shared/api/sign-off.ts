import { z } from 'zod'
import { lookIdSchema, signOffIdSchema, uploadIdSchema, userIdSchema } from '#shared/ids.ts'
import { ANSWERS, frozenLookSchema, lookDifferenceSchema } from '#shared/domain/sign-off/schema.ts'
import { proseSchema } from '#shared/domain/text.ts'

/** POST /api/shoots/:shootId/looks/:lookId/sign-offs → { signOff }; 409 CONFLICT with details { fingerprint, differences } when the look is another by now. */
export const signOffInputSchema = z
  .object({
    answer: z.enum(ANSWERS),
    fingerprint: z.string().regex(/^[0-9a-f]{64}$/),
    words: proseSchema(2000).default(''),
    /** The version the person saw, so that a conflict can say what changed since; ignored unless it has this fingerprint. */
    saw: frozenLookSchema.optional(),
  })
  .refine((input) => input.answer === 'signed off' || input.words.trim() !== '', {
    path: ['words'],
    message: 'say what should change',
  })
export type SignOffInput = z.infer<typeof signOffInputSchema>

export const signOffSchema = z.object({
  id: signOffIdSchema,
  lookId: lookIdSchema,
  answer: z.enum(ANSWERS),
  words: z.string(),
  fingerprint: z.string(),
  frozen: frozenLookSchema,
  userId: userIdSchema,
  name: z.string(),
  atMs: z.number(),
})
export type SignOff = z.infer<typeof signOffSchema>

/** GET /api/shoots/:shootId/sign-offs: the complete history, newest first, with each look's fingerprint as it stands now on the server. */
export const signOffsSchema = z.object({
  signOffs: z.array(signOffSchema),
  current: z.array(
    z.object({
      lookId: lookIdSchema,
      fingerprint: z.string(),
      frozen: frozenLookSchema,
      /** The look's pictures that are on the server, with what the fingerprint knows them by. */
      pictures: z.array(z.object({ uploadId: uploadIdSchema, sha256: z.string() })),
    }),
  ),
})
export type SignOffs = z.infer<typeof signOffsSchema>
export const signedOffSchema = z.object({ signOff: signOffSchema })
export const signOffConflictSchema = z.object({ fingerprint: z.string(), differences: z.array(lookDifferenceSchema) })
