import { type Browser, type Page, expect, test } from '@playwright/test'
import type { Role } from '#shared/access/roles.ts'
import { DESK, PHONE, type Visit, openDemoShoot, signInDemo, visit } from '#tests/e2e/support/people.ts'
import { addOffered, drag, dragByTouch, hold, middleOf, part, placeOf, tabTo } from '#tests/e2e/support/setup-steps.ts'
import { saved } from '#tests/e2e/support/story-steps.ts'

type Size = { width: number; height: number }

/** Somebody in the demo shoot's lighting. */
async function inLighting(browser: Browser, url: string, size: Size, role: Role = 'photographer'): Promise<Visit> {
  const one = await visit(browser, size, url)
  await signInDemo(one.page, role)
  await one.page.goto(`${await openDemoShoot(one.page)}/lighting`)
  await expect(one.page.getByRole('heading', { name: 'Lighting', level: 1 })).toBeVisible()
  return one
}

async function addSetup(page: Page): Promise<string> {
  await page.getByRole('button', { name: 'Add a setup' }).click()
  await page.waitForURL(/lighting\/[0-9a-f-]{36}/)
  return new URL(page.url()).pathname
}

const undo = (page: Page) => page.getByRole('button', { name: 'Undo', exact: true }).click()
const labelOf = (page: Page, name: string, drawing: 'plan' | 'side' = 'plan') =>
  part(page, name, drawing).getAttribute('aria-label')

test('a setup is built with the mouse, step by step, and every step is one undo', async ({ browser, baseURL }) => {
  const { page, context, errors } = await inLighting(browser, baseURL ?? '', DESK)
  await addSetup(page)

  await test.step('the empty setup offers the main, then what is usually next', async () => {
    await addOffered(page, 'Add the main')
    await expect(part(page, 'Main')).toBeVisible()
    await addOffered(page, 'Add the background light')
    await page.getByRole('button', { name: 'Add a panel', exact: true }).click()
    await addOffered(page, 'Add the rim')
    await expect(page.getByText(/^Next, if/)).toBeHidden()
  })

  await test.step('dragging shows distances and angles, snaps to the camera’s axis, and Escape takes it back', async () => {
    const stood = await labelOf(page, 'Main')
    const main = await middleOf(part(page, 'Main'))
    const camera = await middleOf(part(page, 'Camera'))
    await hold(page, part(page, 'Main'), camera.x + 5 - main.x, 20)
    await expect(page.getByTestId('readout')).toContainText('To the eyes')
    await expect(page.getByTestId('readout')).toContainText('on the camera’s axis')
    await expect(page.getByTestId('readout')).toContainText(/\d+° above the eye line/)
    await page.keyboard.press('Escape')
    await page.mouse.up()
    await expect(page.getByTestId('readout')).toBeHidden()
    expect(await labelOf(page, 'Main')).toBe(stood)
  })

  await test.step('in the plan only the place changes, from the side only height and depth', async () => {
    await part(page, 'Main').click()
    const [right, , height] = await placeOf(page)
    await drag(page, part(page, 'Main'), -60, 0)
    const inPlan = await placeOf(page)
    expect(inPlan[0]).not.toBe(right)
    expect(inPlan[2]).toBe(height)
    await drag(page, part(page, 'Main', 'side'), 0, -24)
    const fromSide = await placeOf(page)
    expect(fromSide[0]).toBe(inPlan[0])
    expect(Number(fromSide[2])).toBeGreaterThan(Number(height))
    await undo(page)
    await expect.poll(() => placeOf(page)).toEqual(inPlan)
  })

  await test.step('numbers are typed in feet and inches, by distance and angle too', async () => {
    await page.getByRole('button', { name: /^Lengths in metres/ }).click()
    const group = page.getByRole('group', { name: 'Where it stands' })
    await group.getByLabel('Height').fill(`6' 6"`)
    await group.getByLabel('Height').press('Enter')
    await group.getByLabel('Measured').selectOption({ label: 'From the eyes: distance, angle, height' })
    await group.getByLabel('To the eyes').fill('5.5 ft')
    await group.getByLabel('To the eyes').press('Enter')
    await group.getByLabel('Angle (left −)').fill('-45')
    await group.getByLabel('Angle (left −)').press('Enter')
    await expect(group.getByLabel('To the eyes')).toHaveValue(`5' 6"`)
    await expect(page.getByText(/Reads f\/[\d.]+ at the sitter, 5′ 6″ off/)).toBeVisible()
    await page.getByRole('button', { name: /^Lengths in feet/ }).click()
    await expect(group.getByLabel('To the eyes')).toHaveValue('1.68')
    await expect(group.getByLabel('Height')).toHaveValue('1.98')
    await expect(group.getByLabel('Angle (left −)')).toHaveValue('-45')
  })

  await test.step('a light is switched off and says so; the setup is mirrored and taken back', async () => {
    await page.getByRole('checkbox', { name: /^Switched on/ }).uncheck()
    await expect(page.getByText(/· main, off/)).toBeVisible()
    await undo(page)
    await expect(page.getByText(/· main, off/)).toBeHidden()
    const left = await labelOf(page, 'Main')
    await page.getByRole('button', { name: 'More for this setup' }).click()
    await page.getByRole('menuitem', { name: 'Mirror, left to right' }).click()
    await expect(part(page, 'Main')).toHaveAttribute('aria-label', (left ?? '').replace('left', 'right'))
    await undo(page)
    await expect(part(page, 'Main')).toHaveAttribute('aria-label', left ?? '')
  })

  await saved(page)
  expect(errors).toEqual([])
  await context.close()
})

test('a setup is built with the keyboard alone', async ({ browser, baseURL }) => {
  const { page, context, errors } = await inLighting(browser, baseURL ?? '', DESK)
  await tabTo(page, /^Add a setup$/)
  await page.keyboard.press('Enter')
  await page.waitForURL(/lighting\/[0-9a-f-]{36}/)
  for (const button of ['Add the main', 'Add the background light']) {
    await tabTo(page, new RegExp(`^${button}$`))
    await page.keyboard.press('Enter')
    await expect(page.getByRole('dialog')).toBeVisible()
    await tabTo(page, new RegExp(`^${button}$`))
    await page.keyboard.press('Enter')
    await expect(page.getByRole('dialog')).toBeHidden()
  }
  const stood = await labelOf(page, 'Main')
  await tabTo(page, /^Main, .*(?<!side)$/)
  await page.keyboard.press('Enter')
  await page.keyboard.press('Shift+ArrowLeft')
  await page.keyboard.press('Escape')
  expect(await labelOf(page, 'Main')).toBe(stood)
  await page.keyboard.press('Enter')
  await page.keyboard.press('Shift+ArrowLeft')
  await page.keyboard.press('ArrowUp')
  await page.keyboard.press('Enter')
  await expect(part(page, 'Main')).toHaveAttribute('aria-label', /^Main, 1\.5 m left, 0\.9 m towards the camera/)
  await expect(page.getByRole('status').filter({ hasText: 'Main put down' })).toHaveCount(1)
  const [, , height] = await placeOf(page)
  await tabTo(page, /^Main, .*seen from the side$/)
  for (const key of ['Enter', 'ArrowUp', 'Enter']) await page.keyboard.press(key)
  await expect.poll(async () => Number((await placeOf(page))[2])).toBeCloseTo(Number(height) + 0.1, 2)
  await page.keyboard.press('Control+z')
  await expect.poll(async () => (await placeOf(page))[2]).toBe(height)
  await saved(page)
  expect(errors).toEqual([])
  await context.close()
})

test('a setup is built on a phone with a finger', async ({ browser, baseURL }) => {
  const { page, context, errors } = await inLighting(browser, baseURL ?? '', PHONE)
  await addSetup(page)
  await addOffered(page, 'Add the main')
  for (const name of ['Main', 'Camera', 'Sitter']) {
    const box = await part(page, name).boundingBox()
    expect(Math.min(box?.width ?? 0, box?.height ?? 0), `${name} can be hit with a finger`).toBeGreaterThanOrEqual(44)
  }
  const stood = await labelOf(page, 'Main')
  await dragByTouch(page, part(page, 'Main'), -40, 30)
  await expect(part(page, 'Main')).not.toHaveAttribute('aria-label', stood ?? '')
  expect(await page.evaluate(() => window.scrollY)).toBe(0)
  await page.getByRole('button', { name: 'Change', exact: true }).click()
  const height = (await placeOf(page))[2]
  await page.getByRole('button', { name: 'Close' }).click()
  await part(page, 'Main', 'side').scrollIntoViewIfNeeded()
  await dragByTouch(page, part(page, 'Main', 'side'), 0, -20)
  await page.getByRole('button', { name: 'Change', exact: true }).click()
  await expect.poll(async () => Number((await placeOf(page))[2])).toBeGreaterThan(Number(height))
  await page.getByRole('button', { name: 'Close' }).click()
  await saved(page)
  expect(errors).toEqual([])
  await context.close()
})

test('two people drag different lights at once and both see both', async ({ browser, baseURL }) => {
  const lead = await inLighting(browser, baseURL ?? '', DESK)
  const path = await addSetup(lead.page)
  await addOffered(lead.page, 'Add the main')
  await addOffered(lead.page, 'Add the background light')
  await saved(lead.page)
  const crew = await inLighting(browser, baseURL ?? '', DESK, 'crew')
  await crew.page.goto(path)
  await expect(part(crew.page, 'Main')).toBeVisible()
  await lead.page.getByRole('button', { name: 'Readings', exact: true }).click()
  const stood = {
    main: (await labelOf(lead.page, 'Main')) ?? '',
    background: (await labelOf(lead.page, 'Background light')) ?? '',
  }

  await hold(lead.page, part(lead.page, 'Main'), -70, 30)
  await hold(crew.page, part(crew.page, 'Background light'), 70, 20)
  // While both still hold: each sees the other's light move, with the other's name, and nothing is written.
  await expect(part(crew.page, 'Main')).not.toHaveAttribute('aria-label', stood.main)
  await expect(part(crew.page, 'Main')).toContainText('Ines')
  await expect(part(lead.page, 'Background light')).not.toHaveAttribute('aria-label', stood.background)
  await expect(part(lead.page, 'Background light')).toContainText(/Tomas|Tomás/)
  await lead.page.mouse.up()
  await crew.page.mouse.up()

  await Promise.all([saved(lead.page), saved(crew.page)])
  for (const name of ['Main', 'Background light']) {
    const here = await labelOf(lead.page, name)
    expect(here).not.toBe(name === 'Main' ? stood.main : stood.background)
    await expect(part(crew.page, name)).toHaveAttribute('aria-label', here ?? '')
  }

  await test.step('a drop in the plan leaves the height that somebody else types meanwhile', async () => {
    await hold(lead.page, part(lead.page, 'Main'), 20, 20)
    await crew.page.locator('aside').getByRole('button', { name: 'Readings', exact: true }).click()
    await part(crew.page, 'Main', 'side').click()
    const height = crew.page.getByRole('group', { name: 'Where it stands' }).getByLabel('Height')
    await height.fill('2.35')
    await height.press('Enter')
    await saved(crew.page)
    await lead.page.waitForTimeout(300)
    await lead.page.mouse.up()
    await saved(lead.page)
    await expect.poll(async () => (await placeOf(lead.page))[2]).toBe('2.35')
    await expect.poll(async () => (await placeOf(crew.page)).join()).toBe((await placeOf(lead.page)).join())
  })

  await test.step('and one’s undo takes back only one’s own', async () => {
    const background = await labelOf(lead.page, 'Background light')
    await undo(lead.page)
    await expect(part(lead.page, 'Background light')).toHaveAttribute('aria-label', background ?? '')
  })
  expect([...lead.errors, ...crew.errors]).toEqual([])
  await lead.context.close()
  await crew.context.close()
})
