// @vitest-environment jsdom
import 'fake-indexeddb/auto'
import { beforeEach, expect, it } from 'vitest'
import { forgetPastCaches, leftBehind } from '#src/realtime/left-behind.ts'
import { cacheName, registerCache, registeredCaches } from '#src/realtime/local-cache.ts'
import { addUnsent } from '#src/realtime/unsent-accounts.ts'

const name = (epoch: number | 'aside') => cacheName('ines', 'shoot', 'board', epoch)

beforeEach(() => localStorage.clear())

it('holds edits of earlier epochs and those put aside for lost, not those of an epoch newer than this page knows', () => {
  for (const epoch of [1, 2, 3, 'aside'] as const) addUnsent(name(epoch), { edits: 1, sinceMs: 0 })
  const lost = leftBehind('ines', 'shoot', { board: 2 }).map(({ cache }) => cache)
  expect(lost.sort()).toEqual([name(1), name('aside')])
  expect(leftBehind('ines', 'shoot', null)).toHaveLength(4)
})

it('forgets caches of earlier epochs in which nothing waits, and no others', async () => {
  for (const epoch of [8, 9, 10, 11] as const) registerCache(name(epoch))
  addUnsent(name(8), { edits: 1, sinceMs: 0 })
  await forgetPastCaches('ines', 'shoot', { board: 10 })
  expect(registeredCaches('rt:')).toEqual([name(8), name(10), name(11)])
})
