import { createHash, timingSafeEqual } from 'node:crypto'
import { isNotNull } from 'drizzle-orm'
import type { Request, RequestHandler } from 'express'
import type { Db } from '#server/db/client.ts'
import { rtDoc, rtQuarantine } from '#server/db/schema/realtime.ts'
import type { Quantiles } from '#server/realtime/recent.ts'
import type { RealtimeStats } from '#server/realtime/server.ts'
import { nothingHere } from './errors.ts'
import { OPEN_METRICS_TYPE, TEXT_TYPE, expositionOf } from './exposition.ts'
import { type DatabaseFigures, figuresOf } from './figures.ts'
import { isFromHere } from './from-here.ts'
import { metricsPage } from './metrics-page.ts'
import { createProbe } from './probe.ts'

export type MetricsSource = {
  stats: () => RealtimeStats
  loopDelay: () => Quantiles
  version: string
  /** Lets in from elsewhere as `Authorization: Bearer …`; without one only this machine may look. */
  token?: string
}

/** The page asks anew by itself. */
const REFRESH_S = 10
const DATABASE_LIMIT_MS = 2_000

/**
 * How the process is doing, for its operator: a page for browsers, the text exposition format for collectors. Nothing
 * in it names people or content. To everybody else there is nothing at this address.
 */
export function metrics(source: MetricsSource & { db: Db; now: () => Date }): RequestHandler {
  const { db, now, version } = source
  const askDatabase = createProbe(() => countsOf(db), DATABASE_LIMIT_MS)
  const mayLook = operatorCheck(source.token)
  return async (req, res, next) => {
    if (!mayLook(req)) return nothingHere(req, res, next)
    const database = await askDatabase()
    const { rss, heapUsed } = process.memoryUsage()
    const groups = figuresOf({
      realtime: source.stats(),
      database,
      process: {
        version,
        uptimeMs: process.uptime() * 1000,
        residentBytes: rss,
        heapBytes: heapUsed,
        loopDelayMs: source.loopDelay(),
      },
    })
    res.set({ 'cache-control': 'no-store', vary: 'accept, authorization' })
    if (req.accepts(['text/plain', 'text/html']) === 'text/html') {
      res
        .set('refresh', String(REFRESH_S))
        .type('html')
        .send(metricsPage(groups, { version, at: now() }))
      return
    }
    // Collectors name a version with it, which `accepts` would have to be told of one by one.
    const isOpenMetrics = (req.headers.accept ?? '').includes('application/openmetrics-text')
    const figures = groups.flatMap((group) => group.figures)
    res
      .set('content-type', isOpenMetrics ? OPEN_METRICS_TYPE : TEXT_TYPE)
      .send(expositionOf(figures, version, isOpenMetrics ? 'openmetrics' : 'text'))
  }
}

async function countsOf(db: Db): Promise<DatabaseFigures> {
  const [quarantined, frozen] = await Promise.all([db.$count(rtQuarantine), db.$count(rtDoc, isNotNull(rtDoc.frozen))])
  return { quarantined, frozen }
}

function operatorCheck(token: string | undefined): (req: Request) => boolean {
  const expected = token === undefined ? null : digest(token)
  return (req) => {
    const given = /^Bearer +(\S+)$/i.exec(req.headers.authorization ?? '')?.[1]
    // Digests are of one length, which the comparison in constant time needs.
    const isKnown = expected !== null && given !== undefined && timingSafeEqual(digest(given), expected)
    return isKnown || isFromHere(req)
  }
}

function digest(text: string): Buffer {
  return createHash('sha256').update(text).digest()
}
