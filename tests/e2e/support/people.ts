import { type Browser, type BrowserContext, type Page, expect } from '@playwright/test'
import { DEMO_PEOPLE } from '#server/demo/people.ts'
import type { Role } from '#shared/access/roles.ts'

export const DESK = { width: 1440, height: 900 }
export const PHONE = { width: 390, height: 844 }

export type Visit = { context: BrowserContext; page: Page; errors: string[] }

/**
 * A browser of one's own. Collects what goes wrong behind the screen: errors on the console and requests to other hosts
 * (the application must not make any).
 */
export async function visit(
  browser: Browser,
  size: { width: number; height: number },
  baseURL: string,
): Promise<Visit> {
  const phone = size.width < 600
  const context = await browser.newContext({
    viewport: size,
    baseURL,
    locale: 'en-GB',
    timezoneId: 'Europe/London',
    hasTouch: phone,
    isMobile: phone,
  })
  const page = await context.newPage()
  const errors: string[] = []
  page.on('pageerror', (error) => errors.push(`page error: ${error.message}`))
  page.on('console', (message) => {
    // A failed socket or fetch is logged by the browser itself; the screens have to deal with it, and the tests look there.
    if (message.type() === 'error' && !/WebSocket|Failed to load resource|net::ERR/.test(message.text()))
      errors.push(`console: ${message.text()}`)
  })
  page.on('request', (request) => {
    const { protocol, host } = new URL(request.url())
    if (/^(http|ws)/.test(protocol) && host !== new URL(baseURL).host)
      errors.push(`asked another host: ${request.url()}`)
  })
  return { context, page, errors }
}

/** Signs a demo person in and waits for the shoots. */
export async function signInDemo(page: Page, role: Role): Promise<void> {
  const person = DEMO_PEOPLE.find((one) => one.role === role)
  if (!person) throw new Error(`the demo has no ${role}`)
  await page.goto('/sign-in')
  await page.getByLabel('E-mail').fill(person.email)
  await page.getByLabel('Password', { exact: true }).fill(person.password)
  const shoots = page.getByRole('heading', { name: 'Shoots' })
  const tooOften = page.getByText('That was tried very often')
  // All journeys sign in from one address, which may do so only so often in a minute.
  await expect(async () => {
    await page.getByRole('button', { name: 'Sign in', exact: true }).click({ timeout: 1_000 })
    await expect(shoots.or(tooOften).first()).toBeVisible()
    await expect(shoots).toBeVisible({ timeout: 500 })
  }).toPass({ intervals: [5_000], timeout: 75_000 })
}

/** Opens the demo shoot and answers its address, `/shoots/<id>`. */
export async function openDemoShoot(page: Page): Promise<string> {
  await page
    .getByRole('link', { name: /Leaf, Brass & Star/ })
    .first()
    .click()
  await page.waitForURL(/\/shoots\/[0-9a-f-]{36}/)
  return new URL(page.url()).pathname.split('/').slice(0, 3).join('/')
}
