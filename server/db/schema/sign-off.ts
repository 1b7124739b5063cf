import { bigint, index, jsonb, pgTable, text, uuid } from 'drizzle-orm/pg-core'
import type { LookId, ShootId, SignOffId, UserId } from '#shared/ids.ts'
import { ANSWERS, type FrozenLook } from '#shared/domain/sign-off/schema.ts'
import { instant } from '../columns.ts'
import { shoot } from './shoots.ts'

/** An answer to one exact version of a look. Never updated, never deleted. */
export const signOff = pgTable(
  'sign_off',
  {
    id: uuid('id').$type<SignOffId>().primaryKey(),
    shootId: uuid('shoot_id')
      .$type<ShootId>()
      .notNull()
      .references(() => shoot.id, { onDelete: 'cascade' }),
    lookId: uuid('look_id').$type<LookId>().notNull(),
    answer: text('answer', { enum: ANSWERS }).notNull(),
    words: text('words').notNull().default(''),
    fingerprint: text('fingerprint').notNull(),
    frozen: jsonb('frozen').$type<FrozenLook>().notNull(),
    /** Head of the looks document's log when it was answered. */
    seq: bigint('seq', { mode: 'number' }).notNull(),
    userId: text('user_id').$type<UserId>().notNull(),
    name: text('name').notNull(),
    at: instant('at').notNull(),
  },
  (table) => [index('sign_off_shoot').on(table.shootId)],
)
