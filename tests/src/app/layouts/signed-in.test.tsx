// @vitest-environment jsdom
import { QueryClient, QueryClientProvider } from '@tanstack/react-query'
import { act, cleanup, render, screen } from '@testing-library/react'
import { MemoryRouter, Route, Routes } from 'react-router-dom'
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import type { Session } from '#shared/api/studios.ts'
import { userIdSchema } from '#shared/ids.ts'

const QUERY_KEY = ['session']
const sessionOf = (id: string): Session => ({
  user: {
    id: userIdSchema.parse(id),
    name: id,
    initials: id.slice(0, 2),
    colour: '#445566',
    email: `${id}@example.com`,
  },
  studios: [],
  letters: false,
})

let reload: ReturnType<typeof vi.fn>
let queryClient: QueryClient

beforeEach(() => {
  vi.resetModules()
  reload = vi.fn()
  vi.stubGlobal('location', { ...window.location, reload })
  queryClient = new QueryClient({ defaultOptions: { queries: { staleTime: Infinity } } })
})
afterEach(() => {
  cleanup()
  vi.unstubAllGlobals()
})

async function show(userId: string) {
  const { SignedIn } = await import('#src/app/layouts/signed-in.tsx')
  queryClient.setQueryData(QUERY_KEY, sessionOf(userId))
  render(
    <QueryClientProvider client={queryClient}>
      <MemoryRouter initialEntries={['/']}>
        <Routes>
          <Route element={<SignedIn />}>
            <Route index element={<p>shoots of whoever is here</p>} />
          </Route>
          <Route path="sign-in" element={<p>the way in</p>} />
        </Routes>
      </MemoryRouter>
    </QueryClientProvider>,
  )
}
/** The session is another one, and the page has heard so. */
const arrive = (session: Session | null) =>
  act(async () => {
    queryClient.setQueryData(QUERY_KEY, session)
    await new Promise((resolve) => setTimeout(resolve))
  })
const shown = () => screen.queryByText('shoots of whoever is here') !== null

describe('SignedIn', () => {
  it('shows the page to its person, also with news of the session', async () => {
    await show('ines')
    await arrive({ ...sessionOf('ines'), letters: true })
    expect(shown()).toBe(true)
    expect(reload).not.toHaveBeenCalled()
  })

  it('does not go on as another person, but loads the page anew', async () => {
    await show('ines')
    await arrive(sessionOf('soren'))
    expect(shown()).toBe(false)
    await vi.waitFor(() => expect(reload).toHaveBeenCalledTimes(1))
  })

  it('leaves the screens of somebody who signs out in another tab', async () => {
    await show('ines')
    const otherTab = new BroadcastChannel('sconce:sign-out')
    otherTab.postMessage('ines')
    expect(await screen.findByText('the way in')).toBeTruthy()
    otherTab.close()
  })

  it('does not let another person in either when the session had ended in between', async () => {
    await show('ines')
    await arrive(null)
    expect(screen.getByText('the way in')).toBeTruthy()
    cleanup()
    await show('soren')
    expect(shown()).toBe(false)
    await vi.waitFor(() => expect(reload).toHaveBeenCalledTimes(1))
  })
})
