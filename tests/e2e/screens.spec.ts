import { mkdirSync } from 'node:fs'
import { join } from 'node:path'
import sharp from 'sharp'
import AxeBuilder from '@axe-core/playwright'
import { type Page, expect, test } from '@playwright/test'
import type { Role } from '#shared/access/roles.ts'
import { DESK, PHONE, openDemoShoot, signInDemo, visit } from '#tests/e2e/support/people.ts'

/** With SCONCE_SCREENS=1 the pictures of the README are taken anew; another value is a folder to put them into. */
const TAKE = process.env['SCONCE_SCREENS']
const FOLDER = TAKE === '1' ? join(import.meta.dirname, 'screens') : TAKE

type Screen = { name: string; path: string; see: RegExp; role: Role }

const SCREENS: readonly Screen[] = [
  { name: 'shoots', path: '/', see: /^Shoots$/, role: 'photographer' },
  { name: 'kit-room', path: '/studio/:studio/kit', see: /Kit room/, role: 'photographer' },
  { name: 'recipes', path: '/studio/:studio/recipes', see: /Recipes/, role: 'photographer' },
  { name: 'studio-people', path: '/studio/:studio/people', see: /People/, role: 'photographer' },
  { name: 'me', path: '/me', see: /Ines Marlow|You/, role: 'photographer' },
  { name: 'brief', path: 'brief', see: /^Brief$/, role: 'photographer' },
  { name: 'board', path: 'board', see: /^Board$/, role: 'photographer' },
  { name: 'looks', path: 'looks', see: /^Looks$/, role: 'stylist' },
  { name: 'lighting', path: 'lighting', see: /^Lighting$/, role: 'photographer' },
  { name: 'setup', path: 'lighting/:setup', see: /Octa left/, role: 'photographer' },
  { name: 'order', path: 'order', see: /^Running order$/, role: 'photographer' },
  { name: 'people', path: 'people', see: /^People$/, role: 'photographer' },
  { name: 'sign-off', path: 'sign-off', see: /Long line|Night coat|Work coat|Sign-off/, role: 'client' },
  { name: 'day', path: 'day', see: /./, role: 'crew' },
]

async function settle(page: Page): Promise<void> {
  await page.waitForLoadState('networkidle')
  await page.evaluate(() => document.fonts.ready.then(() => undefined))
}

/** For the README: pictures that are computed on the screen are there in full, as far as there are any. */
async function settleFrames(page: Page): Promise<void> {
  if (FOLDER === undefined) return
  const strip = page.getByRole('region', { name: 'Test frames' })
  if (await strip.isVisible()) await expect(strip).toHaveAttribute('data-quality', 'fine', { timeout: 30_000 })
}

/** The test frame of the setup on the screen, in large. */
async function inspectLarge(page: Page, size: string): Promise<void> {
  await page.getByRole('region', { name: 'Test frames' }).getByRole('button', { name: /Main/ }).click()
  const dialog = page.getByRole('dialog')
  await expect(dialog.getByText('A study from the numbers, not a promise.')).toBeVisible()
  if (FOLDER !== undefined) await expect(dialog.getByText('In full.')).toBeVisible({ timeout: 90_000 })
  await inspect(page, 'test-frame')
  await take(page, 'test-frame', size)
  await page.keyboard.press('Escape')
}

/** Nothing serious by axe, and nothing wider than the screen. */
async function inspect(page: Page, name: string): Promise<void> {
  const { violations } = await new AxeBuilder({ page }).analyze()
  const serious = violations.filter(({ impact }) => impact === 'serious' || impact === 'critical')
  expect(
    serious.map(({ id, nodes }) => `${name}: ${id} ${nodes.map((node) => node.target.join(' ')).join(' | ')}`),
  ).toEqual([])
  const { scroll, client } = await page.evaluate(() => ({
    scroll: document.documentElement.scrollWidth,
    client: document.documentElement.clientWidth,
  }))
  expect(scroll, `${name} is wider than the screen`).toBeLessThanOrEqual(client)
}

async function take(page: Page, name: string, size: string): Promise<void> {
  if (FOLDER === undefined) return
  mkdirSync(FOLDER, { recursive: true })
  const picture = sharp(await page.screenshot())
  await picture.webp({ quality: 80 }).toFile(join(FOLDER, `${name}-${size}.webp`))
}

for (const [size, viewport] of [
  ['desk', DESK],
  ['phone', PHONE],
] as const) {
  test.describe(`at ${viewport.width} × ${viewport.height}`, () => {
    for (const role of ['photographer', 'stylist', 'client', 'crew'] as const) {
      test(`the ${role}'s screens have nothing serious by axe and fit`, async ({ browser, baseURL }) => {
        test.setTimeout(120_000)
        const { page, context, errors } = await visit(browser, viewport, baseURL ?? '')
        await signInDemo(page, role)
        const session: { studios: { id: string }[] } = await page.evaluate(() =>
          fetch('/api/session').then((answer) => answer.json()),
        )
        const shoot = await openDemoShoot(page)
        let setup = ''
        if (role === 'photographer') {
          await page.goto(`${shoot}/lighting`)
          const link = page.getByRole('link', { name: /Octa left, soft fill/ }).first()
          setup = (await link.getAttribute('href'))?.split('/').at(-1) ?? ''
        }
        for (const screen of SCREENS.filter((one) => one.role === role)) {
          const path = screen.path.replace(':studio', session.studios[0]?.id ?? '').replace(':setup', setup)
          await page.goto(path.startsWith('/') ? path : `${shoot}/${path}`)
          await expect(page.getByRole('heading', { name: screen.see }).first()).toBeVisible()
          await settle(page)
          await settleFrames(page)
          await inspect(page, screen.name)
          await take(page, screen.name, size)
          // One size is enough for axe; the picture is being computed meanwhile.
          if (screen.name === 'setup' && (FOLDER !== undefined || size === 'phone')) await inspectLarge(page, size)
        }
        expect(errors).toEqual([])
        await context.close()
      })
    }

    test('the screens before signing in have nothing serious by axe and fit', async ({ browser, baseURL }) => {
      const { page, context, errors } = await visit(browser, viewport, baseURL ?? '')
      for (const path of ['/sign-in', '/reset', '/join/none-such', '/letters', '/nowhere']) {
        await page.goto(path)
        await settle(page)
        await inspect(page, path)
        await take(page, path.slice(1).replace('/', '-'), size)
      }
      expect(errors).toEqual([])
      await context.close()
    })
  })
}
