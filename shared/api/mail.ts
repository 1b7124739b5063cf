import { z } from 'zod'

/** GET /api/letters (newest first), only while SMTP_URL is unset and the server is bound to loopback. */
export const lettersSchema = z.object({
  letters: z.array(
    z.object({
      id: z.string(),
      to: z.string(),
      subject: z.string(),
      atMs: z.number(),
      text: z.string(),
      links: z.array(z.string()),
    }),
  ),
})
export type Letters = z.infer<typeof lettersSchema>
