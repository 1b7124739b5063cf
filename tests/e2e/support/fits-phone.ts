import { type Locator, type Page, expect } from '@playwright/test'

/** Least side of what a finger has to hit, CSS pixels (WCAG 2.2, success criterion 2.5.5). */
const FINGER_PX = 44

/** What can be pressed and is smaller than a finger, by its name; targets inside a sentence are let through, as in 2.5.5. */
async function tooSmall(within: Locator): Promise<string[]> {
  return within.evaluate((root, least) => {
    const all = [...root.querySelectorAll<HTMLElement>('button, a[href], input, select, textarea, summary')]
    return all.flatMap((one) => {
      const target = one instanceof HTMLInputElement && one.labels?.[0]?.contains(one) ? one.labels[0] : one
      const box = target.getBoundingClientRect()
      const isHidden = box.width < 2 || box.height < 2 || !one.checkVisibility()
      const isInSentence = getComputedStyle(target).display === 'inline' && target.closest('p') !== null
      if (isHidden || isInSentence || Math.min(box.width, box.height) >= least - 0.5) return []
      const name = one.getAttribute('aria-label') ?? (one.textContent || one.id)
      return [`${name.trim()}: ${Math.round(box.width)} × ${Math.round(box.height)}`]
    })
  }, FINGER_PX)
}

/** Nothing is wider than the phone, and everything in it can be hit with a finger. */
export async function fitsPhone(page: Page, within: Locator, name: string): Promise<void> {
  const wide = await page.evaluate(() => document.documentElement.scrollWidth - document.documentElement.clientWidth)
  expect(wide, `${name} is wider than the screen`).toBeLessThanOrEqual(0)
  const cut = await within.evaluate((root) => {
    const edge = document.documentElement.clientWidth
    return [...root.querySelectorAll<HTMLElement>('*')].flatMap((one) => {
      const box = one.getBoundingClientRect()
      const isCut = box.width > 1 && one.checkVisibility() && (box.right > edge + 1 || box.left < -1)
      return isCut ? [`${one.tagName} ${one.textContent.slice(0, 40)}`] : []
    })
  })
  expect(cut, `${name}: cut off`).toEqual([])
  expect(await tooSmall(within), `${name}: smaller than a finger`).toEqual([])
}
