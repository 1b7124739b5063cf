import { once } from 'node:events'
import { request as httpRequest } from 'node:http'
import { type AddressInfo, createServer } from 'node:net'
import { drizzle } from 'drizzle-orm/node-postgres'
import pg from 'pg'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { errorEnvelopeSchema } from '#shared/api/errors.ts'
import { connectDatabase } from '#server/db/client.ts'
import * as schema from '#server/db/schema/index.ts'
import { startProxy } from '#tests/realtime/support/proxy.ts'
import { until } from '#tests/realtime/support/client.ts'
import { type TestApp, startTestApp } from '#tests/support/app.ts'
import { type Client, clientFor } from '#tests/support/client.ts'
import { createTestDatabase } from '#tests/support/database.ts'
import { type World, makeWorld } from '#tests/support/factories.ts'

let app: TestApp
let world: World
let lead: Client
beforeAll(async () => {
  app = await startTestApp()
  world = await makeWorld(app)
  lead = await app.clientOf(world.photographer)
})
afterAll(() => app.close())

/** Sends an address exactly as written, which fetch would tidy up. */
function raw(path: string, headers: Record<string, string> = {}): Promise<{ status: number; text: string }> {
  const { hostname, port } = new URL(app.url)
  return new Promise((resolve, reject) => {
    httpRequest({ hostname, port, path, headers }, (response) => {
      let text = ''
      response.on('data', (chunk) => (text += String(chunk)))
      response.on('end', () => resolve({ status: response.statusCode ?? 0, text }))
    })
      .on('error', reject)
      .end()
  })
}

const refusal = (body: unknown) => errorEnvelopeSchema.parse(body).error

describe('the pages', () => {
  it('are one page at every address of the program', async () => {
    const client = clientFor(app.url)
    for (const path of ['/', '/sign-in', '/shoots/1/board', '/join/abc', '/link/abc', '/letters']) {
      const answer = await client.get(path)
      expect([path, answer.status, answer.text]).toEqual([path, 200, '<!doctype html><title>Sconce</title>'])
      expect(answer.headers.get('cache-control')).toBe('no-cache')
    }
  })

  it('are not what a missing file, socket or call is answered with', async () => {
    const client = clientFor(app.url)
    for (const path of ['/assets/gone.js', '/gone.png', '/rt/x/board', '/../../package.json']) {
      const answer = await raw(path)
      expect([path, answer.status]).toEqual([path, 404])
      expect(answer.text).not.toContain('<!doctype')
    }
    const call = await client.get('/api/gone')
    expect(call.status).toBe(404)
    expect(refusal(call.body)).toEqual({ code: 'NOT_FOUND', message: 'There is nothing at this address.' })
  })
})

describe('the headers', () => {
  it('let no script run but our own files, and nobody frame us', async () => {
    const { headers } = await clientFor(app.url).get('/')
    const policy = headers.get('content-security-policy') ?? ''
    expect(policy).toContain("script-src 'self';")
    expect(policy).toContain("script-src-attr 'none'")
    expect(policy).toContain("frame-ancestors 'none'")
    expect(policy).toContain("object-src 'none'")
    expect(policy).not.toContain('upgrade-insecure-requests')
    expect(headers.get('strict-transport-security')).toBeNull()
    expect(headers.get('x-content-type-options')).toBe('nosniff')
    expect(headers.get('referrer-policy')).toBe('no-referrer')
    expect(headers.get('x-powered-by')).toBeNull()
  })

  it('keep answers of the API out of every cache', async () => {
    expect((await lead.get('/api/session')).headers.get('cache-control')).toBe('no-store')
  })
})

describe('a change', () => {
  it.each([{ origin: 'https://elsewhere.example' }, { origin: 'null' }, { origin: '' }])(
    'is refused from $origin',
    async (headers) => {
      for (const [method, path] of [
        ['POST', '/api/studios'],
        ['DELETE', `/api/shoots/${world.shootId}`],
        ['POST', '/api/auth/sign-out'],
      ] as const) {
        const answer = await lead.send(method, path, { name: 'x' }, headers)
        expect([path, answer.status]).toEqual([path, 403])
        expect(refusal(answer.body)).toMatchObject({
          code: 'WRONG_ORIGIN',
          message: expect.stringContaining('nothing was changed'),
        })
      }
      expect((await lead.get(`/api/shoots/${world.shootId}`)).status).toBe(200)
    },
  )
})

describe('what is sent', () => {
  it('is refused when it is not JSON, in a sentence', async () => {
    const broken = await lead.send('POST', '/api/studios', '{"name":', { 'content-type': 'application/json' })
    const plain = await lead.send('POST', '/api/studios', 'name=Harbour', {
      'content-type': 'application/x-www-form-urlencoded',
    })
    for (const answer of [broken, plain]) {
      expect(answer.status).toBe(400)
      expect(refusal(answer.body)).toEqual({
        code: 'NOT_JSON',
        message: 'What was sent is not JSON. Nothing was changed.',
      })
    }
  })

  it('is refused above 1 MB', async () => {
    const answer = await lead.send('POST', '/api/studios', { name: 'x'.repeat(1_100_000) })
    expect(answer.status).toBe(413)
    expect(refusal(answer.body)).toEqual({
      code: 'TOO_LARGE',
      message: 'This is more than one request may carry (1 MB). Nothing was changed.',
    })
  })

  it('is refused in another encoding than UTF-8', async () => {
    const answer = await lead.send('POST', '/api/studios', '{}', { 'content-type': 'application/json; charset=latin1' })
    expect([answer.status, refusal(answer.body).code]).toEqual([415, 'UNSUPPORTED'])
  })

  it('comes back with every issue and its path', async () => {
    const answer = await lead.send('PUT', `/api/shoots/${world.shootId}/location`, {
      name: 7,
      latitude: 91,
      longitude: 'east',
    })
    expect(answer.status).toBe(400)
    expect(refusal(answer.body).code).toBe('BAD_REQUEST')
    expect(refusal(answer.body).message).toBe(
      'Some of what was sent does not fit. Nothing was changed; see what is marked.',
    )
    expect(
      refusal(answer.body)
        .issues?.map(({ path }) => path)
        .sort(),
    ).toEqual(['latitude', 'longitude', 'name'])
    const none = await lead.send('POST', '/api/studios')
    expect([none.status, refusal(none.body).code]).toEqual([400, 'BAD_REQUEST'])
    const list = await lead.send('POST', '/api/studios', [1])
    expect([list.status, refusal(list.body).code]).toEqual([400, 'BAD_REQUEST'])
  })

  it('names the place inside what was sent', async () => {
    const answer = await lead.send('PUT', `/api/shoots/${world.shootId}/piece-costs/${world.shootId}`, {
      cost: { minor: -1, currency: 'pounds' },
    })
    expect(
      refusal(answer.body)
        .issues?.map(({ path }) => path)
        .sort(),
    ).toEqual(['cost.currency', 'cost.minor'])
  })

  it('may not hold a character that the database cannot', async () => {
    const answer = await lead.send('PATCH', `/api/shoots/${world.shootId}/brief`, { idea: 'a\u0000b' })
    expect(answer.status).toBe(400)
    expect(refusal(answer.body)).toMatchObject({
      code: 'BAD_REQUEST',
      message: expect.stringContaining('a character that cannot be kept'),
    })
  })
})

describe('an id', () => {
  it('that is none is an address that does not exist', async () => {
    for (const id of ['1', 'not-an-id', `${world.shootId}x`, "1' or '1'='1"]) {
      const answer = await lead.get(`/api/shoots/${encodeURIComponent(id)}`)
      expect([id, answer.status]).toEqual([id, 404])
    }
    expect((await raw('/api/shoots/%E0%A4%A', { cookie: lead.cookie() })).status).toBe(404)
  })

  it('of somebody else’s shoot or studio does not exist', async () => {
    const other = await makeWorld(app)
    const stranger = await app.clientOf(other.photographer)
    const shoot = await stranger.get(`/api/shoots/${world.shootId}`)
    expect(shoot.status).toBe(404)
    expect(refusal(shoot.body)).toEqual({
      code: 'NOT_FOUND',
      message: 'There is no such shoot, or you do not belong to it.',
    })
    const room = await stranger.send('PUT', `/api/shoots/${other.shootId}/rooms/${world.shootId}`, { name: 'x' })
    expect(refusal(room.body)).toMatchObject({
      code: 'NOT_FOUND',
      message: expect.stringContaining('This room is gone'),
    })
    const studio = await stranger.send('POST', '/api/shoots', {
      studioId: world.studioId,
      title: 'x',
      zone: 'Europe/London',
    })
    expect(refusal(studio.body)).toEqual({
      code: 'NOT_FOUND',
      message: 'There is no such studio, or you do not belong to it.',
    })
  })

  it('is taken in capitals too', async () => {
    expect((await lead.get(`/api/shoots/${world.shootId.toUpperCase()}`)).status).toBe(200)
  })
})

describe('too many', () => {
  it('invitations in a minute are refused with the time to wait', async () => {
    const strict = await startTestApp({ limits: { invitationsPerMin: 2 } })
    try {
      const { photographer, shootId } = await makeWorld(strict)
      const client = await strict.clientOf(photographer)
      const statuses: number[] = []
      for (const name of ['a', 'b', 'c'])
        statuses.push(
          (
            await client.send('POST', `/api/shoots/${shootId}/invitations`, {
              email: `${name}@example.com`,
              role: 'crew',
            })
          ).status,
        )
      expect(statuses).toEqual([200, 200, 429])
      const answer = await client.send('POST', `/api/shoots/${shootId}/invitations`, {
        email: 'd@example.com',
        role: 'crew',
      })
      expect(refusal(answer.body)).toEqual({
        code: 'TOO_MANY',
        message: 'That is a great many invitations at once. Wait a minute and try again; nothing was changed.',
      })
      expect(Number(answer.headers.get('retry-after'))).toBeGreaterThan(0)
    } finally {
      await strict.close()
    }
  })
})

describe('the health of the process', () => {
  it('is good while it runs, and not ready once it is going down', async () => {
    let isServing = true
    const going = await startTestApp({ isServing: () => isServing })
    try {
      const client = clientFor(going.url)
      expect((await client.get('/healthz')).body).toEqual({ ok: true })
      expect((await client.get('/readyz')).status).toBe(200)
      isServing = false
      expect((await client.get('/healthz')).status).toBe(200)
      expect((await client.get('/readyz')).status).toBe(503)
    } finally {
      await going.close()
    }
  })
})

describe('readiness', () => {
  it('is gone while the database is away and back with it', async () => {
    const database = await createTestDatabase()
    const way = await startProxy(database.url)
    const { db, pool } = connectDatabase(way.url, () => undefined)
    const cut = await startTestApp({ db })
    try {
      const client = clientFor(cut.url)
      expect((await client.get('/readyz')).status).toBe(200)
      way.cut()
      const answer = await client.get('/readyz')
      expect([answer.status, answer.body]).toEqual([503, { ok: false }])
      expect((await client.get('/healthz')).status).toBe(200)
      way.mend()
      await until(async () => (await client.get('/readyz')).status === 200)
    } finally {
      await cut.close()
      await pool.end()
      await way.close()
      await database.drop()
    }
  })

  it('does not wait for a database that takes connections and says nothing', async () => {
    const silent = createServer((socket) => socket.on('error', () => undefined))
    await once(silent.listen(0, '127.0.0.1'), 'listening')
    const { port } = silent.address() as AddressInfo
    // Waits for ever by itself: without a bound of the route's own there is no answer.
    const pool = new pg.Pool({ connectionString: `postgres://nobody@127.0.0.1:${port}/none`, max: 1 })
    pool.on('error', () => undefined)
    const mute = await startTestApp({ db: drizzle(pool, { schema }) })
    try {
      expect((await clientFor(mute.url).get('/readyz')).status).toBe(503)
    } finally {
      await mute.close()
      silent.close()
    }
  })
})

describe('letters', () => {
  it('are shown to this machine only', async () => {
    const client = clientFor(app.url)
    expect((await client.get('/api/letters')).status).toBe(200)
    expect((await raw('/api/letters', { host: 'letters.example' })).status).toBe(404)
    expect((await raw('/api/letters', { 'x-forwarded-for': '203.0.113.9' })).status).toBe(404)
  })

  it('have no address where a mail server takes them', async () => {
    const real = await startTestApp({ letters: false })
    try {
      expect((await clientFor(real.url).get('/api/letters')).status).toBe(404)
    } finally {
      await real.close()
    }
  })
})
