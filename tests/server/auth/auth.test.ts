import { getAuthTables } from 'better-auth/db'
import { is } from 'drizzle-orm'
import { PgTable, getTableConfig } from 'drizzle-orm/pg-core'
import { eq } from 'drizzle-orm'
import pg from 'pg'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { makeAuth } from '#server/auth/auth.ts'
import { AUTH_CHANNEL } from '#server/db/notify-auth.ts'
import * as schema from '#server/db/schema/auth.ts'
import { type TestApp, startTestApp } from '#tests/support/app.ts'
import { TEST_ORIGIN, clientFor } from '#tests/support/client.ts'
import { makePerson, newestToken } from '#tests/support/factories.ts'

let app: TestApp
beforeAll(async () => {
  app = await startTestApp()
})
afterAll(() => app.close())

const PASSWORD = 'linen and lamplight'
const signUp = async (email: string) => {
  const client = clientFor(app.url)
  const answer = await client.send('POST', '/api/auth/sign-up/email', { email, password: PASSWORD, name: 'Rosa Finch' })
  expect(answer.status).toBe(200)
  return client
}
const refusal = (body: unknown) => (body as { error: { code: string; message: string; issues?: unknown[] } }).error

describe('the tables of accounts', () => {
  it('have the columns that the sign-in library wants, with its kinds and its rules', () => {
    const auth = makeAuth(app.db, {
      secret: 's'.repeat(40),
      publicUrl: TEST_ORIGIN,
      trustedOrigins: [],
      signInsPerMin: 1,
    })
    const wanted = Object.entries(getAuthTables(auth.options)).map(([name, table]) => [
      name,
      Object.entries(table.fields)
        .map(([key, field]) => [
          key,
          field.type === 'date' ? 'timestamp' : field.type === 'number' ? 'number' : String(field.type),
          field.required !== false,
          field.unique === true,
        ])
        .sort(),
    ])
    const ours = Object.entries(schema)
      .filter(([, table]) => is(table, PgTable))
      .map(([name, table]) => {
        const { columns } = getTableConfig(table)
        const byColumn = new Map(Object.entries(table).map(([key, column]) => [column, key]))
        return [
          name,
          columns
            .filter((column) => column.name !== 'id')
            .map((column) => [
              byColumn.get(column),
              column.getSQLType().startsWith('timestamp')
                ? 'timestamp'
                : /int/.test(column.getSQLType())
                  ? 'number'
                  : column.getSQLType() === 'text'
                    ? 'string'
                    : column.getSQLType(),
              column.notNull,
              column.isUnique,
            ])
            .sort(),
        ]
      })
    expect(Object.fromEntries(ours)).toEqual(Object.fromEntries(wanted))
  })
})

describe('makeAuth', () => {
  it('signs up, out and in again with a cookie that scripts cannot read and other sites do not send', async () => {
    const client = await signUp('rosa.1@example.com')
    expect((await client.get('/api/session')).status).toBe(200)
    expect((await client.send('POST', '/api/auth/sign-out')).status).toBe(200)
    expect((await client.get('/api/session')).status).toBe(401)
    const answer = await client.send('POST', '/api/auth/sign-in/email', {
      email: 'Rosa.1@Example.com',
      password: PASSWORD,
    })
    const cookie = answer.headers.getSetCookie().find((line) => line.startsWith('sconce.session_token=')) ?? ''
    expect(cookie).toMatch(/HttpOnly/i)
    expect(cookie).toMatch(/SameSite=Lax/i)
    expect(answer.body).toEqual({ ok: true })
    expect((await client.get('/api/session')).status).toBe(200)
  })

  it('takes a signed-out cookie for nobody, and a changed one too', async () => {
    const client = await signUp('rosa.2@example.com')
    const old = clientFor(app.url, client.cookie())
    const forged = clientFor(app.url, client.cookie().replace(/=(...)/, '=abc'))
    await client.send('POST', '/api/auth/sign-out')
    expect((await old.get('/api/session')).status).toBe(401)
    expect((await forged.get('/api/session')).status).toBe(401)
  })

  it('refuses a wrong password and an unknown address with the same sentence', async () => {
    await signUp('rosa.3@example.com')
    const client = clientFor(app.url)
    const wrong = await client.send('POST', '/api/auth/sign-in/email', {
      email: 'rosa.3@example.com',
      password: 'not the right one',
    })
    const unknown = await client.send('POST', '/api/auth/sign-in/email', {
      email: 'nobody@example.com',
      password: 'not the right one',
    })
    expect(wrong.status).toBe(401)
    expect(refusal(wrong.body)).toEqual({
      code: 'SIGNED_OUT',
      message: 'The e-mail or the password is not right. Try again, or have a letter sent that signs you in.',
    })
    expect(unknown.body).toEqual(wrong.body)
  })

  it('refuses a second account for an address, whatever its case', async () => {
    await signUp('rosa.4@example.com')
    const again = await clientFor(app.url).send('POST', '/api/auth/sign-up/email', {
      email: 'ROSA.4@example.com',
      password: PASSWORD,
      name: 'Rosa',
    })
    expect(again.status).toBe(409)
    expect(refusal(again.body)).toMatchObject({
      code: 'CONFLICT',
      message: expect.stringContaining('There is an account with this e-mail already'),
    })
  })

  it('refuses a short password, a wrong address and an empty name, and says which', async () => {
    const client = clientFor(app.url)
    const up = (body: object) =>
      client.send('POST', '/api/auth/sign-up/email', {
        email: 'rosa.5@example.com',
        password: PASSWORD,
        name: 'Rosa',
        ...body,
      })
    expect(refusal((await up({ password: '123456789' })).body)).toMatchObject({
      code: 'BAD_REQUEST',
      issues: [{ path: 'password' }],
    })
    expect(refusal((await up({ email: 'rosa' })).body)).toMatchObject({
      code: 'BAD_REQUEST',
      issues: [{ path: 'email' }],
    })
    expect(refusal((await up({ name: ' \n ' })).body)).toMatchObject({
      code: 'BAD_REQUEST',
      issues: [{ path: 'name', message: 'say what we call you' }],
    })
  })

  it('keeps a name on one line', async () => {
    const client = clientFor(app.url)
    await client.send('POST', '/api/auth/sign-up/email', {
      email: 'rosa.6@example.com',
      password: PASSWORD,
      name: 'Rosa\r\nBcc: all@example.com',
    })
    expect((await client.get('/api/session')).body).toMatchObject({ user: { name: 'Rosa Bcc: all@example.com' } })
  })

  it('signs in by letter once; opening the letter’s page uses nothing up', async () => {
    const person = await makePerson(app.db, 'Odo Lark')
    const client = clientFor(app.url)
    expect((await client.send('POST', '/api/auth/sign-in/magic-link', { email: person.email })).body).toEqual({
      ok: true,
    })
    const token = await newestToken(app.db, person.email)
    expect((await client.get(`/sign-in?letter=${token}`)).status).toBe(200)
    const verify = `/api/auth/magic-link/verify?token=${token}`
    expect((await client.get(verify)).status).toBe(200)
    expect((await client.get('/api/session')).body).toMatchObject({ user: { email: person.email } })
    const second = await clientFor(app.url).get(verify)
    expect(second.status).toBe(410)
    expect(refusal(second.body)).toEqual({
      code: 'GONE',
      message: 'This link has been used or is too old. Ask for a new letter.',
    })
  })

  it('sends no letter to an address without an account, and does not tell', async () => {
    const client = clientFor(app.url)
    expect((await client.send('POST', '/api/auth/sign-in/magic-link', { email: 'unknown@example.com' })).body).toEqual({
      ok: true,
    })
    expect(
      (await client.send('POST', '/api/auth/request-password-reset', { email: 'unknown@example.com' })).body,
    ).toEqual({ ok: true })
    await expect(newestToken(app.db, 'unknown@example.com')).rejects.toThrow('There is no letter')
  })

  it('sets a new password by letter once and signs everybody else out', async () => {
    const before = await signUp('rosa.7@example.com')
    const client = clientFor(app.url)
    await client.send('POST', '/api/auth/request-password-reset', { email: 'rosa.7@example.com' })
    const token = await newestToken(app.db, 'rosa.7@example.com')
    const reset = { token, newPassword: 'another lamp entirely' }
    expect((await client.send('POST', '/api/auth/reset-password', reset)).status).toBe(200)
    expect((await before.get('/api/session')).status).toBe(401)
    expect((await client.send('POST', '/api/auth/reset-password', reset)).status).toBe(410)
    expect(
      (
        await client.send('POST', '/api/auth/sign-in/email', {
          email: 'rosa.7@example.com',
          password: 'another lamp entirely',
        })
      ).status,
    ).toBe(200)
    const [row] = await app.db
      .select({ isVerified: schema.user.emailVerified })
      .from(schema.user)
      .where(eq(schema.user.email, 'rosa.7@example.com'))
    expect(row).toEqual({ isVerified: true })
  })

  it('gives a person without a password one by letter', async () => {
    const person = await makePerson(app.db, 'Nia Reed')
    const client = clientFor(app.url)
    await client.send('POST', '/api/auth/request-password-reset', { email: person.email })
    await client.send('POST', '/api/auth/reset-password', {
      token: await newestToken(app.db, person.email),
      newPassword: 'the first one of all',
    })
    expect(
      (await client.send('POST', '/api/auth/sign-in/email', { email: person.email, password: 'the first one of all' }))
        .status,
    ).toBe(200)
  })

  it('stores no token of a letter as it stands', async () => {
    const person = await makePerson(app.db, 'Una Gale')
    const client = clientFor(app.url)
    for (const path of ['/api/auth/sign-in/magic-link', '/api/auth/request-password-reset']) {
      await client.send('POST', path, { email: person.email })
      const token = await newestToken(app.db, person.email)
      const stored = await app.db.select().from(schema.verification)
      expect(stored.length).toBeGreaterThan(0)
      expect(JSON.stringify(stored)).not.toContain(token)
    }
  })

  it('tells every process when a session ends', async () => {
    const listener = new pg.Client({ connectionString: app.databaseUrl })
    await listener.connect()
    const heard: unknown[] = []
    listener.on('notification', ({ payload }) => heard.push(JSON.parse(payload ?? '')))
    await listener.query(`listen ${AUTH_CHANNEL}`)
    const client = await signUp('rosa.8@example.com')
    const [row] = await app.db
      .select({ id: schema.session.id, userId: schema.session.userId })
      .from(schema.session)
      .innerJoin(schema.user, eq(schema.user.id, schema.session.userId))
      .where(eq(schema.user.email, 'rosa.8@example.com'))
    await client.send('POST', '/api/auth/sign-out')
    await listener.query('select 1')
    await listener.end()
    expect(heard).toEqual([{ userId: row?.userId, sessionId: row?.id }])
  })

  it('slows down who tries many passwords, by our view of their address and not by theirs', async () => {
    const strict = await startTestApp({ signInsPerMin: 3 })
    try {
      const client = clientFor(strict.url)
      const statuses: number[] = []
      for (let i = 0; i < 5; i++) {
        const answer = await client.send(
          'POST',
          '/api/auth/sign-in/email',
          { email: 'rosa@example.com', password: `wrong wrong ${i}` },
          { 'x-client-ip': `10.0.0.${i}` },
        )
        statuses.push(answer.status)
        if (answer.status === 429)
          expect(refusal(answer.body)).toEqual({
            code: 'TOO_MANY',
            message: 'That was tried very often. Wait a minute and try again; nothing was changed.',
          })
      }
      expect(statuses).toEqual([401, 401, 401, 429, 429])
    } finally {
      await strict.close()
    }
  })
})
