import { randomUUID } from 'node:crypto'
import { request } from 'node:http'
import { eq, isNotNull } from 'drizzle-orm'
import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest'
import { connectDatabase } from '#server/db/client.ts'
import { mail } from '#server/db/schema/mail.ts'
import { type AppProcess, startAppProcess } from '#tests/support/app-process.ts'
import { type Client, clientFor } from '#tests/support/client.ts'
import { createTestDatabase } from '#tests/support/database.ts'
import type { TestDatabase } from '#tests/support/template.ts'

let database: TestDatabase
let server: AppProcess
beforeAll(async () => {
  database = await createTestDatabase()
  server = await startAppProcess({ databaseUrl: database.url })
})
afterAll(async () => {
  await server.kill()
  await database.drop()
})

/** A browser at the process's own address. */
function visitor(cookie = ''): Client {
  const client = clientFor(server.url, cookie)
  return { ...client, send: (method, path, body) => client.send(method, path, body, { origin: server.url }) }
}

const email = `pia.${randomUUID()}@example.com`
const password = 'linen and lamplight'

describe('the process', () => {
  it('serves accounts, studios and shoots, sends letters to its own catcher, and drains with exit code 0', async () => {
    const pia = visitor()
    await pia.send('POST', '/api/auth/sign-up/email', { email, password, name: 'Pia Lund' })
    const studio = await pia.send('POST', '/api/studios', { name: 'Harbour' })
    const { id: studioId } = studio.body as { id: string }
    const { id } = (await pia.send('POST', '/api/shoots', { studioId, title: 'Salt', zone: 'Europe/London' })).body as {
      id: string
    }
    expect((await pia.get('/api/shoots')).body).toMatchObject({ shoots: [{ id, title: 'Salt' }] })

    await pia.send('POST', `/api/shoots/${id}/invitations`, { email: 'gwen@example.com', role: 'client' })
    const { letters } = (await visitor().get('/api/letters')).body as { letters: { to: string; links: string[] }[] }
    const link = new URL(letters.find(({ to }) => to === 'gwen@example.com')?.links[0] ?? '')
    expect(link.origin).toBe(server.url)
    const { db, pool } = connectDatabase(database.url, () => undefined)
    await vi.waitFor(
      async () =>
        expect(await db.select({ to: mail.to }).from(mail).where(isNotNull(mail.sentAt))).toEqual([
          { to: 'gwen@example.com' },
        ]),
      { timeout: 10_000, interval: 100 },
    )
    expect(await db.select({ failed: mail.failed }).from(mail).where(eq(mail.to, 'gwen@example.com'))).toEqual([
      { failed: null },
    ])
    await pool.end()

    const gwen = visitor()
    const token = link.pathname.split('/').at(-1)
    expect((await gwen.send('POST', `/api/invitations/${token}/accept`, { name: 'Gwen' })).body).toEqual({
      to: `/shoots/${id}/board`,
    })
    expect((await gwen.get(`/api/shoots/${id}`)).body).toMatchObject({ role: 'client' })

    expect(await server.stop()).toBe(0)
    server = await startAppProcess({ databaseUrl: database.url, port: server.port })
    // Another process, the same sessions and the same shoot.
    expect((await visitor(pia.cookie()).get(`/api/shoots/${id}`)).body).toMatchObject({ role: 'photographer' })
  })

  it('closes what wants to be a socket anywhere but at a document', async () => {
    const { hostname, port } = new URL(server.url)
    const ended = await new Promise<string>((resolve) => {
      const ask = request({
        hostname,
        port,
        path: '/elsewhere',
        headers: { connection: 'Upgrade', upgrade: 'websocket' },
      })
      ask.on('upgrade', () => resolve('upgraded'))
      ask.on('response', () => resolve('answered'))
      ask.on('error', () => resolve('closed'))
      ask.end()
    })
    expect(ended).toBe('closed')
  })
})
