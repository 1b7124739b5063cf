import { z } from 'zod'

/**
 * A look frozen as the client sees it: what a sign-off is bound to. Left out on purpose: status, cost, dates, source,
 * private notes, shots, board. `version` belongs to the form of the fingerprint itself.
 */
export const frozenLookSchema = z.object({
  version: z.literal(1),
  sitter: z.string(),
  character: z.string(),
  name: z.string(),
  hair: z.string(),
  makeUp: z.string(),
  /** By id. */
  pieces: z.array(z.object({ id: z.string(), kind: z.string(), name: z.string(), colour: z.string().nullable() })),
  /** SHA-256 of the pictures in shown order, hero first. */
  pictures: z.array(z.string()),
})
export type FrozenLook = z.infer<typeof frozenLookSchema>

export const ANSWERS = ['signed off', 'change asked'] as const

/** One difference between two versions of a look, in words. `before` or `after` empty: added or taken out. */
export const lookDifferenceSchema = z.object({ what: z.string(), before: z.string(), after: z.string() })
export type LookDifference = z.infer<typeof lookDifferenceSchema>
