import { existsSync, readFileSync } from 'node:fs'
import { join } from 'node:path'
import { describe, expect, it } from 'vitest'
import { rootDir } from '#tests/architecture/tree.ts'

const topLevel = /^(src|server|shared|drizzle|tests|public|\.ci)\//
const aFileAtTheTop = /^[\w.-]+\.(md|json|ts|html)$/

/** Paths of this project that a document names in backticks or links to. Patterns and placeholders are no paths. */
function pathsIn(markdown: string): string[] {
  const prose = markdown.replace(/```[\s\S]*?```/g, '')
  const named = [...prose.matchAll(/`([^`\n]+)`/g)].map((match) => match[1] ?? '')
  const linked = [...prose.matchAll(/\]\((?!https?:|mailto:|#)([^)\s#]+)/g)].map((match) => match[1] ?? '')
  const paths = named.map((name) => name.replace(/^#(?=(src|server|shared|tests)\/)/, '').replace(/:\d+$/, ''))
  return [...paths.filter((path) => topLevel.test(path) || aFileAtTheTop.test(path)), ...linked].filter(
    (path) => !/[<>*{}…\s]|\.\.\./.test(path),
  )
}

describe('the documents', () => {
  it.each(['README.md', 'DEVELOPERS.md'])('%s names only paths that exist', (name) => {
    const paths = pathsIn(readFileSync(join(rootDir, name), 'utf8'))
    expect(paths.filter((path) => !existsSync(join(rootDir, path)))).toEqual([])
  })
})

describe('pathsIn', () => {
  it('reads backticks, aliases and links, and leaves out patterns, commands and addresses', () => {
    const markdown =
      'See `server/env.ts`, `#shared/ids.ts`, `src/features/<feature>/queries.ts`, `npm start`, `shared/**`, `README.md`, ' +
      '[rules](DEVELOPERS.md#rules), [the site](https://example.com/server/x.ts).\n```\nserver/not-looked-at.ts\n```\n'
    expect(pathsIn(markdown)).toEqual(['server/env.ts', 'shared/ids.ts', 'README.md', 'DEVELOPERS.md'])
  })
})
