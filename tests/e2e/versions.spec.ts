import AxeBuilder from '@axe-core/playwright'
import { type Locator, type Page, expect, test } from '@playwright/test'
import { DESK, PHONE, type Visit, openDemoShoot, signInDemo, visit } from '#tests/e2e/support/people.ts'

test.describe.configure({ mode: 'serial' })

const FRAME = 'Frame Collar high, cloth matte'
const NOTE = 'Note Quite another idea'

let baseURL = ''
let ines: Visit
let soren: Visit
/** The demo shoot: the journey ends with the board as it found it. */
let shoot = ''

test.beforeAll(async ({ browser }, info) => {
  baseURL = info.project.use.baseURL ?? ''
  ines = await visit(browser, DESK, baseURL)
  await signInDemo(ines.page, 'photographer')
  shoot = await openDemoShoot(ines.page)
  soren = await visit(browser, DESK, baseURL)
  await signInDemo(soren.page, 'stylist')
})

test.afterAll(async () => {
  await ines.context.close()
  await soren.context.close()
})

function thing(page: Page, name: string): Locator {
  return page.getByRole('application', { name: 'Wall' }).getByRole('button', { name, exact: true })
}

/** The sign of what is saved, beside the shoot's sections. */
function sign(page: Page): Locator {
  return page.getByRole('banner').getByRole('button', { name: /^(Saved|Saving|Offline|Not saved|Reload)/ })
}

async function openBoard(page: Page): Promise<void> {
  await page.goto(`${shoot}/board`)
  await expect(thing(page, FRAME)).toBeVisible()
  await expect(sign(page)).toHaveText('Saved')
}

async function openVersions(page: Page): Promise<Locator> {
  await page.getByRole('button', { name: 'Kept versions' }).click()
  return page.getByRole('dialog', { name: 'Kept versions' })
}

async function takeBack(page: Page, name: string): Promise<void> {
  const versions = await openVersions(page)
  await versions.getByRole('button', { name: `More about ${name}` }).click()
  await page.getByRole('menuitem', { name: 'Take it back' }).click()
  await page
    .getByRole('dialog', { name: `Take back “${name}”?` })
    .getByRole('button', { name: 'Take it back' })
    .click()
  await expect(page.getByRole('dialog')).toHaveCount(0)
}

/** Nothing serious by axe, and nothing wider than the screen. */
async function inspect(page: Page, what: string): Promise<void> {
  const { violations } = await new AxeBuilder({ page }).analyze()
  const serious = violations.filter(({ impact }) => impact === 'serious' || impact === 'critical')
  expect(
    serious.map(({ id, nodes }) => `${what}: ${id} ${nodes.map((node) => node.target.join(' ')).join(' | ')}`),
  ).toEqual([])
  const isWider = await page.evaluate(() => document.documentElement.scrollWidth > document.documentElement.clientWidth)
  expect(isWider, `${what} is wider than the screen`).toBe(false)
}

/** What both see of the frame and the note. */
async function expectBoard(frame: boolean, note: boolean): Promise<void> {
  for (const { page } of [ines, soren]) {
    await expect(thing(page, FRAME)).toHaveCount(frame ? 1 : 0)
    await expect(thing(page, NOTE)).toHaveCount(note ? 1 : 0)
  }
}

test('a version is kept, and the board goes on', async () => {
  await openBoard(ines.page)
  await openBoard(soren.page)
  const versions = await openVersions(ines.page)
  await expect(versions.getByText('No version is kept yet')).toBeVisible()
  await inspect(ines.page, 'no versions')
  await versions.getByLabel('The board as it stands now').fill('First idea')
  await versions.getByRole('button', { name: 'Keep this version' }).click()
  await expect(versions.getByRole('listitem')).toContainText(['First idea'])
  await inspect(ines.page, 'versions')
  await ines.page.keyboard.press('Escape')
  await expect(ines.page.getByRole('button', { name: 'Kept versions' })).toBeFocused()

  await thing(ines.page, FRAME).click()
  await ines.page.keyboard.press('Delete')
  await ines.page.getByRole('button', { name: 'Write a note' }).click()
  await ines.page.getByRole('textbox', { name: 'Note' }).fill('Quite another idea')
  await ines.page.keyboard.press('Escape')
  await expectBoard(false, true)
})

test('it is looked at as it stood, with its pictures, and nothing in it can be changed', async () => {
  const { page, errors } = ines
  const versions = await openVersions(page)
  await versions.getByRole('link', { name: 'Look at First idea' }).click()
  const band = page.getByRole('region', { name: 'Kept version' })
  await expect(band).toContainText(/You are looking at “First idea”, kept by Ines Marlow on \w{3} \d+ \w{3}, \d\d:\d\d/)
  await expect(page.getByRole('main')).toBeFocused()
  await expect(thing(page, FRAME)).toBeVisible()
  await expect(thing(page, NOTE)).toHaveCount(0)
  const picture = thing(page, FRAME).locator('img')
  await expect.poll(() => picture.evaluate((img) => img instanceof HTMLImageElement && img.naturalWidth > 0)).toBe(true)
  await expect(page.getByRole('region', { name: 'Shots, in order' }).getByRole('listitem').first()).toBeVisible()
  await expect(
    page.getByRole('button', { name: /Write a note|Hang a tag|Add pictures|Undo|Add a shot|Move shot/ }),
  ).toHaveCount(0)

  await thing(page, FRAME).click()
  await expect(page.getByRole('complementary', { name: 'Inspector' })).toContainText('Frame')
  await expect(page.getByRole('complementary', { name: 'Inspector' }).getByRole('textbox')).toHaveCount(0)
  for (const key of ['Delete', 'F2', 'ArrowRight', 'Control+z']) await page.keyboard.press(key)
  await expect(thing(page, FRAME)).toBeVisible()
  await expect(sign(page)).toHaveText('Saved')
  await inspect(page, 'a version')
  await expectNotesAndFramesOf(soren.page)

  await page.reload()
  await expect(band).toBeVisible()
  await expect(thing(page, FRAME)).toBeVisible()
  await page.getByRole('link', { name: 'Back to the board' }).click()
  await expectBoard(false, true)
  expect(errors).toEqual([])
})

/** Looking back changes nothing for anybody else. */
async function expectNotesAndFramesOf(page: Page): Promise<void> {
  await expect(thing(page, FRAME)).toHaveCount(0)
  await expect(thing(page, NOTE)).toHaveCount(1)
}

test('it is taken back for everybody, undone by who did it, and taken back again by another', async () => {
  const versions = await openVersions(ines.page)
  await versions.getByRole('link', { name: 'Look at First idea' }).click()
  await ines.page.getByRole('button', { name: 'Take it back' }).click()
  const dialog = ines.page.getByRole('dialog', { name: 'Take back “First idea”?' })
  await expect(dialog).toContainText('1 frame')
  await expect(dialog).toContainText('1 note')
  await inspect(ines.page, 'taking back')
  await dialog.getByRole('button', { name: 'Take it back' }).click()
  await ines.page.waitForURL(/\/board$/)
  await expectBoard(true, false)
  await expect(soren.page.getByText('Ines Marlow took the board back to “First idea”.')).toBeVisible()

  await ines.page.getByRole('application', { name: 'Wall' }).focus()
  await ines.page.keyboard.press('Control+z')
  await expectBoard(false, true)
  await ines.page.keyboard.press('Control+Shift+z')
  await expectBoard(true, false)

  await takeBack(soren.page, 'Before taking back ‘First idea’')
  await expectBoard(false, true)
  await expect(
    ines.page.getByText('Soren Okafor took the board back to “Before taking back ‘First idea’”.'),
  ).toBeVisible()
  await takeBack(soren.page, 'First idea')
  await expectBoard(true, false)
  await expect(sign(soren.page)).toHaveText('Saved')
  expect([...ines.errors, ...soren.errors]).toEqual([])
})

test('on a phone it is found in the menu, and crew may look and no more', async ({ browser }) => {
  const { page, context, errors } = await visit(browser, PHONE, baseURL)
  await signInDemo(page, 'crew')
  await page.goto(`${shoot}/board`)
  await page.getByRole('button', { name: 'More actions' }).click()
  await page.getByRole('menuitem', { name: 'Kept versions' }).click()
  const versions = page.getByRole('dialog', { name: 'Kept versions' })
  await expect(versions.getByRole('link', { name: 'Look at First idea' })).toBeVisible()
  await expect(versions.getByRole('button', { name: /Keep|More about/ })).toHaveCount(0)
  await inspect(page, 'versions on a phone')
  await versions.getByRole('link', { name: 'Look at First idea' }).click()
  await expect(page.getByRole('region', { name: 'Kept version' })).toBeVisible()
  await expect(page.getByRole('button', { name: 'Take it back' })).toHaveCount(0)
  await expect(page.getByRole('button', { name: FRAME, exact: true })).toBeVisible()
  await inspect(page, 'a version on a phone')
  await page.getByRole('link', { name: 'Back to the board' }).click()
  await page.waitForURL(/\/board$/)
  expect(errors).toEqual([])
  await context.close()
})
