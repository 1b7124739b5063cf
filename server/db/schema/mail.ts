import { index, integer, pgTable, text, uuid } from 'drizzle-orm/pg-core'
import { instant } from '../columns.ts'

/** The queue of letters: written in the transaction that causes them, sent by a worker, tried again on failure. */
export const mail = pgTable(
  'mail',
  {
    id: uuid('id').primaryKey(),
    to: text('to').notNull(),
    subject: text('subject').notNull(),
    text: text('text').notNull(),
    html: text('html').notNull(),
    createdAt: instant('created_at').notNull().defaultNow(),
    nextTryAt: instant('next_try_at').notNull().defaultNow(),
    tries: integer('tries').notNull().default(0),
    sentAt: instant('sent_at'),
    failed: text('failed'),
  },
  (table) => [index('mail_due').on(table.nextTryAt)],
)
