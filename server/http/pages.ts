import { existsSync } from 'node:fs'
import { extname, join } from 'node:path'
import express, { Router } from 'express'

const YEAR_MS = 365 * 24 * 3600 * 1000

/** The built client: files as they are, and its one page for every other address of the program. */
export function pages(clientDir: string): Router {
  const router = Router()
  const index = join(clientDir, 'index.html')
  router.use(
    '/assets',
    express.static(join(clientDir, 'assets'), { index: false, immutable: true, maxAge: YEAR_MS }),
    (_req, res) => {
      res.status(404).type('text').send('There is no such file.')
    },
  )
  router.use(
    express.static(clientDir, { index: false, setHeaders: (res) => res.setHeader('cache-control', 'no-cache') }),
  )
  router.get('/{*any}', (req, res) => {
    if (extname(req.path) !== '' || req.path.startsWith('/rt/'))
      res.status(404).type('text').send('There is nothing at this address.')
    else if (existsSync(index)) res.set('cache-control', 'no-cache').sendFile(index)
    else res.status(503).type('text').send('The pages are not built yet. Start Sconce with npm start.')
  })
  return router
}
