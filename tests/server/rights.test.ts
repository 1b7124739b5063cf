import { eq } from 'drizzle-orm'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { DEFAULT_MINUTES } from '#shared/domain/plan/minutes.ts'
import { STARTER_KIT } from '#shared/domain/kit/starter.ts'
import { sitterPrivate } from '#server/db/schema/private.ts'
import { rtUpdate } from '#server/db/schema/realtime.ts'
import { type TestApp, startTestApp } from '#tests/support/app.ts'
import {
  EVERYBODY,
  type FullWorld,
  SECRETS,
  type Who,
  RECIPE,
  makeFullWorld,
  pictureForm,
  sheetForm,
} from '#tests/support/rights-world.ts'
import { routesOf } from '#tests/support/routes.ts'

/** Status for everybody, in the order of EVERYBODY. */
type Expected = Readonly<Record<Who, number>>

type Row = {
  route: string
  expected: Expected
  path: (world: FullWorld, who: Who) => string
  body?: (world: FullWorld, who: Who) => unknown
  /** A success changes what the next cell meets, so every success gets a world of its own. */
  isFresh?: boolean
}

type ShootRole = 'photographer' | 'stylist' | 'client' | 'crew'

const all = (status: number): Expected => ({
  'signed out': status,
  stranger: status,
  photographer: status,
  stylist: status,
  client: status,
  crew: status,
  removed: status,
  invited: status,
  'studio member': status,
})

/** Who may get `ok`, other roles of the shoot 403, and to everybody else the shoot does not exist. */
const inShoot = (may: readonly ShootRole[], ok = 200): Expected => {
  const of = (role: ShootRole) => (may.includes(role) ? ok : 403)
  return {
    ...all(404),
    'signed out': 401,
    photographer: of('photographer'),
    stylist: of('stylist'),
    client: of('client'),
    crew: of('crew'),
  }
}
const anyRole: readonly ShootRole[] = ['photographer', 'stylist', 'client', 'crew']
const lead: readonly ShootRole[] = ['photographer']
const planners: readonly ShootRole[] = ['photographer', 'stylist']
const pinners: readonly ShootRole[] = ['photographer', 'stylist', 'client']

/** The world's photographer owns the studio; a role in a shoot gives nothing in it. */
const inStudio = (owner: number, member: number): Expected => ({
  ...all(404),
  'signed out': 401,
  photographer: owner,
  'studio member': member,
})
const signedIn: Expected = { ...all(200), 'signed out': 401 }

const shoot =
  (rest = '') =>
  ({ shootId }: FullWorld) =>
    `/api/shoots/${shootId}${rest}`
const studio =
  (rest = '') =>
  ({ studioId }: FullWorld) =>
    `/api/studios/${studioId}${rest}`
const lens = STARTER_KIT[0]
const ownComment = (world: FullWorld, who: Who) =>
  who === 'stylist' || who === 'client' || who === 'crew' ? world.commentIds[who] : world.commentIds.photographer
const me = (world: FullWorld, who: Who) => world.who[who]?.userId ?? 'nobody'

const TABLE: readonly Row[] = [
  { route: 'GET /healthz', expected: all(200), path: () => '/healthz' },
  { route: 'GET /readyz', expected: all(200), path: () => '/readyz' },
  // On this machine; from elsewhere it is not there for anybody (tests/server/http/metrics.test.ts).
  { route: 'GET /metrics', expected: all(200), path: () => '/metrics' },
  { route: 'GET /{*any}', expected: all(200), path: () => '/shoots/x/board' },
  // What of the sign-in library is open has its own test; here, that an unlisted part of it is not.
  { route: 'ALL /api/auth/*path', expected: all(404), path: () => '/api/auth/list-accounts' },
  { route: 'GET /api/session', expected: signedIn, path: () => '/api/session' },
  { route: 'GET /api/letters', expected: all(200), path: () => '/api/letters' },

  { route: 'POST /api/studios', expected: signedIn, path: () => '/api/studios', body: () => ({ name: 'Another' }) },
  {
    route: 'PATCH /api/studios/:studioId',
    expected: inStudio(200, 403),
    path: studio(),
    body: () => ({ name: 'Harbour Studio' }),
  },
  { route: 'GET /api/studios/:studioId/people', expected: inStudio(200, 200), path: studio('/people') },
  {
    route: 'PATCH /api/studios/:studioId/people/:userId',
    expected: inStudio(200, 403),
    path: (w) => studio(`/people/${w.studioMember.userId}`)(w),
    body: () => ({ role: 'member' }),
  },
  {
    route: 'DELETE /api/studios/:studioId/people/:userId',
    expected: inStudio(204, 204),
    path: (w) => studio(`/people/${w.studioMember.userId}`)(w),
    isFresh: true,
  },
  {
    route: 'POST /api/studios/:studioId/invitations',
    expected: inStudio(200, 403),
    path: studio('/invitations'),
    body: () => ({ email: 'again@example.com', role: 'member' }),
  },
  {
    route: 'DELETE /api/studios/:studioId/invitations/:invitationId',
    expected: inStudio(200, 403),
    path: (w) => studio(`/invitations/${w.studioInvitationId}`)(w),
  },
  { route: 'GET /api/studios/:studioId/minutes', expected: inStudio(200, 200), path: studio('/minutes') },
  {
    route: 'PUT /api/studios/:studioId/minutes',
    expected: inStudio(200, 200),
    path: studio('/minutes'),
    body: () => ({ minutes: DEFAULT_MINUTES }),
  },
  { route: 'GET /api/studios/:studioId/kit', expected: inStudio(200, 200), path: studio('/kit') },
  { route: 'POST /api/studios/:studioId/kit', expected: inStudio(200, 200), path: studio('/kit'), body: () => lens },
  {
    route: 'POST /api/studios/:studioId/kit/import',
    expected: inStudio(200, 200),
    path: studio('/kit/import'),
    body: () => ({ rows: [{ id: '00000000-0000-4000-8000-000000000001', version: null, input: lens }] }),
  },
  {
    route: 'PUT /api/studios/:studioId/kit/:kitId',
    expected: inStudio(200, 200),
    path: (w) => studio(`/kit/${w.kitId}`)(w),
    body: () => ({ ...lens, version: 1 }),
    isFresh: true,
  },
  {
    route: 'DELETE /api/studios/:studioId/kit/:kitId',
    expected: inStudio(200, 200),
    path: (w) => studio(`/kit/${w.kitId}`)(w),
  },
  { route: 'GET /api/studios/:studioId/recipes', expected: inStudio(200, 200), path: studio('/recipes') },
  {
    route: 'POST /api/studios/:studioId/recipes',
    expected: inStudio(200, 200),
    path: studio('/recipes'),
    body: () => ({ recipe: RECIPE }),
  },
  {
    route: 'PATCH /api/studios/:studioId/recipes/:recipeId',
    expected: inStudio(200, 200),
    path: (w) => studio(`/recipes/${w.recipeId}`)(w),
    body: () => ({ name: 'Quiet morning' }),
  },
  {
    route: 'DELETE /api/studios/:studioId/recipes/:recipeId',
    expected: inStudio(200, 200),
    path: (w) => studio(`/recipes/${w.recipeId}`)(w),
  },

  { route: 'GET /api/shoots', expected: signedIn, path: () => '/api/shoots' },
  {
    route: 'POST /api/shoots',
    expected: inStudio(200, 200),
    path: () => '/api/shoots',
    body: ({ studioId }) => ({ studioId, title: 'Another', zone: 'Europe/London' }),
  },
  { route: 'GET /api/shoots/:shootId', expected: inShoot(anyRole), path: shoot() },
  { route: 'DELETE /api/shoots/:shootId', expected: inShoot(lead, 204), path: shoot(), isFresh: true },
  {
    route: 'PATCH /api/shoots/:shootId/brief',
    expected: inShoot(lead),
    path: shoot('/brief'),
    body: () => ({ idea: 'Wind' }),
  },
  {
    route: 'PUT /api/shoots/:shootId/location',
    expected: inShoot(lead),
    path: shoot('/location'),
    body: () => ({ name: 'Old harbour' }),
  },
  {
    route: 'POST /api/shoots/:shootId/rooms',
    expected: inShoot(lead),
    path: shoot('/rooms'),
    body: () => ({ name: 'Quay' }),
  },
  {
    route: 'PUT /api/shoots/:shootId/rooms/:roomId',
    expected: inShoot(lead),
    path: (w) => shoot(`/rooms/${w.roomId}`)(w),
    body: () => ({ name: 'Net loft' }),
  },
  {
    route: 'DELETE /api/shoots/:shootId/rooms/:roomId',
    expected: inShoot(lead),
    path: (w) => shoot(`/rooms/${w.roomId}`)(w),
  },
  {
    route: 'POST /api/shoots/:shootId/deliverables',
    expected: inShoot(lead),
    path: shoot('/deliverables'),
    body: () => ({ title: 'Poster' }),
  },
  {
    route: 'PUT /api/shoots/:shootId/deliverables/:deliverableId',
    expected: inShoot(lead),
    path: (w) => shoot(`/deliverables/${w.deliverableId}`)(w),
    body: () => ({ title: 'Cover' }),
  },
  {
    route: 'DELETE /api/shoots/:shootId/deliverables/:deliverableId',
    expected: inShoot(lead),
    path: (w) => shoot(`/deliverables/${w.deliverableId}`)(w),
  },

  { route: 'GET /api/shoots/:shootId/people', expected: inShoot(anyRole), path: shoot('/people') },
  {
    route: 'PATCH /api/shoots/:shootId/people/:userId',
    expected: inShoot(lead),
    path: (w) => shoot(`/people/${w.crew.userId}`)(w),
    body: () => ({ role: 'crew' }),
  },
  {
    route: 'DELETE /api/shoots/:shootId/people/:userId',
    expected: { ...inShoot(lead, 204), crew: 204 },
    path: (w) => shoot(`/people/${w.crew.userId}`)(w),
    isFresh: true,
  },
  {
    route: 'POST /api/shoots/:shootId/invitations',
    expected: inShoot(lead),
    path: shoot('/invitations'),
    body: () => ({ email: 'third.hand@example.com', role: 'crew' }),
  },
  {
    route: 'POST /api/shoots/:shootId/invitations/:invitationId/resend',
    expected: inShoot(lead),
    path: (w) => shoot(`/invitations/${w.invitation.id}/resend`)(w),
    isFresh: true,
  },
  {
    route: 'DELETE /api/shoots/:shootId/invitations/:invitationId',
    expected: inShoot(lead),
    path: (w) => shoot(`/invitations/${w.invitation.id}`)(w),
    isFresh: true,
  },
  {
    route: 'GET /api/invitations/:token',
    expected: all(200),
    path: ({ invitation }) => `/api/invitations/${invitation.token}`,
  },
  {
    route: 'POST /api/invitations/:token/accept',
    // Whoever holds the letter and is signed in as nobody, or as the person it is for.
    expected: { ...all(409), 'signed out': 200, invited: 200 },
    path: ({ invitation }) => `/api/invitations/${invitation.token}/accept`,
    body: () => ({ name: 'Ivy Nash' }),
    isFresh: true,
  },

  { route: 'GET /api/shoots/:shootId/kit', expected: inShoot(anyRole), path: shoot('/kit') },
  { route: 'GET /api/shoots/:shootId/recipes', expected: inShoot(anyRole), path: shoot('/recipes') },
  {
    route: 'POST /api/shoots/:shootId/setups/:setupId/recipe-sheet',
    expected: inShoot(anyRole),
    path: (w) => shoot(`/setups/${w.setupId}/recipe-sheet`)(w),
    body: () => sheetForm(),
  },
  { route: 'GET /api/shoots/:shootId/comments', expected: inShoot(anyRole), path: shoot('/comments') },
  {
    route: 'POST /api/shoots/:shootId/comments',
    expected: inShoot(anyRole),
    path: shoot('/comments'),
    body: ({ lookId }) => ({ subject: 'look', subjectId: lookId, text: 'Lovely' }),
  },
  {
    route: 'DELETE /api/shoots/:shootId/comments/:commentId',
    expected: inShoot(anyRole),
    path: (w, who) => shoot(`/comments/${ownComment(w, who)}`)(w),
  },

  { route: 'GET /api/shoots/:shootId/sizes', expected: inShoot(planners), path: shoot('/sizes') },
  {
    route: 'PUT /api/shoots/:shootId/sizes/:sitterId',
    expected: inShoot(planners),
    path: (w) => shoot(`/sizes/${w.sitterId}`)(w),
    body: () => ({ sizes: SECRETS.sizes, contact: SECRETS.contact }),
  },
  { route: 'GET /api/shoots/:shootId/piece-costs', expected: inShoot(planners), path: shoot('/piece-costs') },
  {
    route: 'PUT /api/shoots/:shootId/piece-costs/:pieceId',
    expected: inShoot(planners),
    path: (w) => shoot(`/piece-costs/${w.pieceId}`)(w),
    body: () => ({ cost: { minor: SECRETS.cost, currency: 'GBP' }, size: SECRETS.size }),
  },
  { route: 'GET /api/shoots/:shootId/private-note', expected: inShoot(lead), path: shoot('/private-note') },
  {
    route: 'PUT /api/shoots/:shootId/private-note',
    expected: inShoot(lead),
    path: shoot('/private-note'),
    body: () => ({ text: SECRETS.note }),
  },

  {
    route: 'PUT /api/shoots/:shootId/uploads/:uploadId',
    expected: inShoot(['photographer', 'stylist', 'client']),
    path: (w) => shoot(`/uploads/${w.uploadId}`)(w),
    body: () => pictureForm(),
  },
  {
    route: 'GET /api/uploads/:uploadId/:rendition',
    expected: inShoot(anyRole),
    path: ({ uploadId }) => `/api/uploads/${uploadId}/320`,
  },
  { route: 'GET /api/shoots/:shootId/sign-offs', expected: inShoot(anyRole), path: shoot('/sign-offs') },
  {
    route: 'POST /api/shoots/:shootId/looks/:lookId/sign-offs',
    expected: inShoot(['client']),
    path: (w) => shoot(`/looks/${w.lookId}/sign-offs`)(w),
    body: ({ fingerprint }) => ({ answer: 'signed off', fingerprint }),
  },

  { route: 'GET /api/shoots/:shootId/versions', expected: inShoot(anyRole), path: shoot('/versions') },
  {
    route: 'POST /api/shoots/:shootId/versions',
    expected: inShoot(pinners),
    path: shoot('/versions'),
    body: () => ({ name: 'Before the harbour' }),
  },
  {
    route: 'GET /api/shoots/:shootId/versions/:versionId',
    expected: inShoot(anyRole),
    path: (w) => shoot(`/versions/${w.versionId}`)(w),
  },
  {
    route: 'PATCH /api/shoots/:shootId/versions/:versionId',
    expected: inShoot(pinners),
    path: (w) => shoot(`/versions/${w.versionId}`)(w),
    body: () => ({ name: 'Before the quay' }),
  },
  {
    route: 'DELETE /api/shoots/:shootId/versions/:versionId',
    expected: inShoot(pinners),
    path: (w) => shoot(`/versions/${w.versionId}`)(w),
    isFresh: true,
  },
  {
    route: 'POST /api/shoots/:shootId/versions/:versionId/take-back',
    expected: inShoot(pinners),
    path: (w) => shoot(`/versions/${w.versionId}/take-back`)(w),
  },
]

let app: TestApp
let shared: FullWorld
beforeAll(async () => {
  app = await startTestApp()
  shared = await makeFullWorld(app)
})
afterAll(() => app.close())

async function statusOf(row: Row, world: FullWorld, who: Who): Promise<number> {
  const client = await app.clientOf(world.who[who])
  const method = row.route.split(' ')[0] ?? ''
  const body = await row.body?.(world, who)
  return (await client.send(method === 'ALL' ? 'GET' : method, row.path(world, who), body)).status
}

describe('the table of rights', () => {
  it('has every route of the app, and no other', () => {
    expect(TABLE.map(({ route }) => route).sort()).toEqual(routesOf(app.app))
  })

  it.each(TABLE)('holds for $route', async (row) => {
    const found: Partial<Record<Who, number>> = {}
    for (const who of EVERYBODY) {
      const isOk = row.expected[who] < 300
      const world = row.isFresh && isOk ? await makeFullWorld(app) : shared
      found[who] = await statusOf(row, world, who)
    }
    expect(found).toEqual(row.expected)
  })

  it('lets everybody leave a shoot by themselves, and nobody send another away', async () => {
    const world = await makeFullWorld(app)
    for (const who of ['stylist', 'client', 'crew'] as const) {
      const client = await app.clientOf(world[who])
      const path = `/api/shoots/${world.shootId}/people`
      expect((await client.send('DELETE', `${path}/${world.photographer.userId}`)).status).toBe(403)
      expect((await client.send('DELETE', `${path}/${me(world, who)}`)).status).toBe(204)
      expect((await client.get(path)).status).toBe(404)
    }
  })

  it('shows a person the shoots they have a role in and no other', async () => {
    const shown: Partial<Record<Who, number>> = {}
    const world = await makeFullWorld(app)
    for (const who of EVERYBODY.slice(1)) {
      const { text } = await (await app.clientOf(world.who[who])).get('/api/shoots')
      shown[who] = text.split(world.shootId).length - 1
    }
    expect(shown).toEqual({
      stranger: 0,
      photographer: 1,
      stylist: 1,
      client: 1,
      crew: 1,
      removed: 0,
      invited: 0,
      'studio member': 0,
    })
  })
})

describe('what is private', () => {
  const words = Object.values(SECRETS).map(String)

  it('is in no document', async () => {
    const rows = await app.db.select({ update: rtUpdate.update }).from(rtUpdate)
    expect(rows.length).toBeGreaterThanOrEqual(5)
    for (const { update } of rows) {
      const bytes = Buffer.from(update)
      for (const word of words) expect(bytes.includes(word)).toBe(false)
    }
    // The documents are the world's: what was written into them is there.
    expect(rows.some(({ update }) => Buffer.from(update).includes('Ada Wren'))).toBe(true)
  })

  it('is in no answer to a role without the right', async () => {
    const mayRead: Record<ShootRole, string[]> = {
      photographer: words,
      stylist: words.filter((word) => word !== SECRETS.note),
      client: [],
      crew: [],
    }
    for (const role of anyRole) {
      const client = await app.clientOf(shared.who[role])
      const seen = new Set<string>()
      for (const row of TABLE.filter(({ route }) => route.startsWith('GET /api/'))) {
        const { text } = await client.get(row.path(shared, role))
        for (const word of words) if (text.includes(word)) seen.add(word)
      }
      expect([role, [...seen].sort()]).toEqual([role, [...mayRead[role]].sort()])
    }
  })

  it('shows e-mails as the role allows: all, the photographer’s, or one’s own', async () => {
    const seenBy = async (role: ShootRole) => {
      const { body } = await (await app.clientOf(shared.who[role])).get(`/api/shoots/${shared.shootId}/people`)
      const { people, invitations } = body as {
        people: { role: string; email: string | null }[]
        invitations: unknown[]
      }
      return {
        roles: people.flatMap((person) => (person.email === null ? [] : [person.role])),
        invitations: invitations.length,
      }
    }
    expect(await seenBy('photographer')).toEqual({
      roles: ['photographer', 'stylist', 'client', 'crew'],
      invitations: 2,
    })
    expect(await seenBy('stylist')).toEqual({ roles: ['photographer', 'stylist', 'client', 'crew'], invitations: 0 })
    expect(await seenBy('client')).toEqual({ roles: ['photographer', 'client'], invitations: 0 })
    expect(await seenBy('crew')).toEqual({ roles: ['crew'], invitations: 0 })
  })

  it('goes with the shoot when that is removed', async () => {
    const world = await makeFullWorld(app)
    await (await app.clientOf(world.photographer)).send('DELETE', `/api/shoots/${world.shootId}`)
    expect(await app.db.select().from(sitterPrivate).where(eq(sitterPrivate.shootId, world.shootId))).toEqual([])
  })
})
