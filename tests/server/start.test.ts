import { mkdtempSync, rmSync, utimesSync, writeFileSync } from 'node:fs'
import { createServer, type Server } from 'node:net'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { fingerprintOf } from '#server/start/build.mjs'
import { installCommands } from '#server/start/debian.mjs'
import { isNodeRecentEnough } from '#server/start/packages.mjs'
import { dataDirFor } from '#server/start/place.mjs'
import { addressesFor, anyFreePort, nextFreePort } from '#server/start/ports.mjs'
import { run } from '#server/start/say.mjs'
import { askHolder, takeTurn, tryHold } from '#server/start/single.mjs'

let folder = ''
beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'sconce-start-'))
})
afterEach(() => {
  rmSync(folder, { recursive: true, force: true })
})

describe('isNodeRecentEnough', () => {
  it.each([
    ['18.20.4', false],
    ['20.18.3', false],
    ['20.19.0', true],
    ['22.1.0', true],
  ])('says of Node %s: %s', (version, answer) => {
    expect(isNodeRecentEnough(version)).toBe(answer)
  })
})

describe('dataDirFor', () => {
  const root = { isRoot: true, home: '/root', env: {} }
  const user = { isRoot: false, home: '/home/ann', env: {} }

  it('is outside the checkout, where this kind of user keeps data', () => {
    expect(dataDirFor('/srv/sconce', root)).toMatch(/^\/var\/lib\/sconce\/[0-9a-f]{12}$/)
    expect(dataDirFor('/srv/sconce', user)).toMatch(/^\/home\/ann\/\.local\/share\/sconce\/[0-9a-f]{12}$/)
    expect(dataDirFor('/srv/sconce', { ...user, env: { XDG_DATA_HOME: '/data' } })).toMatch(/^\/data\/sconce\//)
  })

  it('differs from checkout to checkout and is the same for the same one', () => {
    expect(dataDirFor('/srv/a', root)).toBe(dataDirFor('/srv/a', root))
    expect(dataDirFor('/srv/a', root)).not.toBe(dataDirFor('/srv/b', root))
  })
})

describe('installCommands', () => {
  const words = (commands: string[][]): string[] => commands.map((command) => command.join(' '))

  it('keeps the package from making a cluster of its own before it is installed', () => {
    const [dropIn, , install] = words(installCommands(['postgresql'], { dropInIsThere: false }))
    expect(dropIn).toContain("'create_main_cluster = false' > /etc/postgresql-common/createcluster.d/no-main.conf")
    expect(install).toMatch(/apt-get .*--no-install-recommends install postgresql$/)
  })

  it('leaves a drop-in that is there alone, and writes none for a browser', () => {
    const isPlain = (command: string): boolean => !command.includes('createcluster')
    expect(words(installCommands(['postgresql'], { dropInIsThere: true })).every(isPlain)).toBe(true)
    expect(words(installCommands(['chromium'], { dropInIsThere: false })).every(isPlain)).toBe(true)
  })
})

describe('nextFreePort', () => {
  let other: Server | undefined
  afterEach(() => other?.close())

  it('is the port wanted while it is free, and the next free one once somebody has it', async () => {
    const wanted = await anyFreePort()
    expect(await nextFreePort(wanted, '127.0.0.1')).toBe(wanted)
    other = createServer()
    await new Promise<void>((resolve) => other?.listen(wanted, '127.0.0.1', resolve))
    expect(await nextFreePort(wanted, '127.0.0.1')).toBeGreaterThan(wanted)
  })
})

describe('addressesFor', () => {
  const given = { host: '127.0.0.1', port: 4003, wantedPort: 4000, publicUrl: undefined, trustedOrigins: [] }

  it('follows to the port really taken', () => {
    expect(addressesFor(given)).toEqual({
      publicUrl: 'http://localhost:4003',
      trustedOrigins: ['http://localhost:4003', 'http://127.0.0.1:4003'],
    })
    expect(addressesFor({ ...given, publicUrl: 'http://127.0.0.1:4000' }).publicUrl).toBe('http://127.0.0.1:4003')
  })

  it('keeps a public address that is somewhere else', () => {
    const { publicUrl, trustedOrigins } = addressesFor({ ...given, publicUrl: 'https://shoots.example.com' })
    expect(publicUrl).toBe('https://shoots.example.com')
    expect(trustedOrigins).toEqual(['https://shoots.example.com', 'http://localhost:4003', 'http://127.0.0.1:4003'])
  })

  it('names the address that others reach when it listens there', () => {
    expect(addressesFor({ ...given, host: '192.0.2.7' }).publicUrl).toBe('http://192.0.2.7:4003')
  })
})

describe('fingerprintOf', () => {
  it('changes with content and with a file that goes, and not with a touch', () => {
    writeFileSync(join(folder, 'a.ts'), 'one')
    writeFileSync(join(folder, 'b.ts'), 'two')
    const before = fingerprintOf(folder, ['.', 'missing'])
    utimesSync(join(folder, 'a.ts'), 0, 0)
    expect(fingerprintOf(folder, ['.', 'missing'])).toBe(before)
    writeFileSync(join(folder, 'a.ts'), 'three')
    const changed = fingerprintOf(folder, ['.'])
    expect(changed).not.toBe(before)
    rmSync(join(folder, 'b.ts'))
    expect(fingerprintOf(folder, ['.'])).not.toBe(changed)
  })
})

describe('tryHold', () => {
  const name = (): string => `test-${folder.slice(-6)}`

  it('gives a name to one, who tells the others what it is doing', async () => {
    const hold = await tryHold(name(), { doing: 'starting' })
    expect(await tryHold(name(), { doing: 'starting' })).toBeUndefined()
    hold?.tell({ doing: 'running', url: 'http://localhost:4000' })
    expect(await askHolder(name())).toEqual({ doing: 'running', url: 'http://localhost:4000', pid: process.pid })
    await hold?.release()
    expect(await askHolder(name())).toBeUndefined()
    await (await tryHold(name(), { doing: 'backup' }))?.release()
  })

  it('lets turns follow one another', async () => {
    const order: string[] = []
    const turn = (who: string): Promise<void> =>
      takeTurn(name(), 'building', async () => {
        order.push(`${who} in`)
        await Promise.resolve()
        order.push(`${who} out`)
      })
    await Promise.all([turn('a'), turn('b')])
    expect(order).toHaveLength(4)
    expect(order[1]).toBe(order[0]?.replace('in', 'out'))
  })
})

describe('run', () => {
  it('hands back the exit code and what was said, and 127 for a program that is not there', async () => {
    const done = await run(process.execPath, ['-e', 'console.log("out"); console.error("err"); process.exit(3)'])
    expect(done).toEqual({ code: 3, stdout: 'out\n', stderr: 'err\n' })
    expect((await run('/no/such/program', [])).code).toBe(127)
  })
})
