import { Socket } from 'node:net'
import { describe, expect, it } from 'vitest'
import { isFromHere } from '#server/http/from-here.ts'

function from(remoteAddress: string, headers: Record<string, string>): boolean {
  const socket = Object.defineProperty(new Socket(), 'remoteAddress', { value: remoteAddress })
  return isFromHere({ socket, headers })
}

describe('isFromHere', () => {
  it.each(['127.0.0.1', '127.0.0.53', '::1', '::ffff:127.0.0.1'])(
    'is true for %s by a name of this machine',
    (address) => {
      for (const host of ['localhost:4000', 'LOCALHOST', '127.0.0.1:4000', '[::1]:4000'])
        expect([host, from(address, { host })]).toEqual([host, true])
    },
  )

  it.each(['203.0.113.9', '10.0.0.1', '::ffff:203.0.113.9', 'fe80::1', ''])('is false for %s', (address) => {
    expect(from(address, { host: 'localhost' })).toBe(false)
  })

  it.each(['shoots.example.com', '127.0.0.1.example.com', 'localhost.example.com', '127.example.com', ''])(
    'is false by the name “%s”',
    (host) => {
      expect(from('127.0.0.1', { host })).toBe(false)
    },
  )

  it.each(['x-forwarded-for', 'x-forwarded-proto', 'x-forwarded-host', 'forwarded', 'via', 'x-real-ip'])(
    'is false for what a proxy passes on with %s',
    (header) => {
      expect(from('127.0.0.1', { host: 'localhost', [header]: '127.0.0.1' })).toBe(false)
    },
  )
})
