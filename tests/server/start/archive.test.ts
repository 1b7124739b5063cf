import { appendFileSync, mkdtempSync, readFileSync, rmSync, truncateSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { text } from 'node:stream/consumers'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { dumpStream, readArchive, sealArchive } from '#server/start/archive.mjs'

const facts = {
  madeAt: '2026-12-01T10:00:00.000Z',
  postgres: 'PostgreSQL 15',
  lastMigrationMs: 5,
  tables: { 'public.shoot': { rows: '2', content: '1 2' } },
  sequences: {},
}
const dump = 'PGDMP and whatever follows '.repeat(100)

let folder = ''
let file = ''
beforeEach(async () => {
  folder = mkdtempSync(join(tmpdir(), 'sconce-archive-'))
  file = join(folder, 'backup.sconce')
  writeFileSync(file, dump)
  await sealArchive(file, facts)
})
afterEach(() => {
  rmSync(folder, { recursive: true, force: true })
})

describe('readArchive', () => {
  it('gives back the manifest, and the dump byte for byte', async () => {
    const manifest = await readArchive(file)
    expect(manifest).toMatchObject(facts)
    expect(await text(dumpStream(file, manifest))).toBe(dump)
  })

  it('refuses a file with one bit turned over', async () => {
    const bytes = readFileSync(file)
    bytes.writeUInt8(bytes.readUInt8(1000) ^ 1, 1000)
    writeFileSync(file, bytes)
    await expect(readArchive(file)).rejects.toThrow('damaged')
  })

  it('refuses a file whose manifest was turned over', async () => {
    const bytes = readFileSync(file)
    bytes.write('9', bytes.indexOf('"dumpBytes":') + '"dumpBytes":'.length)
    writeFileSync(file, bytes)
    await expect(readArchive(file)).rejects.toThrow('damaged')
  })

  it.each([0, 10, 500, 2000])('refuses the first %i bytes of one', async (bytes) => {
    truncateSync(file, bytes)
    await expect(readArchive(file)).rejects.toThrow('not a backup')
  })

  it('refuses a file to which something was added, and one that is not there', async () => {
    appendFileSync(file, ' ')
    await expect(readArchive(file)).rejects.toThrow('not a backup')
    await expect(readArchive(join(folder, 'nothing'))).rejects.toThrow('cannot be read')
  })
})
