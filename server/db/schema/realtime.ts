import { bigint, bigserial, index, integer, pgTable, primaryKey, text, uniqueIndex, uuid } from 'drizzle-orm/pg-core'
import type { DocId, ShootId, UserId, VersionId } from '#shared/ids.ts'
import { DOCUMENT_KINDS } from '#shared/realtime/documents.ts'
import { bytea, instant } from '../columns.ts'
import { shoot } from './shoots.ts'

/** A document's head. `seq` is handed out under this row's lock, so commit order is seq order without gaps. */
export const rtDoc = pgTable(
  'rt_doc',
  {
    id: uuid('id').$type<DocId>().primaryKey(),
    shootId: uuid('shoot_id')
      .$type<ShootId>()
      .notNull()
      .references(() => shoot.id, { onDelete: 'cascade' }),
    kind: text('kind', { enum: DOCUMENT_KINDS }).notNull(),
    epoch: integer('epoch').notNull().default(1),
    schema: integer('schema').notNull().default(1),
    head: bigint('head', { mode: 'number' }).notNull().default(0),
    snapshotSeq: bigint('snapshot_seq', { mode: 'number' }).notNull().default(0),
    logRows: integer('log_rows').notNull().default(0),
    logBytes: bigint('log_bytes', { mode: 'number' }).notNull().default(0),
    stateBytes: bigint('state_bytes', { mode: 'number' }).notNull().default(0),
    /** Why nobody may write: null, `quota` or `quarantine`. */
    frozen: text('frozen'),
  },
  (table) => [uniqueIndex('rt_doc_shoot_kind').on(table.shootId, table.kind)],
)

/** Append-only log. `user_id` is the only trustworthy authorship: client ids are chosen by clients. */
export const rtUpdate = pgTable(
  'rt_update',
  {
    docId: uuid('doc_id')
      .$type<DocId>()
      .notNull()
      .references(() => rtDoc.id, { onDelete: 'cascade' }),
    seq: bigint('seq', { mode: 'number' }).notNull(),
    userId: text('user_id').$type<UserId>(),
    at: instant('at').notNull().defaultNow(),
    update: bytea('update').notNull(),
  },
  (table) => [primaryKey({ columns: [table.docId, table.seq] })],
)

export const rtSnapshot = pgTable(
  'rt_snapshot',
  {
    docId: uuid('doc_id')
      .$type<DocId>()
      .notNull()
      .references(() => rtDoc.id, { onDelete: 'cascade' }),
    seq: bigint('seq', { mode: 'number' }).notNull(),
    kind: text('kind').notNull(),
    state: bytea('state').notNull(),
    sha256: bytea('sha256').notNull(),
    at: instant('at').notNull().defaultNow(),
  },
  (table) => [primaryKey({ columns: [table.docId, table.seq, table.kind] })],
)

export const rtQuarantine = pgTable(
  'rt_quarantine',
  {
    id: bigserial('id', { mode: 'number' }).primaryKey(),
    docId: uuid('doc_id')
      .$type<DocId>()
      .notNull()
      .references(() => rtDoc.id, { onDelete: 'cascade' }),
    userId: text('user_id').$type<UserId>(),
    reason: text('reason').notNull(),
    update: bytea('update').notNull(),
    at: instant('at').notNull().defaultNow(),
  },
  (table) => [index('rt_quarantine_doc').on(table.docId)],
)

/** Who touched which item when, upserted in the commit, so that authorship survives compaction. */
export const rtTouch = pgTable(
  'rt_touch',
  {
    docId: uuid('doc_id')
      .$type<DocId>()
      .notNull()
      .references(() => rtDoc.id, { onDelete: 'cascade' }),
    item: text('item').notNull(),
    userId: text('user_id').$type<UserId>().notNull(),
    at: instant('at').notNull(),
  },
  (table) => [primaryKey({ columns: [table.docId, table.item, table.userId] })],
)

/** The board as it stood, named; the states are in `rt_snapshot` under kind `version`. */
export const keptVersion = pgTable(
  'kept_version',
  {
    id: uuid('id').$type<VersionId>().primaryKey(),
    shootId: uuid('shoot_id')
      .$type<ShootId>()
      .notNull()
      .references(() => shoot.id, { onDelete: 'cascade' }),
    name: text('name').notNull(),
    userId: text('user_id').$type<UserId>().notNull(),
    at: instant('at').notNull().defaultNow(),
    boardSeq: bigint('board_seq', { mode: 'number' }).notNull(),
    planSeq: bigint('plan_seq', { mode: 'number' }).notNull(),
    /** Name of the version that was taken back right after this one was kept by itself; null when a person kept it. */
    takingBack: text('taking_back'),
  },
  (table) => [index('kept_version_shoot').on(table.shootId, table.at)],
)
