import { index, pgTable, text, uuid } from 'drizzle-orm/pg-core'
import type { CommentId, ShootId, UserId } from '#shared/ids.ts'
import { COMMENT_SUBJECTS } from '#shared/api/comments.ts'
import { instant } from '../columns.ts'
import { user } from './auth.ts'
import { shoot } from './shoots.ts'

export const comment = pgTable(
  'comment',
  {
    id: uuid('id').$type<CommentId>().primaryKey(),
    shootId: uuid('shoot_id')
      .$type<ShootId>()
      .notNull()
      .references(() => shoot.id, { onDelete: 'cascade' }),
    subject: text('subject', { enum: COMMENT_SUBJECTS }).notNull(),
    subjectId: uuid('subject_id').notNull(),
    userId: text('user_id')
      .$type<UserId>()
      .notNull()
      .references(() => user.id),
    text: text('text').notNull(),
    at: instant('at').notNull().defaultNow(),
  },
  (table) => [index('comment_shoot').on(table.shootId)],
)
