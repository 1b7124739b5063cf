import { type Locator, type Page, expect } from '@playwright/test'

/** What people do in the drawings of a lighting setup. */

/** A part in the plan (or seen from the side) by how its name begins. */
export function part(page: Page, name: string, drawing: 'plan' | 'side' = 'plan'): Locator {
  const side = ', seen from the side'
  const end = drawing === 'side' ? `[aria-label$="${side}"]` : `:not([aria-label$="${side}"])`
  return page.locator(`[aria-roledescription="movable part"][aria-label^="${name},"]${end}`)
}

export async function middleOf(locator: Locator): Promise<{ x: number; y: number }> {
  const box = await locator.boundingBox()
  if (!box) throw new Error('it is not drawn')
  return { x: box.x + box.width / 2, y: box.y + box.height / 2 }
}

/** Takes a part with the mouse and holds it this far from where it was; nothing is let go. */
export async function hold(page: Page, locator: Locator, dx: number, dy: number): Promise<void> {
  const { x, y } = await middleOf(locator)
  await page.mouse.move(x, y)
  await page.mouse.down()
  await page.mouse.move(x + dx / 2, y + dy / 2, { steps: 4 })
  await page.mouse.move(x + dx, y + dy, { steps: 4 })
}

export async function drag(page: Page, locator: Locator, dx: number, dy: number): Promise<void> {
  await hold(page, locator, dx, dy)
  await page.mouse.up()
}

/** Drags with one finger: the browser's own touches, as a phone makes them. */
export async function dragByTouch(page: Page, locator: Locator, dx: number, dy: number): Promise<void> {
  const { x, y } = await middleOf(locator)
  const cdp = await page.context().newCDPSession(page)
  const touch = (type: 'touchStart' | 'touchMove' | 'touchEnd', share: number) =>
    cdp.send('Input.dispatchTouchEvent', {
      type,
      touchPoints: type === 'touchEnd' ? [] : [{ x: x + dx * share, y: y + dy * share }],
    })
  await touch('touchStart', 0)
  for (const share of [0.1, 0.3, 0.6, 0.9, 1]) await touch('touchMove', share)
  await touch('touchEnd', 1)
  await cdp.detach()
}

/** Presses Tab until what has the focus is named like this. */
export async function tabTo(page: Page, name: RegExp): Promise<void> {
  for (let press = 0; press < 150; press++) {
    await page.keyboard.press('Tab')
    const own = await page.evaluate(() => {
      const element = document.activeElement
      return element ? (element.getAttribute('aria-label') ?? element.textContent) : ''
    })
    if (name.test(own)) return
  }
  throw new Error(`Tab never comes to ${name}`)
}

/** Presses the next step that is offered and takes what the dialog begins with. */
export async function addOffered(page: Page, button: string): Promise<void> {
  await page.getByRole('button', { name: button, exact: true }).click()
  const dialog = page.getByRole('dialog')
  await dialog.getByRole('button', { name: button, exact: true }).click()
  await expect(dialog).toBeHidden()
}

/** The numbers of the chosen light: right, front, height. */
export async function placeOf(page: Page): Promise<string[]> {
  const group = page.getByRole('group', { name: 'Where it stands' })
  return Promise.all(
    ['Right (left −)', 'Front (back −)', 'Height'].map((name) => group.getByLabel(name).first().inputValue()),
  )
}
