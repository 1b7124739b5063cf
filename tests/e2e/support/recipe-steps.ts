import { readFile } from 'node:fs/promises'
import { type Download, type Locator, type Page, expect } from '@playwright/test'
import { type ReadPage, readPdf } from '#tests/support/read-pdf.ts'

/** What people do with a setup as a recipe, and what they read off the screen. */

const flat = (text: string) => text.replace(/\s+/g, ' ').trim()

export async function bytesOf(download: Download): Promise<Buffer> {
  return readFile(await download.path())
}

/** Presses something in the menu of the setup that is open, on a desk. */
export async function fromSetupMenu(page: Page, item: string): Promise<void> {
  await page.getByRole('button', { name: 'More for this setup' }).click()
  await page.getByRole('menuitem', { name: item, exact: true }).click()
}

/** The numbers beside the drawings, as somebody reads them. */
export const numbersBeside = (page: Page): Locator => page.getByRole('complementary', { name: 'Numbers of the setup' })

/** Opens the readings under all titles. */
export async function openReadings(page: Page): Promise<void> {
  const closed = numbersBeside(page).locator('h2 button[aria-expanded="false"]')
  while ((await closed.count()) > 0) await closed.first().click()
}

/** Every number that opens to how it is worked out: its name and what it shows. */
export async function workedOut(within: Locator): Promise<[name: string, value: string][]> {
  const end = ': how it is worked out'
  const all = await within
    .locator(`button[aria-label$="${end}"]`)
    .evaluateAll((buttons) => buttons.map((button) => [button.getAttribute('aria-label'), button.textContent] as const))
  return all.map(([name, value]) => [(name ?? '').slice(0, -end.length), flat(value)])
}

export type LightRow = { name: string; madeOf: string; power: string }

/** The rows of the tables of lights: names, what they are made of, their power. */
export async function lightRows(page: Page): Promise<LightRow[]> {
  const rows: LightRow[] = []
  for (const row of await numbersBeside(page).getByRole('row').all()) {
    const head = row.getByRole('rowheader').getByRole('button')
    if ((await head.count()) === 0 || (await row.getByRole('cell').count()) < 5) continue
    const [name = '', madeOf = ''] = await row
      .getByRole('rowheader')
      .locator('[id$="-title"], [id$="-sub"]')
      .allTextContents()
    rows.push({ name, madeOf, power: (await row.getByRole('cell').nth(1).textContent()) ?? '' })
  }
  return rows
}

/** Titles and sentences of the cautions. */
export async function cautionWords(page: Page): Promise<string[]> {
  const items = await numbersBeside(page).getByRole('list', { name: 'Cautions' }).getByRole('listitem').all()
  const texts = await Promise.all(items.map((item) => item.innerText()))
  return texts.flatMap((text) =>
    text
      .replace(/\s*Why\s*$/, '')
      .split('\n')
      .map(flat)
      .filter((line) => line !== ''),
  )
}

export type SavedSheet = { name: string; bytes: Buffer; pages: ReadPage[]; text: string; captions: string[] }

/** Saves the recipe sheet of the setup that is open, with all its test frames. */
export async function saveSheet(page: Page, paper: 'A4' | 'US Letter'): Promise<SavedSheet> {
  await fromSetupMenu(page, 'Recipe sheet as PDF')
  const dialog = page.getByRole('dialog')
  await dialog.getByLabel('Paper').selectOption({ label: paper })
  const frames = dialog.getByRole('group', { name: 'Test frames' })
  await expect(frames).toBeVisible({ timeout: 60_000 })
  const captions = (await frames.locator('label').allTextContents()).map(flat)
  const [download] = await Promise.all([
    page.waitForEvent('download', { timeout: 60_000 }),
    dialog.getByRole('button', { name: 'Save the PDF' }).click(),
  ])
  await expect(dialog).toBeHidden()
  const bytes = await bytesOf(download)
  const pages = await readPdf(bytes)
  return {
    name: download.suggestedFilename(),
    bytes,
    pages,
    text: flat(pages.map(({ text }) => text).join('\n')),
    captions,
  }
}

/** Whether a text has a number as it stands, and not as a part of a longer one. */
export function holds(text: string, value: string): boolean {
  const plain = value.replace(/[.*+?^${}()|[\]\\]/g, '\\$&')
  return new RegExp(`(?<![\\d.])${plain}(?!\\d|\\.\\d)`).test(text)
}
