import { posix } from 'node:path'
import { describe, expect, it } from 'vitest'
import { findBreaches, findCircles, resolveImport, staticImportsOf } from '#tests/architecture/import-rules.ts'
import { readTree, type Tree } from '#tests/architecture/tree.ts'

const sources = readTree(['src', 'server', 'shared'], /\.(ts|tsx)$/)

describe('the sources', () => {
  it('import only what the table allows', () => {
    expect(findBreaches(sources)).toEqual([])
  })

  it('never need each other in a circle to run', () => {
    expect(findCircles(sources)).toEqual([])
  })
})

describe('what runs before packages are installed', () => {
  const scripts = readTree(['server', 'tests'], /\.mjs$/)

  it.each(['server/start.mjs', 'tests/run.mjs'])('%s needs only Node itself', (entry) => {
    const foreign: string[] = []
    const seen = new Set<string>()
    const visit = (path: string): void => {
      if (seen.has(path)) return
      seen.add(path)
      for (const specifier of staticImportsOf(scripts.get(path) ?? '')) {
        const target = resolveImport(path, specifier)
        if ('path' in target && specifier.startsWith('.')) visit(target.path)
        else if (!specifier.startsWith('node:')) foreign.push(`${path} -> ${specifier}`)
      }
    }
    visit(entry)
    expect(seen.size).toBeGreaterThan(1)
    expect(foreign).toEqual([])
  })
})

/** A tree of one file with one import, or what that breaks. */
function breachesOf(path: string, line: string): string[] {
  return findBreaches(new Map([[path, line]]))
}

describe('findBreaches', () => {
  it.each([
    ['shared/ids.ts', "import { x } from 'luxon'"],
    ['shared/units/length.ts', "import { x } from '#shared/domain/plan/schema.ts'"],
    ['shared/domain/plan/order.ts', "import { readFileSync } from 'node:fs'"],
    ['shared/domain/plan/order.ts', "import * as Y from 'yjs'"],
    ['shared/domain/plan/order.ts', "import { x } from '#shared/realtime/documents.ts'"],
    ['shared/domain/plan/order.ts', "import { x } from '#server/db/client.ts'"],
    ['shared/access/can.ts', "import { x } from '../realtime/protocol.ts'"],
    ['shared/api/plans.ts', "import { pgTable } from 'drizzle-orm/pg-core'"],
    ['shared/realtime/board.ts', "import { useState } from 'react'"],
    ['src/ui/button.tsx', "import { x } from '#src/features/board/queries.ts'"],
    ['src/ui/button.tsx', "import { x } from '#shared/domain/looks/schema.ts'"],
    ['src/lib/api.ts', "import { x } from '#src/realtime/use-document.ts'"],
    ['src/lib/api.ts', "import type { x } from '#server/errors.ts'"],
    ['src/realtime/use-document.ts', "import { x } from '#src/app/router.tsx'"],
    ['src/features/board/wall.tsx', "import { x } from '#src/features/looks/queries.ts'"],
    ['src/features/board/wall.tsx', "import { x } from '../looks/queries.ts'"],
    ['src/features/board/wall.tsx', "const x = await import('#src/features/looks/queries.ts')"],
    ['src/features/board/wall.tsx', "export { x } from '#src/features/looks/queries.ts'"],
    ['src/features/board/wall.tsx', "import { x } from '#src/app/providers.tsx'"],
    ['src/app/main.tsx', "import { x } from '#server/env.ts'"],
    ['server/db/client.ts', "import { x } from '#server/features/plan/list-plans.ts'"],
    ['server/features/plan/routes.ts', "import { eq } from 'drizzle-orm'"],
    ['server/features/plan/routes.ts', "import { x } from '#server/db/client.ts'"],
    ['server/features/plan/routes.ts', "import { x } from '#server/features/looks/list-looks.ts'"],
    ['server/features/plan/create-plan.ts', "import type { Request } from 'express'"],
    ['server/features/plan/create-plan.ts', "import { x } from '#server/realtime/room.ts'"],
    ['server/features/plan/create-plan.ts', "import { x } from '#server/http/endpoint.ts'"],
    ['server/features/plan/create-plan.ts', "import { x } from './routes.ts'"],
    ['server/realtime/room.ts', "import { x } from '#server/features/plan/routes.ts'"],
    ['server/http/endpoint.ts', "import { x } from '#server/app.ts'"],
    ['server/main.ts', "import { x } from '#src/app/main.tsx'"],
    ['server/main.ts', "import { x } from '#tests/support/database.ts'"],
    ['shared/ids.ts', "import { x } from '#tests/support/database.ts'"],
  ])('finds the fault planted in %s: %s', (path, line) => {
    expect(breachesOf(path, line)).toHaveLength(1)
  })

  it.each([
    ['shared/ids.ts', "import { z } from 'zod'"],
    ['shared/domain/plan/order.ts', "import { x } from '#shared/domain/looks/schema.ts'"],
    ['shared/domain/sign-off/canonical.ts', "import canonicalize from 'canonicalize'"],
    ['shared/realtime/board.ts', "import * as Y from 'yjs'"],
    ['src/ui/button.tsx', "import { cn } from '#src/lib/cn.ts'"],
    ['src/features/board/wall.tsx', "import { x } from './queries.ts'"],
    ['src/features/board/wall.tsx', "import { x } from '#src/realtime/use-document.ts'"],
    ['src/app/routes/board.tsx', "import { x } from '#src/features/board/wall.tsx'"],
    ['server/features/plan/routes.ts', "import { x } from './create-plan.ts'"],
    ['server/features/plan/create-plan.ts', "import { x } from '#server/features/looks/look-rows.ts'"],
    ['server/app.ts', "import { x } from '#server/features/plan/routes.ts'"],
  ])('lets %s have its %s', (path, line) => {
    expect(breachesOf(path, line)).toEqual([])
  })
})

describe('findCircles', () => {
  const circle = (first: string): Tree =>
    new Map([
      ['server/features/a/x.ts', first],
      ['server/features/b/y.ts', "export { z } from '#server/features/c/z.ts'"],
      ['server/features/c/z.ts', "import { x } from '../a/x.ts'"],
    ])

  it('finds three files that need each other', () => {
    expect(findCircles(circle("import { y } from '#server/features/b/y.ts'"))).toHaveLength(1)
  })

  it('lets types go round, which are gone when the program runs', () => {
    expect(findCircles(circle("import type { y } from '#server/features/b/y.ts'"))).toEqual([])
    expect(findCircles(circle("import { type y } from '#server/features/b/y.ts'"))).toEqual([])
  })
})

describe('resolveImport', () => {
  it('reads aliases, relative paths, Vite suffixes and packages', () => {
    expect(resolveImport('src/app/main.tsx', '#shared/ids.ts')).toEqual({ path: 'shared/ids.ts' })
    expect(resolveImport('src/app/main.tsx', '../lib/cn.ts')).toEqual({ path: posix.join('src', 'lib/cn.ts') })
    expect(resolveImport('src/app/main.tsx', './search.ts?worker')).toEqual({ path: 'src/app/search.ts' })
    expect(resolveImport('src/app/main.tsx', 'drizzle-orm/pg-core')).toEqual({ package: 'drizzle-orm/pg-core' })
  })
})
