import { z } from 'zod'

/** Every way a request can fail that a screen tells apart. */
export const ERROR_CODES = [
  'BAD_REQUEST',
  'NOT_JSON',
  'SIGNED_OUT',
  'WRONG_ORIGIN',
  'FORBIDDEN',
  'NOT_FOUND',
  'CONFLICT',
  'GONE',
  'TOO_LARGE',
  'UNSUPPORTED',
  'TOO_MANY',
  'STARTING',
  'INTERNAL',
] as const
export const errorCodeSchema = z.enum(ERROR_CODES)
export type ErrorCode = z.infer<typeof errorCodeSchema>

export const issueSchema = z.object({ path: z.string(), message: z.string() })
export type Issue = z.infer<typeof issueSchema>

/** The one envelope of every refusal. `message` is a plain sentence; `details` carries what a screen may show (a difference). */
export const errorEnvelopeSchema = z.object({
  error: z.object({
    code: errorCodeSchema,
    message: z.string(),
    issues: z.array(issueSchema).optional(),
    details: z.unknown().optional(),
  }),
})
export type ErrorEnvelope = z.infer<typeof errorEnvelopeSchema>
