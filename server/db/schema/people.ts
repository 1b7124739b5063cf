import { sql } from 'drizzle-orm'
import { check, pgTable, text, uuid } from 'drizzle-orm/pg-core'
import type { InvitationId, ShootId, StudioId, UserId } from '#shared/ids.ts'
import { bytea, instant } from '../columns.ts'
import { user } from './auth.ts'
import { shoot } from './shoots.ts'
import { studio } from './studios.ts'

/** An invitation into one shoot or one studio. The token is 256 bit and stored hashed (SHA-256). */
export const invitation = pgTable(
  'invitation',
  {
    id: uuid('id').$type<InvitationId>().primaryKey(),
    shootId: uuid('shoot_id')
      .$type<ShootId>()
      .references(() => shoot.id, { onDelete: 'cascade' }),
    studioId: uuid('studio_id')
      .$type<StudioId>()
      .references(() => studio.id, { onDelete: 'cascade' }),
    email: text('email').notNull(),
    name: text('name').notNull().default(''),
    role: text('role').notNull(),
    tokenHash: bytea('token_hash').notNull().unique(),
    invitedBy: text('invited_by')
      .$type<UserId>()
      .notNull()
      .references(() => user.id, { onDelete: 'cascade' }),
    sentAt: instant('sent_at').notNull(),
    expiresAt: instant('expires_at').notNull(),
    acceptedAt: instant('accepted_at'),
    acceptedBy: text('accepted_by').$type<UserId>(),
    revokedAt: instant('revoked_at'),
  },
  (table) => [check('invitation_one_home', sql`(${table.shootId} is null) <> (${table.studioId} is null)`)],
)

/** A sitter's link: reads one call and signs one release, no account. Token hashed, scoped, expiring, revocable. */
export const signedLink = pgTable('signed_link', {
  id: uuid('id').primaryKey(),
  shootId: uuid('shoot_id')
    .$type<ShootId>()
    .notNull()
    .references(() => shoot.id, { onDelete: 'cascade' }),
  sitterId: uuid('sitter_id').notNull(),
  scope: text('scope').notNull(),
  tokenHash: bytea('token_hash').notNull().unique(),
  createdBy: text('created_by').$type<UserId>().notNull(),
  createdAt: instant('created_at').notNull().defaultNow(),
  expiresAt: instant('expires_at').notNull(),
  revokedAt: instant('revoked_at'),
})

export const auditEvent = pgTable('audit_event', {
  id: uuid('id').primaryKey(),
  shootId: uuid('shoot_id').$type<ShootId>(),
  studioId: uuid('studio_id').$type<StudioId>(),
  userId: text('user_id').$type<UserId>(),
  what: text('what').notNull(),
  subject: text('subject').notNull().default(''),
  at: instant('at').notNull().defaultNow(),
})
