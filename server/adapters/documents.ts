import type * as Y from 'yjs'
import type { DocId, ShootId, UserId } from '#shared/ids.ts'
import type { DocumentKind } from '#shared/realtime/documents.ts'
import type { Tx } from '#server/db/client.ts'

/**
 * How verbs reach a shoot's documents; implemented by server/realtime. Never written around: a writer goes through
 * the same room as everybody, so that a reader never sees a state that the log has not.
 */
export type Documents = {
  /** Puts a new document with its first content (encoded once) as seq 1, in the transaction that makes the shoot. */
  create(tx: Tx, shootId: ShootId, kind: DocumentKind, encodedState: Uint8Array): Promise<DocId>
  /**
   * The document brought up to the head of the log with its queue committed; `seq` is that head. The document is the
   * room's own: read it, do not keep it, do not change it.
   */
  read<T>(shootId: ShootId, kind: DocumentKind, fn: (doc: Y.Doc, seq: number) => T): Promise<T>
  /** Changes a document through its room as the given person; resolves when the change is durable. */
  write(shootId: ShootId, kind: DocumentKind, userId: UserId, fn: (doc: Y.Doc) => void): Promise<void>
  /** Tells everyone with the shoot open that these query keys changed (message 103 on the board socket). */
  announce(shootId: ShootId, queryKeys: readonly (readonly string[])[]): void
}
