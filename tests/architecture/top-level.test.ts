import { readFileSync, readdirSync } from 'node:fs'
import { join } from 'node:path'
import { describe, expect, it } from 'vitest'
import { readTree, rootDir } from '#tests/architecture/tree.ts'

const allowed = new Set([
  'README.md',
  'DEVELOPERS.md',
  'package.json',
  'package-lock.json',
  'vite.config.ts',
  'drizzle.config.ts',
  'tsconfig.json',
  'index.html',
  'src',
  'server',
  'shared',
  'drizzle',
  'tests',
  'public',
])

describe('the top level', () => {
  it('holds the agreed files and folders, and dot files that tools need', () => {
    const ignored = new Set(
      readFileSync(join(rootDir, '.gitignore'), 'utf8')
        .split('\n')
        .map((line) => line.trim().replace(/\/$/, '')),
    )
    const names = readdirSync(rootDir).filter((name) => !name.startsWith('.') && !ignored.has(name))
    expect(names.filter((name) => !allowed.has(name))).toEqual([])
  })
})

describe('the file names', () => {
  it('are in kebab-case everywhere', () => {
    const paths = [...readTree(['src', 'server', 'shared', 'tests'], /\.(ts|tsx|mjs|css)$/).keys()]
    expect(paths.filter((path) => !/^[a-z0-9.-]+$/.test(path.slice(path.lastIndexOf('/') + 1)))).toEqual([])
  })
})

describe('a lint rule that is switched off', () => {
  it('says why, after two dashes', () => {
    const files = readTree(['src', 'server', 'shared', 'tests'], /\.(ts|tsx|mjs)$/)
    const unexplained = [...files].flatMap(([path, text]) =>
      text
        .split('\n')
        .filter((line) => /(\/\/|\/\*) eslint-disable/.test(line) && !/ -- \S/.test(line))
        .map((line) => `${path}: ${line.trim()}`),
    )
    expect(unexplained).toEqual([])
  })
})
