import { integer, jsonb, pgTable, primaryKey, text, uuid } from 'drizzle-orm/pg-core'
import type { KitItemId, RecipeId, StudioId, UserId } from '#shared/ids.ts'
import type { KitInput } from '#shared/domain/kit/schema.ts'
import type { Minutes } from '#shared/domain/plan/minutes.ts'
import { STUDIO_ROLES } from '#shared/access/roles.ts'
import { instant } from '../columns.ts'
import { user } from './auth.ts'

export const studio = pgTable('studio', {
  id: uuid('id').$type<StudioId>().primaryKey(),
  name: text('name').notNull(),
  createdAt: instant('created_at').notNull().defaultNow(),
})

export const studioMember = pgTable(
  'studio_member',
  {
    studioId: uuid('studio_id')
      .$type<StudioId>()
      .notNull()
      .references(() => studio.id, { onDelete: 'cascade' }),
    userId: text('user_id')
      .$type<UserId>()
      .notNull()
      .references(() => user.id, { onDelete: 'cascade' }),
    role: text('role', { enum: STUDIO_ROLES }).notNull(),
    createdAt: instant('created_at').notNull().defaultNow(),
  },
  (table) => [primaryKey({ columns: [table.studioId, table.userId] })],
)

/** One row per version; the highest version of an id is the item as it stands, unless `removed`. */
export const kitItem = pgTable(
  'kit_item',
  {
    id: uuid('id').$type<KitItemId>().notNull(),
    version: integer('version').notNull(),
    studioId: uuid('studio_id')
      .$type<StudioId>()
      .notNull()
      .references(() => studio.id, { onDelete: 'cascade' }),
    input: jsonb('input').$type<KitInput>().notNull(),
    removedAt: instant('removed_at'),
    createdBy: text('created_by').$type<UserId>(),
    createdAt: instant('created_at').notNull().defaultNow(),
  },
  (table) => [primaryKey({ columns: [table.id, table.version] })],
)

/** A setup written so that somebody else can rebuild it; its content is read like a file. */
export const recipe = pgTable('recipe', {
  id: uuid('id').$type<RecipeId>().primaryKey(),
  studioId: uuid('studio_id')
    .$type<StudioId>()
    .notNull()
    .references(() => studio.id, { onDelete: 'cascade' }),
  name: text('name').notNull(),
  content: jsonb('content').notNull(),
  createdBy: text('created_by').$type<UserId>(),
  createdAt: instant('created_at').notNull().defaultNow(),
})

/** A studio's own minutes for the actions of a changeover. */
export const minutesDefault = pgTable('minutes_default', {
  studioId: uuid('studio_id')
    .$type<StudioId>()
    .primaryKey()
    .references(() => studio.id, { onDelete: 'cascade' }),
  minutes: jsonb('minutes').$type<Minutes>().notNull(),
  updatedAt: instant('updated_at').notNull().defaultNow(),
})
