import { type Page, expect, test } from '@playwright/test'
import { DESK, PHONE, openDemoShoot, signInDemo, visit } from '#tests/e2e/support/people.ts'
import {
  bytesOf,
  cautionWords,
  fromSetupMenu,
  holds,
  lightRows,
  numbersBeside,
  openReadings,
  saveSheet,
  workedOut,
} from '#tests/e2e/support/recipe-steps.ts'
import { fitsPhone } from '#tests/e2e/support/fits-phone.ts'
import { part } from '#tests/e2e/support/setup-steps.ts'
import { saved } from '#tests/e2e/support/story-steps.ts'

const SETUP = 'Octa left, soft fill'

async function openSetup(page: Page): Promise<void> {
  await page.goto(`${await openDemoShoot(page)}/lighting`)
  await page.getByRole('link', { name: SETUP }).first().click()
  await expect(part(page, 'Main')).toBeVisible()
}

const inMetres = (page: Page) => page.getByRole('button', { name: /^Lengths in metres/ })
const seen = async (page: Page) => ({
  lights: await lightRows(page),
  numbers: await workedOut(numbersBeside(page)),
  cautions: await cautionWords(page),
})

test('the recipe sheet holds every number that the screen shows, on either paper and in either unit', async ({
  browser,
  baseURL,
}) => {
  const { page, context, errors } = await visit(browser, DESK, baseURL ?? '')
  await signInDemo(page, 'photographer')
  await openSetup(page)
  await openReadings(page)

  // A4 is 210 × 297 mm (ISO 216), Letter 8.5 × 11 inches; a point is 1/72 inch.
  for (const { paper, unit, sizePt } of [
    { paper: 'A4', unit: 'm', sizePt: [595.28, 841.89] },
    { paper: 'US Letter', unit: 'ft', sizePt: [612, 792] },
  ] as const) {
    await test.step(`${paper}, ${unit}`, async () => {
      if (unit === 'ft') await inMetres(page).click()
      const { lights, numbers, cautions } = await seen(page)
      expect(lights.length).toBeGreaterThanOrEqual(3)
      expect(numbers.length).toBeGreaterThanOrEqual(25)
      expect(numbers.map(([name]) => name)).toEqual(
        expect.arrayContaining([
          'Main reads',
          'All together',
          'Main + fill : fill',
          'Main on the wall',
          'Against the eye line',
          'In focus',
          'Its brightest point',
          'Shutter against sync',
        ]),
      )
      const sheet = await saveSheet(page, paper)
      expect(sheet.name).toBe(`${SETUP}.recipe.pdf`)
      for (const { widthPt, heightPt } of sheet.pages) {
        expect(widthPt).toBeCloseTo(sizePt[0], 1)
        expect(heightPt).toBeCloseTo(sizePt[1], 1)
      }
      const missing = numbers.filter(([, value]) => !holds(sheet.text, value))
      expect(missing).toEqual([])
      for (const { name, madeOf, power } of lights) {
        expect(sheet.text).toContain(name)
        expect(holds(sheet.text, power), `the power of ${name}, ${power}`).toBe(true)
        for (const words of madeOf.split(' · ')) expect(sheet.text.toLowerCase()).toContain(words.toLowerCase())
      }
      expect(cautions.length).toBeGreaterThan(0)
      for (const words of cautions) expect(sheet.text).toContain(words)
      for (const heading of ['Lights', 'Readings', 'Kit', 'Cautions']) expect(sheet.text).toContain(heading)
      expect(sheet.captions.length).toBeGreaterThanOrEqual(lights.length)
      for (const caption of sheet.captions) expect(sheet.text).toContain(caption)
      expect(sheet.bytes.toString('latin1').match(/\/Subtype \/Image/g)).toHaveLength(sheet.captions.length)
      if (unit === 'ft') expect(sheet.text).not.toMatch(/\d m (left|right|up|behind)/)
    })
  }
  expect(errors).toEqual([])
  await context.close()
})

test('a setup is kept as a recipe, lights another shoot, goes out as a file and comes back', async ({
  browser,
  baseURL,
}) => {
  const { page, context, errors } = await visit(browser, DESK, baseURL ?? '')
  await signInDemo(page, 'photographer')
  const kept = 'For the archive'
  const brought = 'Out of a file'
  await openSetup(page)
  const before = await seen(page)
  const [download] = await Promise.all([page.waitForEvent('download'), fromSetupMenu(page, 'Save as JSON')])
  const text = (await bytesOf(download)).toString('utf8')
  expect(download.suggestedFilename()).toBe(`${SETUP}.recipe.json`)

  await test.step('kept in the studio', async () => {
    await fromSetupMenu(page, 'Keep as a recipe')
    const dialog = page.getByRole('dialog')
    await expect(dialog.getByLabel('Name')).toHaveValue(SETUP)
    await dialog.getByLabel('Name').fill(kept)
    await dialog.getByRole('button', { name: 'Keep it' }).click()
    await expect(page.getByText(`“${kept}” is kept in the studio’s recipes.`)).toBeVisible()
  })

  await test.step('used in a second shoot, with the same readings', async () => {
    await page.goto('/')
    await page.getByRole('button', { name: 'Start a shoot' }).first().click()
    await page.getByLabel('Title').fill('A day in the archive')
    await page
      .getByRole('dialog')
      .getByRole('button', { name: /^Start/ })
      .click()
    await page.waitForURL(/\/shoots\/[0-9a-f-]{36}/)
    await page.goto(`${new URL(page.url()).pathname.split('/').slice(0, 3).join('/')}/lighting`)
    await page.getByRole('button', { name: 'Use a recipe' }).first().click()
    await page.getByRole('dialog').getByRole('button', { name: kept }).click()
    await page.waitForURL(/lighting\/[0-9a-f-]{36}/)
    await expect(page.getByRole('heading', { name: kept, level: 1 })).toBeVisible()
    const after = await seen(page)
    expect(after.lights).toEqual(before.lights)
    expect(after.numbers).toEqual(before.numbers)
    await saved(page)
    const [again] = await Promise.all([page.waitForEvent('download'), fromSetupMenu(page, 'Save as JSON')])
    const rebuilt: unknown = JSON.parse((await bytesOf(again)).toString('utf8'))
    expect(rebuilt).toEqual({ ...JSON.parse(text), name: kept })
  })

  await test.step('a damaged file is refused in a sentence, a good one is kept', async () => {
    await page.goto('/')
    await page
      .getByRole('navigation', { name: 'Studio' })
      .getByRole('link', { name: /^Recipes/ })
      .click()
    await expect(page.getByRole('heading', { name: kept })).toBeVisible()
    const add = (content: string) =>
      page
        .getByLabel('Recipe to add')
        .setInputFiles({ name: 'x.recipe.json', mimeType: 'application/json', buffer: Buffer.from(content) })
    const told = page.getByRole('alert')
    await add(text.slice(0, text.length / 2))
    await expect(told).toHaveText(/^This file is not JSON, so there is no recipe in it; it may have been cut short\./)
    const whole: { lights: object[] } = JSON.parse(text)
    await add(JSON.stringify({ ...whole, lights: [{ ...whole.lights[0], power: -1 }] }))
    await expect(told).toHaveText(
      'This recipe cannot be read: light 1, power is −1 and has to be more than 0. Nothing was changed.',
    )
    await expect(page.getByRole('heading', { name: brought })).toBeHidden()
    await add(JSON.stringify({ ...whole, name: brought }))
    await expect(told).toBeHidden()
    await expect(page.getByRole('heading', { name: brought })).toBeVisible()
  })

  await test.step('renamed and removed', async () => {
    const menu = async (name: string, item: string) => {
      await page.getByRole('button', { name: `More for ${name}`, exact: true }).click()
      await page.getByRole('menuitem', { name: item }).click()
    }
    await menu(brought, 'Rename')
    await page.getByRole('dialog').getByLabel('Name').fill('By the great lens')
    await page.getByRole('dialog').getByRole('button', { name: 'Save', exact: true }).click()
    await expect(page.getByRole('heading', { name: 'By the great lens' })).toBeVisible()
    for (const name of ['By the great lens', kept]) {
      await menu(name, 'Remove')
      await page.getByRole('alertdialog').getByRole('button', { name: 'Remove' }).click()
      await expect(page.getByRole('heading', { name })).toBeHidden()
    }
  })
  expect(errors).toEqual([])
  await context.close()
})

test('recipes and their dialogs fit a phone and a finger', async ({ browser, baseURL }) => {
  const { page, context, errors } = await visit(browser, PHONE, baseURL ?? '')
  await signInDemo(page, 'photographer')
  await page
    .getByRole('link', { name: /^Recipes/ })
    .last()
    .click()
  await expect(page.getByRole('heading', { name: 'Recipes', level: 1 })).toBeVisible()
  await expect(page.getByRole('article').first()).toBeVisible()
  await fitsPhone(page, page.getByRole('main'), 'the recipes')
  await page.goto('/')
  await page.goto(`${await openDemoShoot(page)}/lighting`)
  const menu = page.getByRole('button', { name: `More for ${SETUP}` })
  await menu.scrollIntoViewIfNeeded()
  for (const [item, ready] of [
    ['Recipe sheet as PDF', 'Test frames'],
    ['Keep as a recipe', null],
  ] as const) {
    await menu.click()
    await page.getByRole('menuitem', { name: item }).click()
    const dialog = page.getByRole('dialog')
    if (ready !== null) await expect(dialog.getByRole('group', { name: ready })).toBeVisible({ timeout: 60_000 })
    await fitsPhone(page, dialog, item)
    await dialog.getByRole('button', { name: 'Close' }).click()
    await expect(dialog).toBeHidden()
  }
  expect(errors).toEqual([])
  await context.close()
})
