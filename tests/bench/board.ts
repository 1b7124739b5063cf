import { gzipSync } from 'node:zlib'
import { type Browser, type Page, chromium } from 'playwright-core'
import { DEMO_PEOPLE } from '#server/demo/people.ts'
import { ensureBuilt } from '#server/start/build.mjs'
import { startAppProcess } from '#tests/support/app-process.ts'
import { startMigratedCluster } from '#tests/support/migrated-cluster.ts'
import { cloneTemplate } from '#tests/support/template.ts'
import { putBigBoard } from './board/big-board.ts'

/**
 * The board in a browser: how smooth a drag is with 500 things in sight of the wall, and how long a cold open of 1,000
 * things takes until every frame in sight is painted and a drag is answered. Database, server and browser share the
 * machine; the browser draws without a graphics card.
 */
const DRAG_MS = 5_000
const FLAGS = [
  '--headless',
  '--no-sandbox',
  '--disable-gpu',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
]

function quantile(sorted: readonly number[], share: number): number {
  return sorted[Math.min(sorted.length - 1, Math.floor(sorted.length * share))] ?? NaN
}

const round = (value: number): number => Math.round(value * 10) / 10

async function signedIn(browser: Browser, url: string): Promise<Page> {
  const context = await browser.newContext({ viewport: { width: 1440, height: 900 }, serviceWorkers: 'block' })
  const page = await context.newPage()
  const [person] = DEMO_PEOPLE
  const answer = await page.request.post(`${url}/api/auth/sign-in/email`, {
    data: { email: person?.email, password: person?.password },
    headers: { origin: url },
  })
  if (!answer.ok()) throw new Error(`no sign-in: ${answer.status()}`)
  return page
}

/** Milliseconds from one frame to the next while a print is dragged in circles. */
async function dragFrames(page: Page): Promise<number[]> {
  const frame = page.locator('[data-kind=frame]').first()
  const box = await frame.boundingBox()
  if (!box) throw new Error('no frame in sight')
  const [x, y] = [box.x + box.width / 2, box.y + box.height / 3]
  await page.mouse.move(x, y)
  await page.mouse.down()
  // As text: what compiles this file would give the inner function a helper that the page does not have.
  await page.evaluate(`
    window.frameTimes = []
    requestAnimationFrame(function tick(now) {
      window.frameTimes.push(now)
      requestAnimationFrame(tick)
    })
  `)
  const startMs = Date.now()
  while (Date.now() - startMs < DRAG_MS) {
    const angle = (Date.now() - startMs) / 300
    await page.mouse.move(x + 160 + 150 * Math.cos(angle), y + 120 + 110 * Math.sin(angle))
  }
  const times = await page.evaluate<number[]>('window.frameTimes')
  await page.mouse.up()
  return times.slice(1).map((time, index) => time - (times[index] ?? time))
}

/** From navigation to all frames in sight painted, and to a drag answered, ms; and the scripts' size, gzipped. */
async function coldOpen(page: Page, address: string) {
  const scripts: Promise<number>[] = []
  page.on('response', (response) => {
    if (response.url().endsWith('.js'))
      scripts.push(
        response.body().then(
          (body) => gzipSync(body).length,
          () => 0,
        ),
      )
  })
  await page.goto(address, { waitUntil: 'commit' })
  const painted = await page.waitForFunction(() => {
    const prints = [...document.querySelectorAll<HTMLImageElement>('[data-kind=frame] img')].filter((img) => {
      const { left, right, top, bottom } = img.getBoundingClientRect()
      return right > 0 && bottom > 0 && left < innerWidth && top < innerHeight
    })
    return prints.length > 3 && prints.every((img) => img.complete && img.naturalWidth > 0) ? performance.now() : false
  })
  const paintedMs = Number(await painted.jsonValue())
  const frame = page.locator('[data-kind=frame]').first()
  const box = await frame.boundingBox()
  if (!box) throw new Error('no frame in sight')
  const before = await frame.evaluate((element) => element.style.transform)
  await page.mouse.move(box.x + 40, box.y + 40)
  await page.mouse.down()
  await page.mouse.move(box.x + 90, box.y + 80, { steps: 2 })
  const answered = await page.waitForFunction((was) => {
    const held = document.querySelector<HTMLElement>('[data-held]')
    return held && held.style.transform !== was ? performance.now() : false
  }, before)
  const answeredMs = Number(await answered.jsonValue())
  await page.keyboard.press('Escape')
  await page.mouse.up()
  const sizes = await Promise.all(scripts)
  return { paintedMs, answeredMs, scriptBytes: sizes.reduce((sum, size) => sum + size, 0) }
}

await ensureBuilt()
const cluster = await startMigratedCluster()
const browser = await chromium.launch({ executablePath: process.env['CHROMIUM'] ?? '/usr/bin/chromium', args: FLAGS })
try {
  const measure = async <T>(
    items: number,
    pictures: number,
    run: (page: Page, board: string) => Promise<T>,
  ): Promise<T> => {
    const database = await cloneTemplate(cluster.url)
    const shootId = await putBigBoard(database.url, items, pictures)
    const app = await startAppProcess({ databaseUrl: database.url })
    try {
      const page = await signedIn(browser, app.url)
      const result = await run(page, `${app.url}/shoots/${shootId}/board`)
      await page.context().close()
      return result
    } finally {
      await app.stop()
    }
  }
  const drag = async (page: Page, board: string, all: boolean) => {
    await page.goto(board)
    await page.waitForSelector('[data-kind=frame]')
    // Everything in sight, so that all of it is drawn.
    if (all) await page.getByRole('button', { name: 'Show everything' }).click()
    await page.waitForLoadState('networkidle')
    const drawn = await page.locator('[data-wall-id]').count()
    const frames = (await dragFrames(page)).sort((a, b) => a - b)
    return {
      drawn,
      frames: frames.length,
      p50Ms: round(quantile(frames, 0.5)),
      p95Ms: round(quantile(frames, 0.95)),
      maxMs: round(quantile(frames, 1)),
    }
  }
  const near = await measure(500, 300, (page, board) => drag(page, board, false))
  const whole = await measure(500, 300, (page, board) => drag(page, board, true))
  const open = await measure(1000, 200, coldOpen)
  const result = {
    bench: 'board',
    drag500: near,
    drag500AllInSight: whole,
    open1000: {
      paintedMs: Math.round(open.paintedMs),
      dragAnsweredMs: Math.round(open.answeredMs),
      scriptKb: round(open.scriptBytes / 1024),
    },
    budget: { dragP95Ms: 32, dragAnsweredMs: 1500, scriptKb: 250 },
  }
  process.stdout.write(`${JSON.stringify(result)}\n`)
} finally {
  await browser.close()
  await cluster.stop()
}
