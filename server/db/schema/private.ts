import { bigint, pgTable, primaryKey, text, uuid } from 'drizzle-orm/pg-core'
import type { PieceId, ShootId, SitterId } from '#shared/ids.ts'
import { shoot } from './shoots.ts'

/** What not everyone may read is in tables with rights of their own, never in a document. */
export const sitterPrivate = pgTable(
  'sitter_private',
  {
    shootId: uuid('shoot_id')
      .$type<ShootId>()
      .notNull()
      .references(() => shoot.id, { onDelete: 'cascade' }),
    sitterId: uuid('sitter_id').$type<SitterId>().notNull(),
    sizes: text('sizes').notNull().default(''),
    contact: text('contact').notNull().default(''),
  },
  (table) => [primaryKey({ columns: [table.shootId, table.sitterId] })],
)

/** Money in minor units with its currency. */
export const pieceCost = pgTable(
  'piece_cost',
  {
    shootId: uuid('shoot_id')
      .$type<ShootId>()
      .notNull()
      .references(() => shoot.id, { onDelete: 'cascade' }),
    pieceId: uuid('piece_id').$type<PieceId>().notNull(),
    costMinor: bigint('cost_minor', { mode: 'number' }),
    costCurrency: text('cost_currency'),
    depositMinor: bigint('deposit_minor', { mode: 'number' }),
    depositCurrency: text('deposit_currency'),
    size: text('size').notNull().default(''),
  },
  (table) => [primaryKey({ columns: [table.shootId, table.pieceId] })],
)

export const privateNote = pgTable('private_note', {
  shootId: uuid('shoot_id')
    .$type<ShootId>()
    .primaryKey()
    .references(() => shoot.id, { onDelete: 'cascade' }),
  text: text('text').notNull().default(''),
})
