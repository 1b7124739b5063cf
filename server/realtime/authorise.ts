import type { IncomingHttpHeaders, IncomingMessage } from 'node:http'
import { and, eq } from 'drizzle-orm'
import type { Role } from '#shared/access/roles.ts'
import { type ShootId, shootIdSchema, userIdSchema } from '#shared/ids.ts'
import { DOCUMENT_KINDS, type DocumentKind } from '#shared/realtime/documents.ts'
import { CLOSE, parseDocumentPath } from '#shared/realtime/protocol.ts'
import type { Db } from '#server/db/client.ts'
import { rtDoc } from '#server/db/schema/realtime.ts'
import { shootMember } from '#server/db/schema/shoots.ts'
import type { Person } from './connection.ts'
import type { Place } from './room.ts'

/** Who is signed in by these headers. `sessionId` is the row in `session`. */
export type Authenticate = (
  headers: IncomingHttpHeaders,
) => Promise<{ userId: string; name: string; sessionId: string; expiresAtMs: number } | null>

export type Admission =
  | { kind: 'http'; status: 401 | 403 }
  | { kind: 'close'; code: number; why: string; person: Person }
  | { kind: 'admitted'; person: Person; place: Place; role: Role; epoch: number; schema: number; frozen: string | null }

/**
 * Decides about an upgrade before a socket exists.
 *
 * A browser cannot read the HTTP status of a refused upgrade, so a person who is signed in gets a close code instead.
 * A stranger, a removed member who comes back, a studio's member without a role in the shoot, and anybody asking for
 * what does not exist all get the same one, 4404: to a stranger a shoot does not exist. Only somebody who is connected
 * while being removed is told 4403.
 */
export async function admit(
  request: IncomingMessage,
  outside: { db: Db; auth: Authenticate; trustedOrigins: readonly string[] },
): Promise<Admission> {
  // Cookies travel with websockets from any page, so the page must be ours.
  if (!request.headers.origin || !outside.trustedOrigins.includes(request.headers.origin))
    return { kind: 'http', status: 403 }
  const session = await outside.auth(request.headers)
  if (!session || session.expiresAtMs <= Date.now()) return { kind: 'http', status: 401 }
  const { name, sessionId, expiresAtMs } = session
  const person: Person = { userId: userIdSchema.parse(session.userId), name, sessionId, expiresAtMs }
  const query = new URLSearchParams(request.url?.split('?')[1])
  // A page that was opened by somebody else holds their edits: they are not to be sent in this person's name.
  const meant = query.get('user')
  if (meant !== null && meant !== person.userId)
    return { kind: 'close', code: CLOSE.signedOut, why: 'somebody else is signed in', person }
  const unknown: Admission = { kind: 'close', code: CLOSE.unknown, why: 'no such document', person }
  const path = parseDocumentPath((request.url ?? '').split('?')[0] ?? '')
  const shootId = shootIdSchema.safeParse(path?.shootId)
  if (!path || !shootId.success || !isKind(path.kind)) return unknown
  const found = await findDocument(outside.db, shootId.data, path.kind, person)
  if (!found) return unknown
  // Before a byte of it is read: what a browser kept of an earlier epoch would bring back what was put away.
  const epoch = query.get('epoch')
  if (epoch !== null && Number(epoch) !== found.epoch) {
    return { kind: 'close', code: CLOSE.epoch, why: 'the document is of another epoch', person }
  }
  return { kind: 'admitted', person, ...found }
}

async function findDocument(db: Db, shootId: ShootId, kind: DocumentKind, person: Person) {
  const [row] = await db
    .select({
      docId: rtDoc.id,
      epoch: rtDoc.epoch,
      schema: rtDoc.schema,
      frozen: rtDoc.frozen,
      role: shootMember.role,
    })
    .from(rtDoc)
    .innerJoin(shootMember, and(eq(shootMember.shootId, rtDoc.shootId), eq(shootMember.userId, person.userId)))
    .where(and(eq(rtDoc.shootId, shootId), eq(rtDoc.kind, kind)))
  if (!row) return undefined
  const { docId, epoch, schema, frozen, role } = row
  return { place: { docId, shootId, kind }, role, epoch, schema, frozen }
}

function isKind(kind: string): kind is DocumentKind {
  return DOCUMENT_KINDS.some((known) => known === kind)
}
