import { type Locator, type Page, expect, test } from '@playwright/test'
import { DESK, PHONE, signInDemo, visit } from '#tests/e2e/support/people.ts'
import { fitsPhone } from '#tests/e2e/support/fits-phone.ts'
import { bytesOf, lightRows, numbersBeside } from '#tests/e2e/support/recipe-steps.ts'
import { addLight, createAccount, goTo, saved } from '#tests/e2e/support/story-steps.ts'

const UNIT = 'Pocket flash, second hand'

const unitSection = (page: Page) => page.getByRole('region', { name: 'Flash units' })
const rowOf = (page: Page, name: string) => unitSection(page).getByRole('row').filter({ hasText: name })

async function importFile(page: Page, name: string, text: string): Promise<Locator> {
  await page.getByRole('button', { name: 'Import a CSV' }).click()
  const dialog = page.getByRole('dialog')
  await dialog.getByLabel('File').setInputFiles({ name, mimeType: 'text/csv', buffer: Buffer.from(text) })
  return dialog
}

test('a studio of one’s own: a unit, a meter reading that reaches an open setup, and tables in and out', async ({
  browser,
  baseURL,
}) => {
  const { page, context, errors } = await visit(browser, DESK, baseURL ?? '')
  await createAccount(page, 'Wim Okafor', 'wim@example.com')
  await page.getByLabel('Name of the studio').fill('Cooper’s Yard')
  await page
    .getByRole('button', { name: /open the studio|create|name it|open/i })
    .first()
    .click()
  await goTo(page, 'Kit room')
  const kitRoom = new URL(page.url()).pathname

  await test.step('a unit without a guide number is told so at the field, and keeps what was typed', async () => {
    await page.getByRole('button', { name: 'Add a flash unit' }).click()
    const dialog = page.getByRole('dialog')
    await dialog.getByLabel('Name').fill(UNIT)
    const guide = dialog.getByLabel('Guide number at ISO 100', { exact: true })
    await guide.fill('0')
    await dialog.getByRole('button', { name: 'Save', exact: true }).click()
    await expect(guide).toHaveAccessibleDescription(
      'Without a guide number nothing can be worked out: put in the maker’s figure or measure it.',
    )
    await expect(dialog.getByRole('alert')).toContainText('Nothing was saved; what you typed is still here.')
    await guide.fill('44')
    await dialog.getByRole('button', { name: 'Save', exact: true }).click()
    await expect(dialog).toBeHidden()
    await expect(rowOf(page, UNIT)).toContainText('44 m')
    await expect(rowOf(page, UNIT)).toContainText('assumed')
  })

  const setup = await test.step('a setup computes with it', async () => {
    await goTo(page, 'Shoots')
    await page.getByRole('button', { name: 'Start a shoot' }).first().click()
    await page.getByLabel('Title').fill('Barrels and hoops')
    await page
      .getByRole('dialog')
      .getByRole('button', { name: /^Start/ })
      .click()
    await page.waitForURL(/\/shoots\/[0-9a-f-]{36}/)
    await page.goto(`${new URL(page.url()).pathname.split('/').slice(0, 3).join('/')}/lighting`)
    await page.getByRole('button', { name: 'Light the first setup' }).click()
    await page.waitForURL(/lighting\/[0-9a-f-]{36}/)
    await addLight(page, 'Main', UNIT, '60 cm softbox')
    await saved(page)
    return new URL(page.url()).pathname
  })
  const mainReads = () => numbersBeside(page).getByRole('button', { name: 'Main reads: how it is worked out' })
  await page.goto(setup)
  const assumed = await mainReads().textContent()

  await test.step('what a meter read takes the place of the assumption where somebody agrees', async () => {
    await page.goto(kitRoom)
    await unitSection(page).getByRole('button', { name: UNIT, exact: true }).click()
    const dialog = page.getByRole('dialog')
    await dialog.getByRole('button', { name: 'Add a meter reading' }).click()
    await dialog.getByLabel('What is on the head').selectOption({ label: '60 cm softbox' })
    const distance = dialog.getByLabel('At a distance of')
    await distance.fill('0')
    await distance.press('Enter')
    await expect(dialog.getByText('At no distance nothing can be worked out')).toBeVisible()
    await expect(dialog.getByRole('button', { name: 'Take the reading' })).toBeDisabled()
    await distance.fill('2')
    await distance.press('Enter')
    await dialog.getByLabel('The meter read f/').fill('4')
    await dialog.getByLabel('The meter read f/').press('Enter')
    // GN = N · d / √(d²/(d² + r²)): a square of 60 cm has the area of a disc of 33.9 cm; 4 · 2 / √.9722 = 8.1 (IES 9.1.1).
    await expect(dialog.getByRole('status').filter({ hasText: 'Guide number' })).toContainText('8.1 m')
    await dialog.getByRole('button', { name: 'Take the reading' }).click()
    await dialog.getByRole('button', { name: 'Save', exact: true }).click()
    await expect(dialog).toBeHidden()

    await page.goto(setup)
    await expect(numbersBeside(page).getByText('1 light has newer numbers in the kit room')).toBeVisible()
    expect(await mainReads().textContent()).toBe(assumed)
    await numbersBeside(page).getByRole('button', { name: 'Take them over' }).click()
    await expect(mainReads()).not.toHaveText(assumed ?? '')
    await mainReads().click()
    await expect(page.getByText(/measured: f\/4 at 2 m, full power, ISO 100, with 60 cm softbox/)).toBeVisible()
    await page.keyboard.press('Escape')
    expect((await lightRows(page))[0]?.madeOf).toContain('measured')
    await saved(page)
  })

  await page.goto(kitRoom)
  await test.step('the table goes out, a row is changed, and comes in after a look at what it would do', async () => {
    const [download] = await Promise.all([
      page.waitForEvent('download'),
      page.getByRole('button', { name: 'Export as CSV' }).click(),
    ])
    expect(download.suggestedFilename()).toBe('Kit room.csv')
    const lines = (await bytesOf(download)).toString('utf8').split('\r\n')
    const changed = lines.map((line) => (line.includes(UNIT) ? line.replace(',44,', ',52,') : line))
    const dialog = await importFile(page, 'Kit room.csv', changed.join('\r\n'))
    await expect(dialog.getByRole('status').first()).toHaveText(
      /^0 new, 1 change to what is there, \d+ as they are, 0 that cannot be taken$/,
    )
    const change = dialog.getByRole('region', { name: 'Changes what is there' }).getByRole('listitem')
    await expect(change).toContainText(UNIT)
    await expect(change).toContainText('Guide number (m): 44 → 52')
    await dialog.getByRole('button', { name: 'Write 1 item' }).click()
    await expect(dialog).toBeHidden()
    await expect(rowOf(page, UNIT)).toContainText('52 m')
  })

  await test.step('a thousand rows, some of them bad: each of those is named, the others come in', async () => {
    const bad: Readonly<Record<number, [row: string, told: string]>> = {
      7: ['trumpet,Row 7,1,,', 'Kind:'],
      77: ['gel,,1,0.5,10', 'it has none'],
      177: ['gel,Row 177,many,0.5,10', 'How many'],
      277: ['gel,Row 277,1,47,10', 'more than 1'],
      377: ['gel,Row 377,1,half,10', 'Lets through (of 1):'],
      477: ['gel,Row 476,1,0.5,10', 'stands in line'],
      577: ['gel,Row 577,1,,10', 'it is missing'],
    }
    const rows = Array.from({ length: 1000 }, (_, index) => bad[index]?.[0] ?? `gel,Row ${index},1,0.5,10`)
    const dialog = await importFile(
      page,
      'thousand.csv',
      ['Kind,Name,How many,Lets through (of 1),Shift (mired)', ...rows].join('\n'),
    )
    await expect(dialog.getByRole('status').first()).toHaveText(
      '993 new, 0 changes to what is there, 0 as they are, 7 that cannot be taken',
    )
    const told = dialog.getByRole('region', { name: 'Cannot be taken' }).getByRole('listitem')
    await expect(told).toHaveCount(7)
    for (const [index, [, words]] of Object.entries(bad))
      await expect(told.filter({ hasText: `Line ${Number(index) + 2}` })).toContainText(words)
    await dialog.getByRole('button', { name: 'Write 993 items' }).click()
    await expect(dialog).toBeHidden()
    await expect(
      page.getByRole('region', { name: 'Gels' }).getByRole('button', { name: 'Row 999', exact: true }),
    ).toBeVisible()
  })
  expect(errors).toEqual([])
  await context.close()
})

test('the kit room fits a phone and a finger', async ({ browser, baseURL }) => {
  const { page, context, errors } = await visit(browser, PHONE, baseURL ?? '')
  await signInDemo(page, 'photographer')
  await page.getByRole('link', { name: /^Kit/ }).last().click()
  await expect(page.getByRole('heading', { name: 'Flash units' })).toBeVisible()
  await fitsPhone(page, page.getByRole('main'), 'the kit room')
  await unitSection(page).getByRole('button').filter({ hasText: /flash/i }).nth(1).click()
  const dialog = page.getByRole('dialog')
  await dialog.getByRole('button', { name: 'Add a meter reading' }).click()
  await fitsPhone(page, dialog, 'a unit')
  await dialog.getByRole('button', { name: 'Close' }).click()
  expect(errors).toEqual([])
  await context.close()
})
