import { bigint, date, doublePrecision, integer, pgTable, primaryKey, text, uuid } from 'drizzle-orm/pg-core'
import type { DeliverableId, RoomId, ShootId, StudioId, UserId } from '#shared/ids.ts'
import { DELIVERABLE_ORIENTATIONS } from '#shared/domain/shoots/schema.ts'
import { ROLES } from '#shared/access/roles.ts'
import { instant } from '../columns.ts'
import { user } from './auth.ts'
import { studio } from './studios.ts'

export const shoot = pgTable('shoot', {
  id: uuid('id').$type<ShootId>().primaryKey(),
  studioId: uuid('studio_id')
    .$type<StudioId>()
    .notNull()
    .references(() => studio.id, { onDelete: 'cascade' }),
  title: text('title').notNull(),
  client: text('client').notNull().default(''),
  idea: text('idea').notNull().default(''),
  usage: text('usage').notNull().default(''),
  date: date('date', { mode: 'string' }),
  zone: text('zone').notNull(),
  signOffByMs: bigint('sign_off_by_ms', { mode: 'number' }),
  createdBy: text('created_by')
    .$type<UserId>()
    .notNull()
    .references(() => user.id),
  createdAt: instant('created_at').notNull().defaultNow(),
})

export const location = pgTable('location', {
  shootId: uuid('shoot_id')
    .$type<ShootId>()
    .primaryKey()
    .references(() => shoot.id, { onDelete: 'cascade' }),
  name: text('name').notNull().default(''),
  address: text('address').notNull().default(''),
  latitude: doublePrecision('latitude'),
  longitude: doublePrecision('longitude'),
  parking: text('parking').notNull().default(''),
  access: text('access').notNull().default(''),
})

export const room = pgTable('room', {
  id: uuid('id').$type<RoomId>().primaryKey(),
  shootId: uuid('shoot_id')
    .$type<ShootId>()
    .notNull()
    .references(() => shoot.id, { onDelete: 'cascade' }),
  position: integer('position').notNull(),
  name: text('name').notNull(),
  widthM: doublePrecision('width_m'),
  depthM: doublePrecision('depth_m'),
  ceilingM: doublePrecision('ceiling_m'),
  power: text('power').notNull().default(''),
  windows: text('windows').notNull().default(''),
  note: text('note').notNull().default(''),
})

export const deliverable = pgTable('deliverable', {
  id: uuid('id').$type<DeliverableId>().primaryKey(),
  shootId: uuid('shoot_id')
    .$type<ShootId>()
    .notNull()
    .references(() => shoot.id, { onDelete: 'cascade' }),
  position: integer('position').notNull(),
  title: text('title').notNull(),
  count: integer('count').notNull().default(1),
  orientation: text('orientation', { enum: DELIVERABLE_ORIENTATIONS }).notNull().default('any'),
  use: text('use').notNull().default(''),
  dueOn: date('due_on', { mode: 'string' }),
})

export const shootMember = pgTable(
  'shoot_member',
  {
    shootId: uuid('shoot_id')
      .$type<ShootId>()
      .notNull()
      .references(() => shoot.id, { onDelete: 'cascade' }),
    userId: text('user_id')
      .$type<UserId>()
      .notNull()
      .references(() => user.id, { onDelete: 'cascade' }),
    role: text('role', { enum: ROLES }).notNull(),
    createdAt: instant('created_at').notNull().defaultNow(),
  },
  (table) => [primaryKey({ columns: [table.shootId, table.userId] })],
)
