import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { type TestApp, startTestApp } from '#tests/support/app.ts'
import { clientFor } from '#tests/support/client.ts'

let app: TestApp
beforeAll(async () => {
  app = await startTestApp()
})
afterAll(() => app.close())

describe('createApp', () => {
  it('serves the page for every address of the program', async () => {
    const client = clientFor(app.url)
    for (const path of ['/', '/sign-in', '/shoots/1/board', '/join/abc']) {
      const answer = await client.get(path)
      expect([path, answer.status, answer.text]).toEqual([path, 200, '<!doctype html><title>Sconce</title>'])
    }
  })

  it('signs up, makes a studio and a shoot', async () => {
    const client = clientFor(app.url)
    const up = await client.send('POST', '/api/auth/sign-up/email', { email: 'Maren@example.com', password: 'a long enough one', name: 'Maren Holt' })
    expect(up.status).toBe(200)
    const studio = await client.send('POST', '/api/studios', { name: 'Holt' })
    expect(studio.body).toMatchObject({ name: 'Holt', role: 'owner', people: 1 })
    const session = await client.get('/api/session')
    expect(session.body).toMatchObject({ user: { email: 'maren@example.com' }, studios: [{ name: 'Holt' }], letters: true })
    const shoot = await client.send('POST', '/api/shoots', { studioId: (studio.body as { id: string }).id, title: 'Autumn', zone: 'Europe/London' })
    const got = await client.get(`/api/shoots/${(shoot.body as { id: string }).id}`)
    expect(got.body).toMatchObject({ role: 'photographer', inStudio: true, brief: { title: 'Autumn' }, epochs: { board: 1, day: 1 } })
  })
})
