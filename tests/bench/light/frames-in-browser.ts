import { mkdtemp, readFile, rm } from 'node:fs/promises'
import { createServer } from 'node:http'
import { tmpdir } from 'node:os'
import { extname, join } from 'node:path'
import { fileURLToPath } from 'node:url'
import { chromium } from 'playwright-core'
import { build } from 'vite'
import { z } from 'zod'
import { FRAME_TARGETS_MS } from './frames.ts'

const TYPES: Readonly<Record<string, string>> = { '.html': 'text/html', '.js': 'text/javascript' }

const timesSchema = z.object({
  hands: z.number(),
  rough: z.number(),
  dragged: z.number(),
  fine: z.number(),
  power: z.number(),
  large: z.number(),
  pauseMs: z.number(),
})

/** The test frames of four lights in Chromium, with the screen's own workers: one of them, and two. */
export async function* benchFramesInBrowser(): AsyncIterable<object> {
  const folder = await mkdtemp(join(tmpdir(), 'sconce-frames-'))
  await build({
    configFile: false,
    root: fileURLToPath(new URL('page', import.meta.url)),
    base: '/',
    logLevel: 'warn',
    worker: { format: 'es' },
    build: { outDir: folder, emptyOutDir: true, target: 'es2023' },
  })
  const server = createServer((request, response) => {
    const path = request.url === '/' ? '/index.html' : (request.url ?? '')
    readFile(join(folder, path)).then(
      (bytes) => response.writeHead(200, { 'content-type': TYPES[extname(path)] ?? 'text/plain' }).end(bytes),
      () => response.writeHead(404).end(),
    )
  })
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve))
  const address = server.address()
  const port = typeof address === 'object' && address !== null ? address.port : 0
  const browser = await chromium.launch({
    executablePath: '/usr/bin/chromium',
    args: ['--no-sandbox', '--disable-gpu'],
  })
  try {
    for (const hands of [1, 2]) {
      const page = await browser.newPage()
      await page.goto(`http://127.0.0.1:${port}/`)
      await page.waitForFunction('typeof measure === "function"')
      const times = timesSchema.parse(await page.evaluate(`measure(${hands})`))
      await page.close()
      const where = `chromium, ${hands === 1 ? 'one worker' : 'two workers'}`
      for (const [what, ms, targetMs] of [
        ['first rough strip, worker started', times.rough, FRAME_TARGETS_MS.rough],
        ['rough strip, one light moved', times.dragged, FRAME_TARGETS_MS.rough],
        ['fine strip', times.fine, FRAME_TARGETS_MS.fine],
        ['change of power, all four pictures', times.power, FRAME_TARGETS_MS.power],
        ['large view', times.large, FRAME_TARGETS_MS.large],
        ['longest pause of the page meanwhile', times.pauseMs, 50],
      ] as const)
        yield { what, where, ms: Number(ms.toFixed(1)), targetMs, met: ms <= targetMs }
    }
  } finally {
    await browser.close()
    server.close()
    await rm(folder, { recursive: true, force: true })
  }
}
