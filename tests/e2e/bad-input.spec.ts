import { randomBytes, randomUUID } from 'node:crypto'
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { type APIResponse, type Browser, type Page, expect, test } from '@playwright/test'
import pg from 'pg'
import sharp from 'sharp'
import * as Y from 'yjs'
import { type ErrorCode, errorEnvelopeSchema } from '#shared/api/errors.ts'
import { peopleSchema } from '#shared/api/people.ts'
import { createdShootSchema } from '#shared/api/shoots.ts'
import { sessionSchema } from '#shared/api/studios.ts'
import { CLOSE } from '#shared/realtime/protocol.ts'
import { type Visit, DESK, openDemoShoot, signInDemo, visit } from '#tests/e2e/support/people.ts'
import { closeCodeOf, openRaw } from '#tests/e2e/support/wire.ts'
import { claimingPng, twoTone } from '#tests/support/pictures.ts'

const MB = 1024 * 1024
const NOWHERE = '/shoots/00000000-0000-4000-8000-000000000000'

test.describe.configure({ mode: 'serial' })

let baseURL = ''
let ines: Visit
let tomas: Visit
/** A shoot of Ines's own, so that the demo stays as it is. */
let shoot = ''
/** The demo shoot, in which Tomas is crew. */
let demo = ''

test.beforeAll(async ({ browser }, info) => {
  baseURL = info.project.use.baseURL ?? ''
  ines = await visit(browser, DESK, baseURL)
  await signInDemo(ines.page, 'photographer')
  tomas = await visit(browser, DESK, baseURL)
  await signInDemo(tomas.page, 'crew')
  demo = await openDemoShoot(tomas.page)
  const { studios } = sessionSchema.parse(await (await ines.page.request.get('/api/session')).json())
  const made = await send(ines.page, 'POST', '/api/shoots', {
    studioId: studios[0]?.id,
    title: 'Rehearsal in the dome',
    zone: 'Europe/London',
  })
  shoot = `/shoots/${createdShootSchema.parse(await made.json()).id}`
})

test.afterAll(async () => {
  await ines.context.close()
  await tomas.context.close()
})

function send(page: Page, method: string, path: string, data?: unknown): Promise<APIResponse> {
  return page.request.fetch(path, {
    method,
    headers: { origin: new URL(baseURL).origin },
    ...(data === undefined ? {} : { data }),
  })
}

/** A refusal comes in the one envelope: a code for the screen, a sentence for people. */
async function expectRefusal(answer: APIResponse, status: number, code: ErrorCode): Promise<string> {
  const { error } = errorEnvelopeSchema.parse(await answer.json())
  expect([answer.status(), error.code]).toEqual([status, code])
  expect(error.message).toMatch(/^[A-Z].*\.$/s)
  return error.message
}

/** The sign of what is saved, beside the shoot's sections. */
function sign(page: Page) {
  return page.getByRole('banner').getByRole('button', { name: /^(Saved|Saving|Offline|Not saved|Reload)/ })
}

async function openBoard(page: Page, path: string): Promise<void> {
  await page.goto(`${path}/board`)
  await expect(page.getByRole('heading', { name: 'Board' })).toBeVisible()
  await expect(sign(page)).toHaveText('Saved')
}

async function stranger(browser: Browser): Promise<Visit> {
  const other = await visit(browser, DESK, baseURL)
  const email = `${randomUUID()}@example.com`
  const made = await send(other.page, 'POST', '/api/auth/sign-up/email', {
    name: 'Rosa Lindqvist',
    email,
    password: 'a-lamp-in-the-hall',
  })
  expect(made.ok()).toBe(true)
  return other
}

test.describe('at the door', () => {
  test('a wrong password says so, keeps what was typed and lets nobody in', async ({ browser }) => {
    const { page, context, errors } = await visit(browser, DESK, baseURL)
    await page.goto('/sign-in')
    await page.getByLabel('E-mail').fill('ines@example.com')
    await page.getByLabel('Password', { exact: true }).fill('hilltop-latern')
    await page.getByRole('button', { name: 'Sign in', exact: true }).click()
    await expect(page.getByRole('alert')).toHaveText(/The e-mail or the password is not right/)
    await expect(page.getByLabel('E-mail')).toHaveValue('ines@example.com')
    await expectRefusal(await page.request.get('/api/session'), 401, 'SIGNED_OUT')
    expect(errors).toEqual([])
    await context.close()
  })

  test('an invitation that is unknown, used, withdrawn or too old opens nothing and says what to do', async ({
    browser,
  }) => {
    const invite = async (name: string) => {
      const email = `${name}-${randomUUID()}@example.com`
      const answer = await send(ines.page, 'POST', `/api${shoot}/invitations`, { email, name, role: 'crew' })
      const { invitations } = peopleSchema.parse(await answer.json())
      const id = invitations.find((one) => one.email === email)?.id ?? ''
      return { email, id, link: await linkOf(email) }
    }
    const { page, context, errors } = await visit(browser, DESK, baseURL)
    const expectShut = async (link: string, why: RegExp) => {
      await page.goto(link)
      await expect(page.getByRole('heading', { name: 'This invitation is not open' })).toBeVisible()
      await expect(page.getByText(why)).toBeVisible()
      await expect(page.getByRole('button', { name: /^Join/ })).toHaveCount(0)
    }
    await expectShut('/join/none-such', /no such invitation/)

    const used = await invite('used')
    const first = await visit(browser, DESK, baseURL)
    await first.page.goto(used.link)
    await first.page.getByRole('button', { name: 'Join the shoot' }).click()
    await first.page.waitForURL(/\/shoots\//)
    await first.context.close()
    await expectShut(used.link, /has been used/)

    const withdrawn = await invite('withdrawn')
    await send(ines.page, 'DELETE', `/api${shoot}/invitations/${withdrawn.id}`)
    await expectShut(withdrawn.link, /was withdrawn/)

    const old = await invite('old')
    await onDatabase(`update invitation set expires_at = now() - interval '1 minute' where id = $1`, [old.id])
    await expectShut(old.link, /has expired/)
    const token = old.link.split('/').at(-1) ?? ''
    await expectRefusal(await send(page, 'POST', `/api/invitations/${token}/accept`, { name: 'Old' }), 410, 'GONE')
    expect(errors).toEqual([])
    await context.close()
  })

  test("a stranger with a shoot's or a studio's address learns nothing of it", async ({ browser }) => {
    const { page, context, errors } = await stranger(browser)
    const { studios } = sessionSchema.parse(await (await ines.page.request.get('/api/session')).json())
    for (const path of [`${demo}/board`, `${demo}/people`, `${NOWHERE}/board`, `/studio/${studios[0]?.id}/kit`]) {
      await page.goto(path)
      await expect(page.getByRole('heading', { name: 'There is nothing here for you' })).toBeVisible()
      await expect(page.getByText(/Leaf, Brass|Lantern Row/)).toHaveCount(0)
    }
    const known = await expectRefusal(await page.request.get(`/api${demo}`), 404, 'NOT_FOUND')
    const unknown = await expectRefusal(await page.request.get(`/api${NOWHERE}`), 404, 'NOT_FOUND')
    expect(known).toBe(unknown)
    for (const path of [demo, NOWHERE])
      expect(await closeCodeOf(context, baseURL, `/rt/${path.slice(8)}/board`)).toBe(CLOSE.unknown)
    expect(errors).toEqual([])
    await context.close()
  })
})

test('crew read the brief and the people and change neither, by hand or by wire', async () => {
  const { page, context, errors } = tomas
  await page.goto(`${demo}/people`)
  await expect(page.getByText('Clara Whitlock')).toBeVisible()
  await expect(page.getByRole('button', { name: /Invite|Remove/ })).toHaveCount(0)
  await page.goto(`${demo}/brief`)
  await expect(page.getByText('The photographer writes it')).toBeVisible()
  await expect(page.getByRole('main').getByRole('textbox')).toHaveCount(0)
  await expectRefusal(await send(page, 'PATCH', `/api${demo}/brief`, { title: 'Mine now' }), 403, 'FORBIDDEN')
  const letter = { email: 'friend@example.com', role: 'photographer' }
  await expectRefusal(await send(page, 'POST', `/api${demo}/invitations`, letter), 403, 'FORBIDDEN')

  await openBoard(page, demo)
  await expect(page.getByRole('button', { name: 'Add pictures' })).toHaveCount(0)
  const writer = await openRaw(context, baseURL, demo, 'board')
  const count = writer.doc.getMap('notes').size
  writer.doc.getMap('notes').set(randomUUID(), new Y.Map([['text', 'by nobody']]))
  const reader = await openRaw(ines.context, baseURL, demo, 'board')
  expect(reader.doc.getMap('notes').size).toBe(count)
  writer.close()
  reader.close()
  await expect(sign(page)).toHaveText('Saved')
  expect(errors).toEqual([])
})

test.describe('files that are no pictures, or too large', () => {
  const folder = mkdtempSync(join(tmpdir(), 'sconce-files-'))
  const file = (name: string, bytes: Uint8Array) => {
    const path = join(folder, name)
    writeFileSync(path, bytes)
    return path
  }
  const svg = Buffer.from('<svg xmlns="http://www.w3.org/2000/svg"><script>alert(1)</script></svg>')
  const text = Buffer.from('Not a picture, only called one.\n')
  const noise = () => Buffer.concat([Buffer.from('\xff\xd8\xff\xe0', 'latin1'), randomBytes(30 * MB)])

  test.afterAll(() => rmSync(folder, { recursive: true, force: true }))

  test('are refused on the screen with a sentence each, and the picture beside them is kept', async () => {
    const { page, errors } = ines
    await openBoard(page, shoot)
    const refused = [
      ['lamp.svg', svg, /lamp\.svg: This is an SVG drawing\. Nothing was kept\./],
      ['letter.jpg', text, /letter\.jpg: This is a text file\. Nothing was kept\./],
      ['huge.png', claimingPng(40_000, 40_000), /huge\.png: .*too large for this device\. Nothing was kept\./],
      ['broken.jpg', noise(), /broken\.jpg: .*cannot be opened.*Nothing was kept\./],
    ] as const
    for (const [name, bytes, words] of refused) {
      await page.getByTestId('add-pictures').setInputFiles(file(name, bytes))
      await expect(page.getByText(words)).toBeVisible()
    }
    await expect(page.getByText('0 frames')).toBeVisible()

    const good = file('good.png', await twoTone('#8e6a22', '#23304a'))
    await page.getByTestId('add-pictures').setInputFiles([join(folder, 'lamp.svg'), good])
    await expect(page.getByText('1 frame,')).toBeVisible()
    await expect(sign(page)).toHaveText('Saved')
    expect(errors).toEqual([])
  })

  test('a picture of 30 MB is made smaller on the device and kept', async () => {
    const { page, errors } = ines
    const [width, height] = [3600, 3000]
    const large = await sharp(randomBytes(width * height * 3), { raw: { width, height, channels: 3 } })
      .png({ compressionLevel: 0 })
      .toBuffer()
    expect(large.length).toBeGreaterThan(30 * MB)
    await openBoard(page, shoot)
    await page.getByTestId('add-pictures').setInputFiles(file('large.png', large))
    await expect(page.getByText('2 frames')).toBeVisible({ timeout: 20_000 })
    const reader = await openRaw(ines.context, baseURL, shoot, 'board')
    const pictures = () =>
      [...reader.doc.getMap<Y.Map<{ state?: string }>>('frames').values()].map((frame) => frame.get('picture')?.state)
    await expect.poll(pictures, { timeout: 20_000 }).toEqual(['stored', 'stored'])
    reader.close()
    expect(errors).toEqual([])
  })

  test('are refused on the wire with a code and a sentence, and leave nothing', async () => {
    const { page } = ines
    const refused = [
      ['30 MB', noise(), 413, 'TOO_LARGE', /larger than 25 MB/],
      ['an SVG', svg, 415, 'UNSUPPORTED', /an SVG drawing/],
      ['a text named .jpg', text, 415, 'UNSUPPORTED', /a text file/],
      ['40,000 × 40,000', claimingPng(40_000, 40_000), 413, 'TOO_LARGE', /40,000 × 40,000 pixels/],
      ['a broken picture', noise().subarray(0, 4000), 415, 'UNSUPPORTED', /broken or not complete/],
    ] as const
    for (const [name, buffer, status, code, words] of refused) {
      const id = randomUUID()
      const answer = await page.request.put(`/api${shoot}/uploads/${id}`, {
        headers: { origin: new URL(baseURL).origin },
        multipart: { file: { name: 'picture.jpg', mimeType: 'image/jpeg', buffer } },
      })
      expect(await expectRefusal(answer, status, code), name).toMatch(words)
      await expectRefusal(await page.request.get(`/api/uploads/${id}/320`), 404, 'NOT_FOUND')
    }
  })
})

test.describe('on the wire', () => {
  test('what is not JSON, does not fit or comes from elsewhere is refused and changes nothing', async () => {
    const { page } = ines
    const origin = new URL(baseURL).origin
    const title = async () => {
      const answer: { brief: { title: string } } = await (await page.request.get(`/api${shoot}`)).json()
      return answer.brief.title
    }
    const patch = (data: string, headers: Record<string, string>) =>
      page.request.patch(`/api${shoot}/brief`, { headers: { 'content-type': 'application/json', ...headers }, data })
    await expectRefusal(await patch('{"title": "half', { origin }), 400, 'NOT_JSON')
    await expectRefusal(await patch('title=Half', { origin, 'content-type': 'text/plain' }), 400, 'NOT_JSON')
    await expectRefusal(await patch('{"title": 7, "zone": "Moon/Base"}', { origin }), 400, 'BAD_REQUEST')
    await expectRefusal(await patch('{"title": "Elsewhere"}', { origin: 'http://example.com' }), 403, 'WRONG_ORIGIN')
    await expectRefusal(await patch('{"title": "Nowhere"}', {}), 403, 'WRONG_ORIGIN')
    await expectRefusal(await page.request.get('/api/no-such-thing'), 404, 'NOT_FOUND')
    expect(await title()).toBe('Rehearsal in the dome')
  })

  test('a document that does not exist is refused, and damaged or oversized frames close the socket that sent them', async () => {
    const { page, context, errors } = ines
    await openBoard(page, shoot)
    const at = `/rt/${shoot.slice(8)}`
    expect(await closeCodeOf(context, baseURL, `${at}/nonsense`)).toBe(CLOSE.unknown)
    expect(await closeCodeOf(context, baseURL, `/rt/${NOWHERE.slice(8)}/board`)).toBe(CLOSE.unknown)
    expect(await closeCodeOf(context, baseURL, '/rt/')).toBe(CLOSE.unknown)
    expect(await closeCodeOf(context, baseURL, `${at}/board`, 'hello')).toBe(1003)
    expect(await closeCodeOf(context, baseURL, `${at}/board`, Uint8Array.of(0, 2, 255, 255, 255, 255, 15))).toBe(1003)
    expect(await closeCodeOf(context, baseURL, `${at}/board`, new Uint8Array(5 * MB))).toBe(1009)
    await page.getByRole('button', { name: 'Write a note' }).click()
    await page.getByRole('textbox', { name: 'Note' }).fill('Still here')
    await page.keyboard.press('Escape')
    await expect(page.getByRole('button', { name: 'Note Still here' })).toBeVisible()
    await expect(sign(page)).toHaveText('Saved')
    expect(errors).toEqual([])
  })
})

test('things that no schema knows are kept, counted and passed over', async () => {
  const { page, context, errors } = ines
  const raw = await openRaw(context, baseURL, shoot, 'board')
  const [strange, wrong] = [randomUUID(), randomUUID()]
  raw.doc.transact(() => {
    raw.doc.getMap('frames').set(strange, new Y.Map<unknown>([['hologram', { depth: 3 }]]))
    raw.doc.getMap('notes').set(wrong, 'not even a map')
    raw.doc.getMap('planets').set('mars', 'red')
  })
  await openBoard(page, shoot)
  await expect(page.getByText(/2 things here cannot be shown/)).toBeVisible()
  await expect(page.getByText('2 frames')).toBeVisible()

  // The rest of the board can be worked with as ever.
  await page.getByRole('button', { name: 'Hang a tag' }).click()
  await page.getByRole('textbox', { name: 'Title of the tag' }).fill('Brass')
  await page.keyboard.press('Escape')
  await expect(sign(page)).toHaveText('Saved')
  const tags = () => JSON.stringify(raw.doc.getMap('tags').toJSON())
  await expect.poll(tags).toContain('Brass')
  await page.reload()
  await expect(page.getByRole('button', { name: 'Tag Brass' })).toBeVisible()

  const later = await openRaw(context, baseURL, shoot, 'board')
  expect(later.doc.getMap('frames').toJSON()[strange]).toEqual({ hologram: { depth: 3 } })
  expect(later.doc.getMap('notes').get(wrong)).toBe('not even a map')
  expect(later.doc.getMap('planets').toJSON()).toEqual({ mars: 'red' })
  later.close()
  raw.close()
  expect(errors).toEqual([])
})

/** The link of the newest letter to this address, once the letter has been sent. */
async function linkOf(email: string): Promise<string> {
  let link = ''
  await expect
    .poll(
      async () => {
        const answer: { letters: { to: string; links: string[] }[] } = await (
          await ines.page.request.get('/api/letters')
        ).json()
        link = answer.letters.find(({ to }) => to === email)?.links.find((one) => one.includes('/join/')) ?? ''
        return link
      },
      { timeout: 15_000 },
    )
    .toContain('/join/')
  return new URL(link).pathname
}

async function onDatabase(statement: string, values: readonly unknown[]): Promise<void> {
  const client = new pg.Client({ connectionString: process.env['SCONCE_E2E_DATABASE'] })
  await client.connect()
  await client.query(statement, [...values])
  await client.end()
}
