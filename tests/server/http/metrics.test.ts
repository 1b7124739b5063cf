import { request } from 'node:http'
import { eq } from 'drizzle-orm'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { rtDoc, rtQuarantine } from '#server/db/schema/realtime.ts'
import { connectDatabase } from '#server/db/client.ts'
import { watchLoopDelay } from '#server/http/loop-delay.ts'
import { startProxy } from '#tests/realtime/support/proxy.ts'
import { type TestApp, quietFigures, startTestApp } from '#tests/support/app.ts'
import { clockAt } from '#tests/support/clock.ts'
import { type World, makeWorld } from '#tests/support/factories.ts'

const token = 'lamps and ladders'.replaceAll(' ', '-')
const busy = {
  ...quietFigures,
  rooms: 3,
  connections: 41,
  lagging: 2,
  instances: 1,
  queuedEntries: 12,
  queuedBytes: 34_567,
  oldestMs: 250,
  commits: 901,
  rows: 4_321,
  failures: 5,
  commitMs: { p50: 2.4, p95: 4, p99: 9, max: 12.5 },
  compactions: 6,
}

let figures = busy
let app: TestApp
let world: World
beforeAll(async () => {
  const loopDelay = () => ({ p50: 0.3, p95: 1, p99: 2, max: 30 })
  app = await startTestApp({
    metrics: { stats: () => figures, loopDelay, version: '1.2.3', token },
    clock: clockAt('2026-10-14T06:42:10Z'),
  })
  world = await makeWorld(app)
})
afterAll(() => app.close())

type Answer = { status: number; headers: Record<string, string | string[] | undefined>; text: string }

/** Asks with exactly these headers, Host among them. */
function ask(headers: Record<string, string> = {}, url = app.url): Promise<Answer> {
  return new Promise((resolve, reject) => {
    request(`${url}/metrics`, { headers }, (response) => {
      let text = ''
      response.on('data', (chunk) => (text += String(chunk)))
      response.on('end', () => resolve({ status: response.statusCode ?? 0, headers: response.headers, text }))
    })
      .on('error', reject)
      .end()
  })
}

/** Names, types and samples, by the grammar of the text format: anything it does not allow throws. */
function parse(text: string): { types: Map<string, string>; samples: Map<string, number> } {
  const types = new Map<string, string>()
  const samples = new Map<string, number>()
  expect(text.endsWith('\n')).toBe(true)
  for (const line of text.slice(0, -1).split('\n')) {
    const type = /^# TYPE ([a-zA-Z_:][a-zA-Z0-9_:]*) (counter|gauge|histogram|summary|info|untyped)$/.exec(line)
    const sample =
      /^([a-zA-Z_:][a-zA-Z0-9_:]*(?:\{[a-zA-Z_][a-zA-Z0-9_]*="(?:[^"\\\n]|\\["\\n])*"\})?) (-?\d+(?:\.\d+)?(?:e[+-]?\d+)?)$/.exec(
        line,
      )
    if (type?.[1] && type[2]) {
      if (types.has(type[1])) throw new Error(`two types of ${type[1]}`)
      types.set(type[1], type[2])
    } else if (sample?.[1]) samples.set(sample[1], Number(sample[2]))
    else if (line !== '# EOF' && !/^# HELP [a-zA-Z_:][a-zA-Z0-9_:]* [^\\\n]*$/.test(line))
      throw new Error(`not of the format: ${line}`)
  }
  return { types, samples }
}

describe('the figures for collectors', () => {
  it('hold everything in base units', async () => {
    const answer = await ask()
    expect(answer.status).toBe(200)
    expect(answer.headers['content-type']).toMatch(/^text\/plain;.* version=0\.0\.4/)
    expect(answer.headers['cache-control']).toBe('no-store')
    const { types, samples } = parse(answer.text)
    expect(Object.fromEntries(samples)).toMatchObject({
      sconce_rooms: 3,
      sconce_connections: 41,
      sconce_lagging_readers: 2,
      sconce_other_instances: 1,
      sconce_queued_entries: 12,
      sconce_queued_bytes: 34_567,
      sconce_oldest_wait_seconds: 0.25,
      sconce_commits_total: 901,
      sconce_rows_total: 4_321,
      sconce_failed_commits_total: 5,
      'sconce_commit_seconds{quantile="0.5"}': 0.0024,
      'sconce_commit_seconds{quantile="1.0"}': 0.0125,
      sconce_compactions_total: 6,
      sconce_failed_compaction_checks_total: 0,
      sconce_database_up: 1,
      'sconce_event_loop_delay_seconds{quantile="0.99"}': 0.002,
      'sconce_build_info{version="1.2.3"}': 1,
    })
    expect(samples.get('sconce_resident_memory_bytes')).toBeGreaterThan(1024 * 1024)
    expect(samples.get('sconce_uptime_seconds')).toBeGreaterThan(0)
    expect(types.get('sconce_commits_total')).toBe('counter')
    expect(types.get('sconce_commit_seconds')).toBe('summary')
  })

  it('come as OpenMetrics to who asks for it', async () => {
    const answer = await ask({ accept: 'application/openmetrics-text;version=1.0.0,text/plain;version=0.0.4;q=0.5' })
    expect(answer.headers['content-type']).toMatch(/^application\/openmetrics-text;.* version=1\.0\.0/)
    const { types, samples } = parse(answer.text)
    expect(answer.text.endsWith('\n# EOF\n')).toBe(true)
    // A counter's family has no suffix there, its sample has.
    expect([types.get('sconce_commits'), samples.get('sconce_commits_total')]).toEqual(['counter', 901])
    expect(types.get('sconce_build')).toBe('info')
  })

  it('count what is in quarantine and what is frozen', async () => {
    const [board, day] = await app.db.select().from(rtDoc).where(eq(rtDoc.shootId, world.shootId))
    if (!board || !day) throw new Error('no documents')
    const before = parse((await ask()).text).samples
    await app.db.insert(rtQuarantine).values({ docId: board.id, reason: 'undecodable', update: Uint8Array.of(1) })
    await app.db.update(rtDoc).set({ frozen: 'quarantine' }).where(eq(rtDoc.id, board.id))
    await app.db.update(rtDoc).set({ frozen: 'quota' }).where(eq(rtDoc.id, day.id))
    const after = parse((await ask()).text).samples
    expect([before.get('sconce_quarantined_updates'), after.get('sconce_quarantined_updates')]).toEqual([0, 1])
    expect([before.get('sconce_frozen_documents'), after.get('sconce_frozen_documents')]).toEqual([0, 2])
  })
})

describe('the page', () => {
  const asBrowser = () => ask({ accept: 'text/html,application/xhtml+xml,application/xml;q=0.9,*/*;q=0.8' })

  it('shows the same without a script and asks anew by itself', async () => {
    const { headers, text } = await asBrowser()
    expect(headers['content-type']).toBe('text/html; charset=utf-8')
    expect(headers['refresh']).toBe('10')
    expect(text).not.toContain('<script')
    expect(text).toContain('<dt>Open connections</dt><dd>41</dd>')
    expect(text).toContain('<dt>Size of the changes waiting</dt><dd>33.8 KiB</dd>')
    expect(text.replaceAll(/<\/?span>/g, '')).toContain(
      'half within 2.4 ms<small>95% within 4 ms, 99% within 9 ms, longest 12.5 ms</small>',
    )
    expect(text).toContain('Version 1.2.3, at <time datetime="2026-10-14T06:42:10.000Z">06:42:10 UTC</time>')
  })

  it('marks what to look into, not by colour alone', async () => {
    await app.db.delete(rtQuarantine)
    expect((await asBrowser()).text).toContain('Nothing to look into.')
    figures = { ...busy, flagged: 1, failedChecks: 2 }
    const { text } = await asBrowser()
    figures = busy
    expect(text).toContain('2 things to look into')
    expect(text.match(/aria-label="To look into"/g)).toHaveLength(2)
  })

  it('names nobody and no content', async () => {
    const texts = [(await asBrowser()).text, (await ask()).text].join()
    for (const word of [
      world.shootId,
      world.studioId,
      world.photographer.userId,
      world.photographer.name,
      'example.com',
    ])
      expect(texts).not.toContain(word)
  })
})

describe('the address', () => {
  const bearer = (value: string) => ({ authorization: `Bearer ${value}` })
  const elsewhere = { 'x-forwarded-for': '203.0.113.9' }

  it('is not there for who is elsewhere and has no token, or a wrong one', async () => {
    for (const headers of [
      elsewhere,
      { 'x-forwarded-for': '127.0.0.1' },
      { forwarded: 'for=127.0.0.1' },
      { 'x-real-ip': '127.0.0.1' },
      { host: 'shoots.example.com' },
      { ...elsewhere, ...bearer('') },
      { ...elsewhere, ...bearer(`${token}x`) },
      { ...elsewhere, ...bearer(token.slice(0, -1)) },
      { ...elsewhere, authorization: `Basic ${token}` },
      { ...elsewhere, authorization: token },
    ]) {
      const answer = await ask(headers)
      expect([headers, answer.status]).toEqual([headers, 404])
      expect(answer.text).toContain('There is nothing at this address.')
      expect(answer.text).not.toContain('sconce_')
    }
  })

  it('is there for who has the token, wherever they are', async () => {
    expect((await ask({ ...elsewhere, host: 'shoots.example.com', ...bearer(token) })).status).toBe(200)
  })

  it('takes no token where none is set', async () => {
    const closed = await startTestApp()
    try {
      for (const value of ['', 'undefined', token])
        expect((await ask({ ...elsewhere, ...bearer(value) }, closed.url)).status).toBe(404)
      expect((await ask({}, closed.url)).status).toBe(200)
    } finally {
      await closed.close()
    }
  })
})

describe('while the database is away', () => {
  it('the page says so and shows what is known', async () => {
    const way = await startProxy(app.databaseUrl)
    const { db, pool } = connectDatabase(way.url, () => undefined)
    const cut = await startTestApp({ db })
    try {
      way.cut()
      const { samples } = parse((await ask({}, cut.url)).text)
      expect(samples.get('sconce_database_up')).toBe(0)
      expect(samples.has('sconce_quarantined_updates')).toBe(false)
      const page = await ask({ accept: 'text/html' }, cut.url)
      expect(page.text).toMatch(/Database answers<\/dt><dd>no</)
      expect(page.text).toContain('<dt>Updates in quarantine</dt><dd>not known</dd>')
    } finally {
      await cut.close()
      await pool.end()
      await way.close()
    }
  })
})

describe('watchLoopDelay', () => {
  it('sees a loop that was held up', async () => {
    const read = watchLoopDelay()
    const tick = () => new Promise((resolve) => setTimeout(resolve, 60))
    await tick()
    const endMs = performance.now() + 200
    while (performance.now() < endMs);
    await tick()
    const { p50, max } = read()
    expect(max).toBeGreaterThan(100)
    expect(p50).toBeLessThanOrEqual(max)
  })
})
