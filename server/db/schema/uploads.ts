import { integer, jsonb, index, pgTable, primaryKey, text, uuid } from 'drizzle-orm/pg-core'
import type { ShootId, UploadId, UserId } from '#shared/ids.ts'
import { bytea, instant } from '../columns.ts'
import { shoot } from './shoots.ts'

/** A picture's file as uploaded, by content hash; the same file in two shoots is two uploads with one blob. */
export const blob = pgTable('blob', {
  sha256: text('sha256').primaryKey(),
  bytes: bytea('bytes').notNull(),
})

export const upload = pgTable(
  'upload',
  {
    id: uuid('id').$type<UploadId>().primaryKey(),
    shootId: uuid('shoot_id')
      .$type<ShootId>()
      .notNull()
      .references(() => shoot.id, { onDelete: 'cascade' }),
    sha256: text('sha256')
      .notNull()
      .references(() => blob.sha256),
    mime: text('mime').notNull(),
    sizeBytes: integer('size_bytes').notNull(),
    widthPx: integer('width_px').notNull(),
    heightPx: integer('height_px').notNull(),
    palette: jsonb('palette').$type<string[]>().notNull(),
    exposure: text('exposure').notNull().default(''),
    /** EXIF without position. */
    exif: jsonb('exif').$type<Record<string, unknown>>().notNull(),
    perceptualHash: text('perceptual_hash').notNull(),
    createdBy: text('created_by').$type<UserId>().notNull(),
    createdAt: instant('created_at').notNull().defaultNow(),
  },
  (table) => [index('upload_shoot').on(table.shootId), index('upload_sha256').on(table.sha256)],
)

/** WebP without metadata, by content hash and long edge. */
export const rendition = pgTable(
  'rendition',
  {
    sha256: text('sha256')
      .notNull()
      .references(() => blob.sha256, { onDelete: 'cascade' }),
    longEdgePx: integer('long_edge_px').notNull(),
    bytes: bytea('bytes').notNull(),
  },
  (table) => [primaryKey({ columns: [table.sha256, table.longEdgePx] })],
)
