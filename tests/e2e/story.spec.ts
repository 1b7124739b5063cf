import { type Page, expect, test } from '@playwright/test'
import { picture } from '#tests/e2e/support/story-pictures.ts'
import { DESK, PHONE, type Visit, visit } from '#tests/e2e/support/people.ts'
import {
  addLight,
  addSet,
  createAccount,
  goTo,
  hangLook,
  invite,
  moveByKeys,
  moveShotByKeys,
  openLetter,
  planShot,
  proposal,
  saved,
  shotTitles,
  signSaysSaved,
  strip,
  wall,
} from '#tests/e2e/support/story-steps.ts'
import { type StorySite, everythingEverWritten, openStorySite } from '#tests/e2e/support/story-site.ts'

/** A shoot planned by four people at once, from an empty studio to the crew's phone. One test: every step needs the ones before. */

let site: StorySite
let photographer: Visit
let stylist: Visit
let client: Visit
let crew: Visit

test.beforeAll(async ({ browser }) => {
  site = await openStorySite()
  photographer = await visit(browser, DESK, site.url)
  stylist = await visit(browser, DESK, site.url)
  client = await visit(browser, DESK, site.url)
  crew = await visit(browser, PHONE, site.url)
})

test.afterAll(async () => {
  for (const one of [photographer, stylist, client, crew]) await one.context.close()
  await site.close()
})

test('four people plan a shoot from nothing and follow it on a phone', async () => {
  test.setTimeout(600_000)
  const lead = photographer.page

  await test.step('the photographer opens a studio and puts a flash into its kit room', async () => {
    await createAccount(lead, 'Noor Castell', 'noor@example.com')
    await lead.getByLabel('Name of the studio').fill('Attic Lane Studio')
    await lead
      .getByRole('button', { name: /open the studio|create|name it|open/i })
      .first()
      .click()
    await goTo(lead, 'Kit room')
    await lead.getByRole('button', { name: 'Add a flash unit' }).click()
    const dialog = lead.getByRole('dialog')
    await dialog.getByLabel('Name').fill('Pocket flash, guide number 44')
    await dialog
      .getByLabel(/^Guide number/)
      .first()
      .fill('44')
    await dialog.getByRole('button', { name: 'Save', exact: true }).click()
    await expect(lead.getByRole('button', { name: 'Pocket flash, guide number 44', exact: true })).toBeVisible()
  })

  await test.step('starts a shoot and writes the brief', async () => {
    await goTo(lead, 'Shoots')
    await lead.getByRole('button', { name: 'Start a shoot' }).first().click()
    await lead.getByLabel('Title').fill('Three winters')
    await lead
      .getByRole('dialog')
      .getByRole('button', { name: /^Start/ })
      .click()
    await lead.waitForURL(/\/shoots\/[0-9a-f-]{36}/)
    await goTo(lead, 'Brief')
    await lead.getByLabel('Client').fill('Hollow Kiln, tea merchants')
    await lead.getByLabel('Client').blur()
    for (const name of ['Long gallery', 'Dome']) {
      await lead.getByRole('button', { name: 'Add a room' }).click()
      await lead.getByRole('dialog').getByLabel('Name').fill(name)
      await lead.getByRole('dialog').getByRole('button', { name: 'Save' }).click()
      await expect(lead.getByRole('dialog')).toBeHidden()
    }
    await expect(lead.getByText('Dome')).toBeVisible()
  })

  await test.step('invites the others, who come in by their letters', async () => {
    await goTo(lead, 'People')
    await invite(lead, 'Mika', 'mika@example.com', 'Stylist')
    await invite(lead, 'Paz', 'paz@example.com', 'Client')
    await invite(lead, 'Bo', 'bo@example.com', 'Crew')
    for (const [one, name, email] of [
      [stylist, 'Mika Aldous', 'mika@example.com'],
      [client, 'Paz Winter', 'paz@example.com'],
      [crew, 'Bo Lindqvist', 'bo@example.com'],
    ] as const) {
      await openLetter(one.page, email)
      await one.page.getByLabel('Your name').fill(name)
      await one.page.getByRole('button', { name: 'Join the shoot' }).click()
      await one.page.waitForURL(/\/shoots\/[0-9a-f-]{36}/)
    }
    await expect(lead.getByText('Bo Lindqvist')).toBeVisible()
  })

  await test.step('the stylist writes down three sitters and four looks with their pieces', async () => {
    const page = stylist.page
    await goTo(page, 'Looks')
    await hangLook(page, {
      look: 'Night coat',
      sitter: 'Ana Brook',
      character: 'The Astronomer',
      pieces: ['Night coat, boiled wool', 'Gloves, black kid'],
      hair: 'Loose',
    })
    await hangLook(page, {
      look: 'Work coat',
      sitter: 'Emil Hart',
      character: 'The Clockmaker',
      pieces: ['Work coat, ochre drill'],
      hair: 'Tied',
    })
    await hangLook(page, { look: 'Coat open', on: 'The Clockmaker', pieces: ['Shirt, undyed linen'], hair: 'Tied' })
    await hangLook(page, {
      look: 'Long line',
      sitter: 'Ria Moss',
      character: 'The Botanist',
      pieces: ['Gown, bottle green'],
      hair: 'Cropped',
    })
    await saved(page)
  })

  await test.step('the photographer lights two setups', async () => {
    await goTo(lead, 'Lighting')
    await lead.getByRole('button', { name: 'Add a setup' }).click()
    await lead.waitForURL(/lighting\//)
    await addLight(lead, 'Main', 'Battery head 200 Ws', '90 cm octa')
    await addLight(lead, 'Rim', 'Pocket flash, guide number 44', '20° grid')
    await goTo(lead, 'Lighting')
    await lead.getByRole('button', { name: 'Add a setup' }).click()
    // The same head as in the first setup: it can stay, move or change between the two.
    await addLight(lead, 'Main', 'Battery head 200 Ws', '90 cm octa')
    await saved(lead)
    await goTo(lead, 'Lighting')
    await expect(lead.getByRole('link', { name: /Setup 2/ }).first()).toBeVisible()
  })

  await test.step('and writes twelve shots down on the board', async () => {
    await goTo(lead, 'Board')
    await lead.getByRole('button', { name: 'Add a shot' }).click()
    for (const title of SHOTS) {
      await lead.getByLabel('Title of the shot').fill(title)
      await lead.getByLabel('Title of the shot').press('Enter')
    }
    await lead.getByRole('button', { name: 'Done' }).click()
    await expect(lead.locator('[data-shot-id]')).toHaveCount(12)
    await saved(lead)
  })

  await test.step('gives them sets in two rooms, setups and looks', async () => {
    await goTo(lead, 'Running order')
    await lead.getByRole('button', { name: 'Sets and rooms' }).click()
    await addSet(lead, 'Clock wall', 'Long gallery')
    await addSet(lead, 'Under the dome', 'Dome')
    await lead.keyboard.press('Escape')
    for (const [index, title] of SHOTS.entries()) {
      const even = index % 2 === 0
      await planShot(lead, {
        title,
        set: index < 6 ? 'Clock wall' : 'Under the dome',
        setup: even ? 'Setup 1' : 'Setup 2',
        look: [/Work coat/, /Night coat/, /Coat open/, /Long line/][Math.floor(index / 3)] ?? /Night coat/,
      })
    }
    await saved(lead)
  })

  await test.step('a stylist without a signal pins a picture from the phone; it hangs waiting and arrives later', async () => {
    const page = stylist.page
    await goTo(lead, 'Board')
    await goTo(page, 'Board')
    await page.setViewportSize(PHONE)
    await saved(page)
    await stylist.context.setOffline(true)
    await page.getByLabel('Picture from the camera').setInputFiles(picture('felt-collar.webp'))
    await expect(page.getByRole('button', { name: /Offline/ }).first()).toBeVisible()
    await expect(lead.locator('[data-kind="frame"]')).toHaveCount(0)
    await stylist.context.setOffline(false)
    await expect(lead.locator('[data-kind="frame"]')).toHaveCount(1, { timeout: 20_000 })
    await expect
      .poll(
        () =>
          lead
            .locator('[data-kind="frame"] img')
            .evaluateAll((all) => all.some((one) => one instanceof HTMLImageElement && one.naturalWidth > 0)),
        { timeout: 20_000 },
      )
      .toBe(true)
    await saved(page)
    await page.setViewportSize(DESK)
  })

  await test.step('three people rearrange frames, tags and shots at once and see the same wall', async () => {
    await goTo(client.page, 'Board')
    await lead.getByTestId('add-pictures').setInputFiles([picture('one.webp'), picture('two.webp')])
    await expect(lead.locator('[data-kind="frame"]')).toHaveCount(3)
    await stylist.page.getByRole('button', { name: 'Hang a tag' }).click()
    await stylist.page.keyboard.press('Escape')
    for (const { page } of [photographer, stylist, client]) {
      await expect(page.locator('[data-kind="frame"]')).toHaveCount(3)
      await expect(page.locator('[data-kind="tag"]')).toHaveCount(1)
    }
    await Promise.all([
      moveByKeys(lead, lead.locator('[data-kind="frame"]').first(), ['ArrowRight', 'ArrowRight', 'ArrowDown']),
      moveByKeys(stylist.page, stylist.page.locator('[data-kind="tag"]').first(), [
        'ArrowDown',
        'ArrowDown',
        'ArrowRight',
      ]),
      moveShotByKeys(client.page, 'Picture c', 2),
      moveShotByKeys(lead, 'Picture k', -1),
    ])
    await Promise.all([saved(lead), saved(stylist.page), saved(client.page)])
    const seen = await wall(lead)
    const order = await strip(lead)
    expect(new Set(order).size).toBe(12)
    expect(order).not.toEqual(SHOTS)
    for (const { page } of [stylist, client]) {
      await expect.poll(() => strip(page)).toEqual(order)
      await expect.poll(() => wall(page)).toEqual(seen)
    }
  })

  await test.step('a light moved in the plan drawing changes changeovers, the proposed order and the crew’s card', async () => {
    const card = crew.page
    await goTo(card, 'Day')
    await card.getByRole('button', { name: 'All shots' }).click()
    await card
      .getByRole('dialog')
      .getByRole('button', { name: /^Shot 2,/ })
      .click()
    await card.getByRole('menuitem', { name: 'Begin this one now' }).click()
    await expect(card.getByRole('dialog')).toBeHidden()
    const cardBefore = await card.getByRole('list').first().textContent()
    await goTo(lead, 'Running order')
    const before = await proposal(lead)
    await lead.getByRole('button', { name: 'Leave it' }).click()
    await goTo(lead, 'Lighting')
    await lead
      .getByRole('link', { name: /Setup 2/ })
      .first()
      .click()
    const main = lead.locator('[aria-roledescription="movable part"][aria-label^="Main"]').first()
    const stood = (await main.getAttribute('aria-label')) ?? ''
    await main.focus()
    await lead.keyboard.press('Enter')
    for (let press = 0; press < 3; press++) await lead.keyboard.press('Shift+ArrowLeft')
    await lead.keyboard.press('Enter')
    await expect(main).not.toHaveAttribute('aria-label', stood)
    await saved(lead)
    await goTo(lead, 'Running order')
    const after = await proposal(lead)
    expect(after.standing).toBeGreaterThan(before.standing)
    expect(after.proposed).toBeGreaterThan(before.proposed)
    await expect.poll(() => card.getByRole('list').first().textContent()).not.toBe(cardBefore)
    await expect(card.getByRole('list').first()).toContainText(/Main: add, camera left, 2\.\d m/)
  })

  await test.step('the photographer takes the proposal and everybody sees the new order', async () => {
    await lead.getByRole('button', { name: 'Use this order' }).click()
    await saved(lead)
    await goTo(lead, 'Board')
    await expect(lead.locator('[data-shot-id]')).toHaveCount(12)
    const order = await strip(lead)
    await expect.poll(() => strip(client.page)).toEqual(order)
    await crew.page.getByRole('button', { name: 'All shots' }).click()
    await expect.poll(() => shotTitles(crew.page)).toEqual(order)
    await crew.page.keyboard.press('Escape')
  })

  await test.step('the client signs a look off; gloves changed afterwards un-sign it and say what changed', async () => {
    const { page } = client
    await goTo(page, 'Sign-off')
    await page
      .getByRole('button', { name: /Night coat/ })
      .first()
      .click()
    await page.getByRole('button', { name: 'Sign off this look' }).click()
    await expect(page.getByText(/Signed off by you/)).toBeVisible()
    await goTo(stylist.page, 'Looks')
    await stylist.page
      .getByRole('button', { name: /Night coat/ })
      .first()
      .click()
    await stylist.page
      .getByRole('button', { name: /Gloves, black kid/ })
      .first()
      .click()
    await stylist.page.getByLabel('Piece', { exact: true }).fill('Gloves, grey wool')
    await stylist.page.getByLabel('Piece', { exact: true }).blur()
    await saved(stylist.page)
    const box = page.getByText(/Changed since you signed off/).locator('..')
    await expect(box).toContainText('black kid')
    await expect(box).toContainText('grey wool')
  })

  await test.step('the crew’s phone follows the day', async () => {
    const { page } = crew
    const start = page.getByRole('button', { name: 'Start', exact: true })
    if (await start.isVisible()) await start.click()
    const number = await page.getByRole('heading', { level: 1 }).textContent()
    await page.getByRole('checkbox').first().check({ force: true })
    await page.getByRole('button', { name: 'Got it' }).click()
    await expect(page.getByRole('heading', { level: 1 })).not.toHaveText(number ?? '')
    await page.getByRole('button', { name: 'Skip', exact: true }).click()
    await page.getByRole('button', { name: 'Skip this shot' }).click()
    await saved(page)
    await goTo(lead, 'On the day')
    await expect(lead.getByRole('complementary').getByText(/^got/)).toHaveCount(1)
  })

  await test.step('kill -9 in the middle of typing: what was called saved is in the database, and nobody loses a word', async () => {
    for (const { page } of [photographer, stylist, client]) await goTo(page, 'Board')
    const writers = [lead, stylist.page, client.page]
    for (const page of writers) await page.getByRole('button', { name: 'Write a note' }).click()
    const claimed: string[] = []
    const typed: string[] = []
    let isDown = false
    const type = async (page: Page, who: string) => {
      for (let n = 0; !isDown && n < 400; n++) {
        const words = `${who} writes ${n}`
        await page.getByRole('textbox', { name: NOTE }).first().fill(words)
        typed.push(words)
        await page.waitForTimeout((n % 4) * 250)
        // Said on the screen at this moment: it must then be true for ever.
        if (await signSaysSaved(page)) claimed.push(words)
      }
    }
    const typing = Promise.all([type(lead, 'Noor'), type(stylist.page, 'Mika'), type(client.page, 'Paz')])
    await lead.waitForTimeout(6000)
    await site.kill()
    isDown = true
    await typing
    const kept = await everythingEverWritten(site.databaseUrl)
    expect(claimed.length).toBeGreaterThan(3)
    expect(claimed.filter((words) => !kept.includes(words))).toEqual([])
    await expect(lead.getByRole('button', { name: /Offline|Saving/ }).first()).toBeVisible()
    await site.startAgain()
    await Promise.all(writers.map(saved))
    const last = ['Noor', 'Mika', 'Paz'].map((who) => typed.filter((words) => words.startsWith(who)).at(-1) ?? '')
    for (const words of last) {
      for (const page of writers) await expect(page.locator('[data-kind="note"]', { hasText: words })).toHaveCount(1)
    }
  })

  for (const one of [photographer, stylist, client, crew]) expect(one.errors).toEqual([])
})

const SHOTS = Array.from({ length: 12 }, (_, index) => `Picture ${'abcdefghijkl'[index] ?? ''}`)
const NOTE = /note|text/i
