import { type Locator, type Page, expect } from '@playwright/test'

/** What people do on the screens, in the words on them. */

export async function createAccount(page: Page, name: string, email: string): Promise<void> {
  await page.goto('/sign-in')
  await page
    .getByRole('button', { name: /create an account/i })
    .or(page.getByRole('link', { name: /create an account/i }))
    .first()
    .click()
  await page.getByLabel('Your name').fill(name)
  await page.getByLabel('E-mail').fill(email)
  await page.getByLabel('Password', { exact: true }).fill('a lantern on the hill')
  await page.getByRole('button', { name: /create/i }).click()
}

export async function invite(page: Page, name: string, email: string, role: string): Promise<void> {
  await page.getByRole('button', { name: 'Invite by letter' }).first().click()
  const dialog = page.getByRole('dialog')
  await dialog.getByLabel('E-mail').fill(email)
  await dialog.getByLabel('Name').fill(name)
  await choose(dialog.getByLabel('Role'), role)
  await dialog.getByRole('button', { name: 'Send the letter' }).click()
  await expect(dialog).toBeHidden()
}

/** Reads the newest letter to somebody where letters are caught, and follows its link. */
export async function openLetter(page: Page, email: string): Promise<void> {
  await expect
    .poll(async () => (await letterLinks(page, email)).length, { message: `a letter to ${email}`, timeout: 15_000 })
    .toBeGreaterThan(0)
  const [link] = await letterLinks(page, email)
  await page.goto(new URL(link ?? '').pathname)
}

async function letterLinks(page: Page, email: string): Promise<string[]> {
  const answer = await page.request.get('/api/letters')
  const { letters }: { letters: { to: string; links: string[] }[] } = await answer.json()
  return letters.find(({ to }) => to.includes(email))?.links ?? []
}

/** Opens a section of the shoot through the left column, or the bar at the foot of a phone. */
export async function goTo(page: Page, section: string): Promise<void> {
  await page
    .getByRole('navigation')
    .getByRole('link', { name: new RegExp(`^${section}`) })
    .first()
    .click()
}

/** Chooses in a native or a styled select by the text of an option. */
export async function choose(field: Locator, option: string): Promise<void> {
  await field.selectOption({ label: option })
}

/** The sign says saved: nothing of this person is on its way. */
export async function saved(page: Page): Promise<void> {
  const sign = page
    .getByRole('button', { name: /^Saved$/ })
    .or(page.locator('header [role="status"]', { hasText: /^Saved$/ }))
  await expect(sign.first()).toBeVisible({ timeout: 20_000 })
}

export type LookWords = {
  look: string
  sitter?: string
  character?: string
  on?: string
  pieces: readonly string[]
  hair: string
}

export async function hangLook(page: Page, words: LookWords): Promise<void> {
  await page
    .getByRole('button', { name: /^(Hang a look|Begin with a look)$/ })
    .first()
    .click()
  const dialog = page.getByRole('dialog')
  await dialog.getByLabel('Name of the look').fill(words.look)
  const onWhom = dialog.getByLabel('On whom')
  if (await onWhom.isVisible()) await choose(onWhom, words.on ?? 'Somebody new')
  if (words.sitter !== undefined) {
    await dialog.getByLabel('Sitter').fill(words.sitter)
    await dialog.getByLabel('Plays').fill(words.character ?? '')
  }
  await dialog.getByRole('button', { name: 'Hang it' }).click()
  await expect(dialog).toBeHidden()
  for (const piece of words.pieces) {
    await page.getByLabel('New piece').fill(piece)
    await page.getByRole('button', { name: 'Add', exact: true }).click()
  }
  await page.getByLabel('Hair', { exact: true }).fill(words.hair)
  await page.getByLabel('Hair', { exact: true }).blur()
}

export async function addLight(page: Page, purpose: string, unit: string, modifier: string): Promise<void> {
  await page.getByRole('button', { name: 'Add a light' }).first().click()
  const dialog = page.getByRole('dialog')
  await dialog.locator('label', { hasText: purpose }).click()
  await choose(dialog.getByLabel('Unit'), unit)
  await choose(dialog.getByLabel('Modifier'), modifier)
  await dialog.getByRole('button', { name: /^Add/ }).click()
  await expect(dialog).toBeHidden()
}

export async function addSet(page: Page, name: string, room: string): Promise<void> {
  const sheet = page.getByRole('dialog', { name: 'Sets and rooms' })
  await sheet.getByRole('button', { name: 'Add a set' }).click()
  const field = sheet.getByLabel('Name', { exact: true })
  await field.fill(name)
  await field.blur()
  await choose(sheet.getByLabel('Room', { exact: true }), room)
}

export type ShotWords = { title: string; set: string; setup: string; look: RegExp }

/** Gives a shot its set, setup and look in the running order's panel. */
export async function planShot(page: Page, words: ShotWords): Promise<void> {
  await page
    .getByRole('button', { name: new RegExp(words.title) })
    .filter({ hasNot: page.locator('[data-handle]') })
    .last()
    .click()
  const panel = page.getByRole('complementary').or(page.getByRole('dialog'))
  await expect(panel.getByLabel('Title').last()).toHaveValue(words.title)
  await choose(panel.getByLabel('Set', { exact: true }), words.set)
  await choose(panel.getByLabel('Setup', { exact: true }), words.setup)
  const looks = panel.getByLabel('Looks', { exact: true })
  const option = await looks.locator('option').filter({ hasText: words.look }).first().textContent()
  await choose(looks, option ?? '')
}

/** The boxes of everything on the wall, by id: equal on two screens when both show the same wall. */
export async function wall(page: Page): Promise<Record<string, string>> {
  return page
    .locator('[data-wall-id]')
    .evaluateAll((all) =>
      Object.fromEntries(
        all.map((one) => [
          one.getAttribute('data-wall-id') ?? '',
          one.getAttribute('style')?.match(/translate\([^)]*\)/)?.[0] ?? one.style.cssText,
        ]),
      ),
    )
}

/** Titles of the shots in the strip below the wall, in order. */
export async function strip(page: Page): Promise<string[]> {
  return page
    .locator('[data-shot-id]')
    .evaluateAll((all) => all.map((one) => one.textContent.match(/Picture [a-l]/)?.[0] ?? ''))
}

/** Takes something on the wall with the keyboard, moves it and lets go. */
export async function moveByKeys(page: Page, item: Locator, keys: readonly string[]): Promise<void> {
  await item.focus()
  await page.keyboard.press('Enter')
  for (const key of keys) await page.keyboard.press(key)
  await page.keyboard.press('Enter')
}

/** Moves a shot in the strip by its handle with the keyboard; positive is to the right. */
export async function moveShotByKeys(page: Page, title: string, places: number): Promise<void> {
  await page.getByRole('button', { name: new RegExp(`^Move shot \\d+ ${title}`) }).focus()
  await page.keyboard.press('Space')
  for (let step = 0; step < Math.abs(places); step++) {
    // The list moves under the hand; the next key is for where it then is.
    await page.waitForTimeout(250)
    await page.keyboard.press(places > 0 ? 'ArrowRight' : 'ArrowLeft')
  }
  await page.waitForTimeout(250)
  await page.keyboard.press('Space')
}

/** Asks for an order and waits for the end of the search: minutes spent changing over, as it stands and as proposed. */
export async function proposal(page: Page): Promise<{ standing: number; proposed: number }> {
  await page.getByRole('button', { name: 'Propose an order' }).click()
  await expect(page.getByRole('button', { name: 'Leave it' })).toBeVisible({ timeout: 30_000 })
  const figures = page.locator('.font-display.text-3xl')
  return { standing: Number(await figures.nth(0).textContent()), proposed: Number(await figures.nth(1).textContent()) }
}

/** Titles in the phone's list of all shots, in order. */
export async function shotTitles(page: Page): Promise<string[]> {
  const rows = await page.getByRole('dialog').getByRole('listitem').allTextContents()
  return rows.map((row) => /Picture [a-l]/.exec(row)?.[0] ?? '')
}

/** Whether the sign says saved at this very moment. */
export async function signSaysSaved(page: Page): Promise<boolean> {
  return page.evaluate(() => [...document.querySelectorAll('button')].some((button) => button.textContent === 'Saved'))
}
