import { z } from 'zod'
import { commentIdSchema, userIdSchema } from '#shared/ids.ts'

export const COMMENT_SUBJECTS = ['frame', 'look', 'shot', 'setup'] as const
/** GET /api/shoots/:shootId/comments; POST { subject, subjectId, text } → whole list; DELETE own …/comments/:commentId */
export const commentInputSchema = z.object({
  subject: z.enum(COMMENT_SUBJECTS),
  subjectId: z.guid(),
  text: z.string().trim().min(1).max(2000),
})
export const commentsSchema = z.object({
  comments: z.array(
    z.object({
      id: commentIdSchema,
      subject: z.enum(COMMENT_SUBJECTS),
      subjectId: z.string(),
      userId: userIdSchema,
      name: z.string(),
      initials: z.string(),
      text: z.string(),
      atMs: z.number(),
    }),
  ),
})
export type Comments = z.infer<typeof commentsSchema>
