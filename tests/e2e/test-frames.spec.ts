import { type Locator, type Page, expect, test } from '@playwright/test'
import { DESK, PHONE, type Visit, openDemoShoot, signInDemo, visit } from '#tests/e2e/support/people.ts'

test.describe.configure({ mode: 'serial' })

let desk: Visit
let shoot = ''

/** Counts the rows that the page has had computed. */
async function countRows(page: Page): Promise<void> {
  await page.addInitScript(() => {
    let rows = 0
    Worker.prototype.postMessage = new Proxy(Worker.prototype.postMessage, {
      apply(post, worker, [message, ...more]: unknown[]) {
        if (typeof message === 'object' && message !== null && 'kind' in message && message.kind === 'band') rows += 1
        document.documentElement.dataset['rows'] = String(rows)
        Reflect.apply(post, worker, [message, ...more])
      },
    })
  })
}

const rowsOf = (page: Page) => page.evaluate(() => document.documentElement.dataset['rows'])
const strip = (page: Page) => page.getByRole('region', { name: 'Test frames' })
const pictures = (page: Page) => strip(page).getByRole('img', { name: /^Test frame/ })
const drawn = (picture: Locator) =>
  picture.evaluate((canvas) => (canvas instanceof HTMLCanvasElement ? canvas.toDataURL() : ''))

async function openSetup(page: Page, name: string): Promise<void> {
  await page.goto(`${shoot}/lighting`)
  await page.getByRole('link', { name, exact: true }).click()
  await expect(strip(page)).toHaveAttribute('data-quality', 'fine', { timeout: 60_000 })
}

test.beforeAll(async ({ browser }, info) => {
  desk = await visit(browser, DESK, info.project.use.baseURL ?? '')
  await countRows(desk.page)
  await signInDemo(desk.page, 'photographer')
  shoot = await openDemoShoot(desk.page)
})

test.afterAll(async () => {
  await desk.context.close()
})

test('every setup in the list has a picture, one after the other', async () => {
  const { page } = desk
  await page.goto(`${shoot}/lighting`)
  const cards = page.getByRole('article')
  await expect(cards.first()).toBeVisible()
  const lit = page.getByRole('img', { name: /^Test frame with/ })
  expect(await lit.count()).toBe(await cards.count())
  // Before it is computed a picture has two pixels across.
  for (const picture of await lit.all()) await expect(picture).not.toHaveAttribute('width', '2', { timeout: 60_000 })
})

test('the strip has a picture for each light, and a change of power is seen without computing one', async () => {
  const { page } = desk
  await page.goto(`${shoot}/lighting`)
  const card = page.getByRole('article').first()
  const name = (await card.getByRole('link').textContent()) ?? ''
  const lights = /(\d+) lights/.exec((await card.textContent()) ?? '')?.[1]
  await openSetup(page, name)
  await expect(pictures(page)).toHaveCount(Number(lights))

  const first = strip(page).getByRole('button', { name: /^Test frame: Main/ })
  const last = pictures(page).last()
  const before = await drawn(last)
  // Choose the main by keyboard; that opens nothing.
  await strip(page)
    .getByRole('button', { name: /^Test frame/ })
    .last()
    .focus()
  await page.keyboard.press('Home')
  await expect(first).toBeFocused()
  await expect(first).toHaveAttribute('aria-pressed', 'true')
  const rows = await rowsOf(page)
  const power = page.getByRole('complementary').getByLabel('Power', { exact: true })
  const was = await power.inputValue()
  await power.selectOption('1/16')
  await expect.poll(() => drawn(last)).not.toBe(before)
  await power.selectOption(was)
  await expect.poll(() => drawn(last)).toBe(before)
  expect(await rowsOf(page)).toBe(rows)
  await expect(strip(page)).toHaveAttribute('data-quality', 'fine')
  expect(desk.errors).toEqual([])
})

test('a stage opens large: stages, false colour with its legend, the wall, a spot, a file', async () => {
  test.setTimeout(240_000)
  const { page } = desk
  await strip(page)
    .getByRole('button', { name: /^Test frame/ })
    .last()
    .click()
  const dialog = page.getByRole('dialog')
  await expect(dialog.getByText('A study from the numbers, not a promise.')).toBeVisible()
  const large = dialog.getByRole('button', { name: /^Test frame/ })
  const canvas = large.locator('canvas')
  await large.focus()
  await page.keyboard.press('ArrowDown')
  await expect(dialog.getByText(/middle grey at f\//)).toBeVisible()

  const built = await drawn(canvas)
  await dialog.getByRole('button', { name: 'Alone' }).click()
  await expect.poll(() => drawn(canvas)).not.toBe(built)
  await dialog.getByRole('button', { name: 'Built up' }).click()

  await dialog.getByRole('button', { name: 'Stop' }).click()
  await expect(dialog.getByText('Stopped; what is there stays.')).toBeVisible()
  await dialog.getByRole('button', { name: 'Go on' }).click()

  await dialog.getByRole('button', { name: 'False colour' }).click()
  await expect(dialog.getByRole('list', { name: 'Stops against middle grey' })).toContainText('burnt out')
  await dialog.getByRole('button', { name: 'Wall', exact: true }).click()
  await expect(dialog.getByRole('img', { name: /^The wall behind the sitter/ })).toBeVisible()
  await expect(dialog.getByRole('list', { name: 'Stops against the main' })).toBeVisible()
  await dialog.getByRole('button', { name: 'Picture' }).click()

  const download = page.waitForEvent('download')
  await dialog.getByRole('button', { name: 'Save as PNG' }).click()
  expect((await download).suggestedFilename()).toMatch(/\.png$/)

  await page.keyboard.press('Escape')
  await expect(dialog).toBeHidden()
  expect(desk.errors).toEqual([])
})

test('on the phone the strip scrolls by itself and every picture can be pressed', async ({ browser }, info) => {
  const phone = await visit(browser, PHONE, info.project.use.baseURL ?? '')
  try {
    await signInDemo(phone.page, 'crew')
    await phone.page.goto(`${shoot}/lighting`)
    await phone.page.getByRole('article').getByRole('link').first().click()
    await expect(strip(phone.page)).not.toHaveAttribute('data-quality', 'none', { timeout: 60_000 })
    for (const button of await strip(phone.page)
      .getByRole('button', { name: /^Test frame/ })
      .all()) {
      const box = await button.boundingBox()
      expect(Math.min(box?.width ?? 0, box?.height ?? 0)).toBeGreaterThanOrEqual(44)
    }
    expect(
      await phone.page.evaluate(() => document.documentElement.scrollWidth <= document.documentElement.clientWidth),
    ).toBe(true)
    expect(phone.errors).toEqual([])
  } finally {
    await phone.context.close()
  }
})
