// @vitest-environment jsdom
import { QueryClient, QueryClientProvider } from '@tanstack/react-query'
import { cleanup, fireEvent, render, screen } from '@testing-library/react'
import { MemoryRouter, Route, Routes } from 'react-router-dom'
import { afterEach, describe, expect, it, vi } from 'vitest'
import { safePath, useGoOn } from '#src/app/signed-in-again.ts'

afterEach(() => {
  cleanup()
  vi.unstubAllGlobals()
})

describe('safePath', () => {
  it.each([
    ['/shoots/1', '/shoots/1'],
    [null, '/'],
    ['https://example.com', '/'],
    ['//example.com', '/'],
    ['/\\example.com', '/'],
  ])('%s leads to %s', (to, path) => expect(safePath(to)).toBe(path))
})

function SignInPage() {
  const goOn = useGoOn()
  return (
    <button type="button" onClick={() => goOn('/shoots')}>
      sign in
    </button>
  )
}

describe('useGoOn', () => {
  it('lets go of the answers kept for whoever was here before, and only then goes on', async () => {
    const forgotten: string[] = []
    let answer = (_isFound: boolean) => undefined as void
    const forget = (name: string) => {
      forgotten.push(name)
      return new Promise<boolean>((resolve) => (answer = resolve))
    }
    vi.stubGlobal('caches', { delete: forget })
    const queryClient = new QueryClient()
    queryClient.setQueryData(['shoots'], ['of somebody else'])
    render(
      <QueryClientProvider client={queryClient}>
        <MemoryRouter initialEntries={['/sign-in']}>
          <Routes>
            <Route path="sign-in" element={<SignInPage />} />
            <Route path="shoots" element={<p>the shoots</p>} />
          </Routes>
        </MemoryRouter>
      </QueryClientProvider>,
    )
    fireEvent.click(screen.getByRole('button'))
    await Promise.resolve()
    expect(forgotten).toEqual(['sconce-data'])
    expect(screen.queryByText('the shoots')).toBeNull()
    answer(true)
    expect(await screen.findByText('the shoots')).toBeTruthy()
    expect(queryClient.getQueryData(['shoots'])).toBeUndefined()
  })
})
