import { spawnSync } from 'node:child_process'
import { cpSync, mkdtempSync, readFileSync, readdirSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join, relative } from 'node:path'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { z } from 'zod'
import { rootDir } from '#tests/architecture/tree.ts'

const journalSchema = z.object({ entries: z.array(z.object({ idx: z.number(), tag: z.string(), when: z.number() })) })
const journal = journalSchema.parse(JSON.parse(readFileSync(join(rootDir, 'drizzle/meta/_journal.json'), 'utf8')))

describe('the migrations', () => {
  let copy = ''
  beforeAll(() => {
    copy = mkdtempSync(join(tmpdir(), 'sconce-migrations-'))
    cpSync(join(rootDir, 'drizzle'), copy, { recursive: true })
  })
  afterAll(() => {
    rmSync(copy, { recursive: true, force: true })
  })

  it('bring a database to exactly what the schema says', () => {
    const files = (): string[] => readdirSync(copy, { recursive: true }).map(String).sort()
    const before = files()
    const drizzleKit = join(rootDir, 'node_modules/drizzle-kit/bin.cjs')
    const options = ['--dialect=postgresql', '--schema=./server/db/schema/index.ts']
    const done = spawnSync(
      process.execPath,
      [drizzleKit, 'generate', ...options, `--out=${relative(rootDir, copy)}`, '--name=not_generated_yet'],
      { cwd: rootDir, encoding: 'utf8', stdio: ['ignore', 'pipe', 'pipe'] },
    )
    // It ends with exit code 0 even where it wanted to ask something and could not, so its words count.
    expect(`${done.stdout}${done.stderr}`).toContain('No schema changes')
    expect(files()).toEqual(before)
  })

  it('have a file for each entry of the journal, numbered in order and named by hand', () => {
    const sql = readdirSync(join(rootDir, 'drizzle')).filter((name) => name.endsWith('.sql'))
    expect(sql.sort()).toEqual(journal.entries.map((entry) => `${entry.tag}.sql`))
    expect(journal.entries.map((entry) => Number(entry.tag.slice(0, 4)))).toEqual(journal.entries.map((_, at) => at))
  })

  it('go forward in time, or a database that has the later one would never get the earlier', () => {
    const times = journal.entries.map((entry) => entry.when)
    expect(times).toEqual([...times].sort((a, b) => a - b))
  })
})
