// @vitest-environment jsdom
import 'fake-indexeddb/auto'
import { expect, it, vi } from 'vitest'
import { registerCache, registeredCaches } from '#src/realtime/local-cache.ts'
import { listenForSignOut, signOutOfDevice } from '#src/realtime/sign-out.ts'

it('lets other tabs go once the session has ended, not before, and forgets what the device keeps', async () => {
  registerCache('rt:ines:shoot:board:1')
  registerCache('rt:soren:shoot:board:1')
  const heard: string[] = []
  const stops = ['ines', 'soren'].map((id) => listenForSignOut(id, () => heard.push(id)))
  let end = () => undefined as void
  const signedOut = signOutOfDevice('ines', () => new Promise<void>((resolve) => (end = resolve)))
  await new Promise((resolve) => setTimeout(resolve, 20))
  expect(heard).toEqual([])
  end()
  await signedOut
  await vi.waitFor(() => expect(heard).toEqual(['ines']))
  expect(registeredCaches('rt:')).toEqual(['rt:soren:shoot:board:1'])
  for (const stop of stops) stop()
})

it('lets nobody go when the session does not end', async () => {
  registerCache('rt:ines:shoot:board:1')
  const heard = vi.fn()
  const stop = listenForSignOut('ines', heard)
  await expect(signOutOfDevice('ines', () => Promise.reject(new Error('no signal')))).rejects.toThrow('no signal')
  await new Promise((resolve) => setTimeout(resolve, 20))
  expect(heard).not.toHaveBeenCalled()
  expect(registeredCaches('rt:ines:')).toHaveLength(1)
  stop()
})
