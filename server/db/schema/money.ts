import { bigint, jsonb, pgTable, text, uuid } from 'drizzle-orm/pg-core'
import type { ShootId, UserId } from '#shared/ids.ts'
import { instant } from '../columns.ts'
import { shoot } from './shoots.ts'

/** Money in minor units with its currency. */
export const budgetLine = pgTable('budget_line', {
  id: uuid('id').primaryKey(),
  shootId: uuid('shoot_id')
    .$type<ShootId>()
    .notNull()
    .references(() => shoot.id, { onDelete: 'cascade' }),
  what: text('what').notNull(),
  plannedMinor: bigint('planned_minor', { mode: 'number' }),
  actualMinor: bigint('actual_minor', { mode: 'number' }),
  currency: text('currency').notNull(),
})

export const estimate = pgTable('estimate', {
  id: uuid('id').primaryKey(),
  shootId: uuid('shoot_id')
    .$type<ShootId>()
    .notNull()
    .references(() => shoot.id, { onDelete: 'cascade' }),
  content: jsonb('content').notNull(),
  totalMinor: bigint('total_minor', { mode: 'number' }).notNull(),
  currency: text('currency').notNull(),
  acceptedBy: text('accepted_by').$type<UserId>(),
  acceptedAt: instant('accepted_at'),
})

export const payment = pgTable('payment', {
  id: uuid('id').primaryKey(),
  shootId: uuid('shoot_id')
    .$type<ShootId>()
    .notNull()
    .references(() => shoot.id, { onDelete: 'cascade' }),
  amountMinor: bigint('amount_minor', { mode: 'number' }).notNull(),
  currency: text('currency').notNull(),
  status: text('status').notNull(),
  providerRef: text('provider_ref'),
  at: instant('at').notNull().defaultNow(),
})
