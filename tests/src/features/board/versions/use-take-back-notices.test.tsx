// @vitest-environment jsdom
import { useQueryClient } from '@tanstack/react-query'
import { cleanup, fireEvent, screen, waitFor } from '@testing-library/react'
import { useLocation } from 'react-router-dom'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { type Version, versionSchema } from '#shared/api/versions.ts'
import { useTakeBackNotices } from '#src/features/board/versions/use-take-back-notices.ts'
import { Toaster } from '#src/ui/toaster.tsx'
import { SHOOT_ID, USER_ID, shootScreen } from '#tests/support/shoot-screen.tsx'

const uuid = (n: number) => `00000000-0000-4000-8000-${String(n).padStart(12, '0')}`

function version(n: number, userId: string, takingBack: string | null): Version {
  return versionSchema.parse({ id: uuid(n), name: `Version ${n}`, userId, by: 'Soren Okafor', atMs: n, takingBack })
}

function Screen() {
  useTakeBackNotices()
  const queryClient = useQueryClient()
  const { pathname } = useLocation()
  return (
    <>
      {/* What the word of the server that the list changed does. */}
      <button onClick={() => void queryClient.invalidateQueries({ queryKey: ['shoots', SHOOT_ID, 'versions'] })}>
        Fetch again
      </button>
      <p>{pathname}</p>
      <Toaster />
    </>
  )
}

beforeEach(() => localStorage.clear())
afterEach(cleanup)

describe('useTakeBackNotices', () => {
  it('tells what somebody else took back since, once, and leads to how it was', async () => {
    let versions = [version(1, 'somebody', 'Long ago')]
    const list = `GET /api/shoots/${SHOOT_ID}/versions`
    const { sent, show } = shootScreen('client', { [list]: () => ({ body: { versions } }) })
    show(<Screen />)
    const fetched = () => sent.filter(({ request }) => request === list).length
    const again = async () => {
      const before = fetched()
      fireEvent.click(screen.getByText('Fetch again'))
      await waitFor(() => expect(fetched()).toBeGreaterThan(before))
    }
    await screen.findByText('Fetch again')
    await waitFor(() => expect(fetched()).toBeGreaterThan(0))
    versions = [
      version(4, USER_ID, 'Mine'),
      version(3, 'somebody', 'First idea'),
      version(2, 'somebody', null),
      ...versions,
    ]
    await again()
    expect(await screen.findByText('Soren Okafor took the board back to “First idea”.')).toBeTruthy()
    expect(screen.getAllByRole('status')).toHaveLength(1)
    fireEvent.click(screen.getByRole('button', { name: 'As it was before' }))
    expect(screen.getByText(`/shoots/${SHOOT_ID}/board/versions/${uuid(3)}`)).toBeTruthy()
    await again()
    expect(screen.queryByRole('status')).toBeNull()
  })
})
