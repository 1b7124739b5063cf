import { readFile } from 'node:fs/promises'
import { type Browser, type Page, type WebSocketRoute, expect, test } from '@playwright/test'
import pg from 'pg'
import { DEMO_PEOPLE } from '#server/demo/people.ts'
import { notes } from '#shared/realtime/documents.ts'
import { CLOSE } from '#shared/realtime/protocol.ts'
import { readAll } from '#shared/realtime/collection.ts'
import { DESK, type Visit, signInDemo, visit } from '#tests/e2e/support/people.ts'
import { saved } from '#tests/e2e/support/story-steps.ts'
import { openRaw } from '#tests/e2e/support/wire.ts'

/** What the browser's side of a connection does when the way to the server is long, cut, or closed for good. */

const NOTE = /note|text/i
const OFFLINE = /^Offline/

let photographer: Visit
/** Address of a shoot of one's own, `/shoots/<id>`. */
let shoot: string

test.beforeEach(async ({ browser, baseURL }) => {
  photographer = await visit(browser, DESK, baseURL ?? '')
  await signInDemo(photographer.page, 'photographer')
  shoot = await startShoot(photographer.page)
})
test.afterEach(() => photographer.context.close())

async function startShoot(page: Page): Promise<string> {
  const id = await page.evaluate(async () => {
    const session: { studios: { id: string }[] } = await (await fetch('/api/session')).json()
    const answer = await fetch('/api/shoots', {
      method: 'POST',
      headers: { 'content-type': 'application/json' },
      body: JSON.stringify({ studioId: session.studios[0]?.id, title: 'Two lanterns', zone: 'Europe/London' }),
    })
    const made: { id: string } = await answer.json()
    return made.id
  })
  return `/shoots/${id}`
}

async function sql(text: string, values: unknown[]): Promise<void> {
  const client = new pg.Client({ connectionString: process.env['SCONCE_E2E_DATABASE'] ?? '' })
  await client.connect()
  await client.query(text, values).finally(() => client.end())
}

const shootId = () => shoot.replace('/shoots/', '')

async function openBoard(page: Page): Promise<void> {
  await page.goto(`${shoot}/board`)
  await saved(page)
}

async function writeNote(page: Page, words: string): Promise<void> {
  await page.getByRole('button', { name: 'Write a note' }).click()
  await rewriteNote(page, words)
}

async function rewriteNote(page: Page, words: string): Promise<void> {
  await page.getByRole('textbox', { name: NOTE }).first().fill(words)
}

/** Texts of the notes as the server has them. */
async function notesOnServer(): Promise<string[]> {
  const { context, page } = photographer
  const raw = await openRaw(context, new URL(page.url()).origin, shoot, 'board')
  const texts = [...readAll(raw.doc, notes).items.values()].map(({ text }) => text)
  raw.close()
  return texts
}

const sign = (page: Page, words: RegExp | string) => page.getByRole('button', { name: words }).first()

/** Puts the way of this page's sockets into the hands of the test. */
async function holdSockets(page: Page) {
  const open = new Set<{ page: WebSocketRoute; server: WebSocketRoute }>()
  const way = {
    /** `cut`: looks open and nothing arrives; `refuse`: nobody answers. */
    state: 'open' as 'open' | 'cut' | 'refuse',
    opened: 0,
    /** No network: what is open falls, what is new gets no answer. A browser's own emulation leaves open sockets alone. */
    goOffline: async () => {
      way.state = 'refuse'
      await page.context().setOffline(true)
      await way.close(CLOSE.restart)
    },
    goOnline: async () => {
      way.state = 'open'
      await page.context().setOffline(false)
    },
    /** Ends all sockets with this code. */
    close: async (code: number) => {
      for (const { page: near, server } of open) {
        await server.close()
        await near.close({ code })
      }
      open.clear()
    },
  }
  await page.routeWebSocket(/\/rt\//, (near) => {
    if (way.state === 'refuse') return void near.close({ code: CLOSE.tryAgain })
    const server = near.connectToServer()
    const pair = { page: near, server }
    open.add(pair)
    way.opened++
    // What was cut stays cut, whatever becomes of new ones.
    near.onMessage((message) => open.has(pair) && way.state === 'open' && server.send(message))
    server.onMessage((message) => open.has(pair) && way.state === 'open' && near.send(message))
    near.onClose(() => {
      open.delete(pair)
      void server.close()
    })
    server.onClose((code, reason) => {
      if (!open.delete(pair)) return
      void near.close({ ...(code === undefined ? {} : { code }), ...(reason === undefined ? {} : { reason }) })
    })
  })
  return way
}

/** Every word the sign has said, from now on. */
async function listenToSign(page: Page): Promise<() => Promise<string[]>> {
  await page.evaluate(() => {
    const said: string[] = []
    Object.assign(window, { said })
    const look = () => {
      const words = document.querySelector('.save-sign')?.textContent ?? ''
      if (words !== said.at(-1)) said.push(words)
    }
    look()
    new MutationObserver(look).observe(document.body, { subtree: true, childList: true, characterData: true })
  })
  return () => page.evaluate(() => (window as unknown as { said: string[] }).said)
}

test('a device that slept for an hour comes back with what was written on it', async ({ browser, baseURL }) => {
  const { page, context } = await visit(browser, DESK, baseURL ?? '')
  await page.clock.install()
  const way = await holdSockets(page)
  await signInDemo(page, 'photographer')
  await openBoard(page)
  await writeNote(page, 'before the sleep')
  await saved(page)
  // Half open: the sockets look alive and nothing comes through; timers stand still while the hour passes.
  way.state = 'cut'
  await rewriteNote(page, 'written into the void')
  await page.clock.pauseAt(Date.now() + 1_000)
  await page.clock.setSystemTime(Date.now() + 3_600_000)
  const before = way.opened
  way.state = 'open'
  await page.evaluate(() => document.dispatchEvent(new Event('visibilitychange')))
  await expect.poll(() => way.opened).toBe(before + 5)
  await page.clock.resume()
  await expect.poll(notesOnServer).toEqual(['written into the void'])
  await saved(page)
  await context.close()
})

test('a session that ended meanwhile: the way in, nothing lost, and only the same person sends it', async ({
  browser,
  baseURL,
}) => {
  const { page, context } = photographer
  const way = await holdSockets(page)
  await openBoard(page)
  await way.goOffline()
  await writeNote(page, 'written before the session ended')
  await expect(sign(page, OFFLINE)).toBeVisible()
  await context.clearCookies()
  await way.goOnline()
  await page.waitForURL(/\/sign-in/)
  await expect(page.getByText(/\d+ changes? (is|are) kept on this device/)).toBeVisible()

  // Somebody else at the same device gets nothing of it and sends nothing.
  const stylist = DEMO_PEOPLE.find(({ role }) => role === 'stylist')
  await page.getByLabel('E-mail').fill(stylist?.email ?? '')
  await page.getByLabel('Password', { exact: true }).fill(stylist?.password ?? '')
  await page.getByRole('button', { name: 'Sign in', exact: true }).click()
  await expect(page.getByRole('heading', { name: /nothing here for you/ })).toBeVisible()
  const other = await visit(browser, DESK, baseURL ?? '')
  await signInDemo(other.page, 'photographer')
  const mine = photographer
  photographer = other
  expect(await notesOnServer()).toEqual([])
  photographer = mine

  await context.clearCookies()
  await signInDemo(page, 'photographer')
  await openBoard(page)
  await expect.poll(notesOnServer).toEqual(['written before the session ended'])
  await other.context.close()
})

test('a restart of the server needs no word', async () => {
  const { page } = photographer
  const way = await holdSockets(page)
  await openBoard(page)
  const said = await listenToSign(page)
  for (const words of ['one', 'two', 'three']) {
    await way.close(CLOSE.restart)
    if (words === 'one') await writeNote(page, words)
    else await rewriteNote(page, words)
    await saved(page)
  }
  expect(new Set(await said())).toEqual(new Set(['Saved', 'Saving…']))
  expect(await notesOnServer()).toEqual(['three'])
})

for (const [how, end] of [
  ['is closed', (page: Page) => page.close()],
  ['dies', (page: Page) => crash(page)],
] as const) {
  test(`a window that ${how} hands what it had not sent to the other one, which sends it`, async () => {
    const { context, page: other } = photographer
    await openBoard(other)
    const page = await context.newPage()
    const way = await holdSockets(page)
    await openBoard(page)
    way.state = 'refuse'
    await way.close(CLOSE.restart)
    await writeNote(page, 'from the other window')
    await expect(sign(page, OFFLINE)).toBeVisible({ timeout: 15_000 })
    expect(await notesOnServer()).toEqual([])
    await end(page)
    await expect.poll(notesOnServer).toEqual(['from the other window'])
    await saved(other)
    await other.getByRole('link', { name: 'You and this device' }).click()
    await expect(other.getByText('Everything you did here is on the server.')).toBeVisible()
  })
}

/** As the system does when it needs the memory. */
async function crash(page: Page): Promise<void> {
  const session = await page.context().newCDPSession(page)
  const gone = page.waitForEvent('crash')
  session.send('Page.crash').catch(() => undefined)
  await gone
}

test('signing out in one window asks about what another has not sent, words in a field included', async () => {
  const { context, page: other } = photographer
  await other.goto('/me')
  const page = await context.newPage()
  const way = await holdSockets(page)
  await openBoard(page)
  await writeNote(page, 'sent')
  await saved(page)
  await expect(other.getByText('Everything you did here is on the server.')).toBeVisible()
  way.state = 'refuse'
  await way.close(CLOSE.restart)
  // Not left: the words are still in the field when the other window is shown.
  await page.getByRole('textbox', { name: NOTE }).first().fill('still in the field')
  await page.evaluate(() => {
    Object.defineProperty(document, 'visibilityState', { value: 'hidden', configurable: true })
    document.dispatchEvent(new Event('visibilitychange'))
  })
  await expect(other.getByText(/1 change of yours is kept on this device only/)).toBeVisible()
  await other.getByRole('button', { name: 'Sign out', exact: true }).click()
  await expect(other.getByRole('alertdialog', { name: 'Lose 1 change?' })).toBeVisible()
  await other.getByRole('button', { name: 'Sign out and lose them' }).click()
  await other.waitForURL(/\/sign-in/)
  await page.waitForURL(/\/sign-in/)
  // A database that another window had open goes when that window lets go of it.
  const left = () =>
    other.evaluate(async () => ({
      databases: (await indexedDB.databases()).map(({ name }) => name).filter((name) => name?.startsWith('rt:')),
      accounts: Object.keys(localStorage).filter((key) => key.startsWith('sconce:unsent:')),
    }))
  await expect.poll(left).toEqual({ databases: [], accounts: [] })
})

test('a device that is full says not saved when offline, and takes it back when it keeps again', async () => {
  const { page } = photographer
  const way = await holdSockets(page)
  // What the page asks for from here on is there without a signal too.
  await page.waitForFunction(() => navigator.serviceWorker.controller !== null)
  await openBoard(page)
  await page.evaluate(() => {
    const add = IDBObjectStore.prototype.add
    Object.assign(window, { makeRoom: () => (IDBObjectStore.prototype.add = add) })
    IDBObjectStore.prototype.add = () => {
      throw new DOMException('The device is full.', 'QuotaExceededError')
    }
  })
  await way.goOffline()
  await writeNote(page, 'nowhere to keep it')
  await expect(sign(page, 'Not saved')).toBeVisible()
  await page.evaluate(() => (window as unknown as { makeRoom: () => void }).makeRoom())
  await expect(sign(page, OFFLINE)).toBeVisible()
  await page.reload()
  await expect(page.getByText('nowhere to keep it').first()).toBeVisible()
  await way.goOnline()
  await expect.poll(notesOnServer).toEqual(['nowhere to keep it'])
})

test('a shoot put back to an earlier state: what was not sent is told, copied and let go of, and the page goes on', async () => {
  const { page } = photographer
  const way = await holdSockets(page)
  await openBoard(page)
  await writeNote(page, 'in the shoot')
  await saved(page)
  await way.goOffline()
  await rewriteNote(page, 'not in the shoot')
  await expect(sign(page, OFFLINE)).toBeVisible()
  await sql(`update rt_doc set epoch = epoch + 1 where shoot_id = $1 and kind = 'board'`, [shootId()])
  await way.goOnline()
  const notice = page.getByRole('dialog', { name: '1 change of yours is not in the shoot' })
  await expect(notice).toBeVisible()
  const [download] = await Promise.all([
    page.waitForEvent('download'),
    notice.getByRole('button', { name: 'Save a copy' }).click(),
  ])
  expect(download.suggestedFilename()).toMatch(/^Two lanterns – changes of \d{4}-\d\d-\d\d\.json$/)
  const copy: unknown = JSON.parse(await readFile(await download.path(), 'utf8'))
  expect(copy).toMatchObject({
    documents: [
      {
        document: 'board',
        changesNotInTheShoot: 1,
        lists: 'what differs from the shoot',
        collections: {
          notes: [
            { name: 'not in the shoot', here: { text: 'not in the shoot' }, inTheShoot: { text: 'in the shoot' } },
          ],
        },
      },
    ],
  })
  await notice.getByRole('button', { name: 'Go on without them' }).click()
  await expect(notice).toBeHidden()
  await saved(page)
  await expect(page.getByText('in the shoot', { exact: true }).first()).toBeVisible()
  await page.reload()
  await saved(page)
  await expect(page.getByRole('dialog')).toBeHidden()
  expect(await notesOnServer()).toEqual(['in the shoot'])
})

/** Gives the demo's stylist this role in the shoot, or takes them out of it. */
async function setStylist(role: 'stylist' | 'crew' | null): Promise<void> {
  const email = DEMO_PEOPLE.find((one) => one.role === 'stylist')?.email
  if (role === null) {
    await sql(`delete from shoot_member where shoot_id = $1 and user_id = (select id from "user" where email = $2)`, [
      shootId(),
      email,
    ])
  } else {
    await sql(
      `insert into shoot_member (shoot_id, user_id, role) select $1, id, $3 from "user" where email = $2
       on conflict (shoot_id, user_id) do update set role = excluded.role`,
      [shootId(), email, role],
    )
  }
}

/** The demo's stylist with the board open and no way to the server, who has just written a note. */
async function stylistOffline(browser: Browser, baseURL: string | undefined, words: string) {
  await setStylist('stylist')
  const { page, context } = await visit(browser, DESK, baseURL ?? '')
  const way = await holdSockets(page)
  await signInDemo(page, 'stylist')
  await openBoard(page)
  await way.goOffline()
  await writeNote(page, words)
  await expect(sign(page, OFFLINE)).toBeVisible()
  return { page, context, way }
}

test('a role that may no longer write: nothing is sent, the rest is told, and the screen reads only', async ({
  browser,
  baseURL,
}) => {
  const { page, context, way } = await stylistOffline(browser, baseURL, 'too late')
  await setStylist('crew')
  await way.goOnline()
  const notice = page.getByRole('dialog', { name: /changes of yours are not in the shoot/ })
  await expect(notice).toContainText('Your role was changed')
  await expect(page.getByRole('button', { name: 'Write a note' })).toBeHidden()
  await notice.getByRole('button', { name: 'Let go of them' }).click()
  await expect(notice).toBeHidden()
  await saved(page)
  expect(await notesOnServer()).toEqual([])
  await context.close()
})

test('somebody taken out of the shoot is told what was not sent, also after loading the page again', async ({
  browser,
  baseURL,
}) => {
  const { page, context, way } = await stylistOffline(browser, baseURL, 'never to be sent')
  await setStylist(null)
  await way.goOnline()
  await expect(page.getByRole('heading', { name: 'You are not in this shoot any more' })).toBeVisible()
  await expect(page.getByText(/\d changes of yours are not in the shoot/)).toBeVisible()
  await page.reload()
  await expect(page.getByRole('heading', { name: /nothing here for you/ })).toBeVisible()
  const [download] = await Promise.all([
    page.waitForEvent('download'),
    page.getByRole('button', { name: 'Save a copy' }).click(),
  ])
  const copy = await readFile(await download.path(), 'utf8')
  expect(copy).toContain('never to be sent')
  await page.getByRole('button', { name: 'Go on without them' }).click()
  await expect(page.getByText(/changes of yours are not in the shoot/)).toBeHidden()
  expect(await notesOnServer()).toEqual([])
  await context.close()
})
