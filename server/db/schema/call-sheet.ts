import { integer, jsonb, pgTable, text, uniqueIndex, uuid } from 'drizzle-orm/pg-core'
import type { ShootId, SitterId, UserId } from '#shared/ids.ts'
import { instant } from '../columns.ts'
import { shoot } from './shoots.ts'

/** An issued call sheet: immutable and numbered. */
export const callSheet = pgTable(
  'call_sheet',
  {
    id: uuid('id').primaryKey(),
    shootId: uuid('shoot_id')
      .$type<ShootId>()
      .notNull()
      .references(() => shoot.id, { onDelete: 'cascade' }),
    number: integer('number').notNull(),
    content: jsonb('content').notNull(),
    issuedBy: text('issued_by').$type<UserId>().notNull(),
    issuedAt: instant('issued_at').notNull().defaultNow(),
  },
  (table) => [uniqueIndex('call_sheet_number').on(table.shootId, table.number)],
)

/** One person's copy with their own call on top, and whether they confirmed. */
export const callSheetCopy = pgTable('call_sheet_copy', {
  id: uuid('id').primaryKey(),
  callSheetId: uuid('call_sheet_id')
    .notNull()
    .references(() => callSheet.id, { onDelete: 'cascade' }),
  userId: text('user_id').$type<UserId>(),
  sitterId: uuid('sitter_id').$type<SitterId>(),
  email: text('email').notNull(),
  confirmedAt: instant('confirmed_at'),
})

export const release = pgTable('release', {
  id: uuid('id').primaryKey(),
  shootId: uuid('shoot_id')
    .$type<ShootId>()
    .notNull()
    .references(() => shoot.id, { onDelete: 'cascade' }),
  sitterId: uuid('sitter_id').$type<SitterId>().notNull(),
  text: text('text').notNull(),
  signedName: text('signed_name'),
  signedAt: instant('signed_at'),
})
