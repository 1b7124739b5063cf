// @vitest-environment jsdom
import { QueryClient, QueryClientProvider } from '@tanstack/react-query'
import { act, cleanup, render, screen } from '@testing-library/react'
import { MemoryRouter } from 'react-router-dom'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { shootCardsSchema } from '#shared/api/shoots.ts'
import { ShootsScreen } from '#src/features/shoots/components/shoots-screen.tsx'
import { shootQueries } from '#src/features/shoots/queries.ts'
import { cacheName } from '#src/realtime/local-cache.ts'
import { outboxName } from '#src/realtime/outbox/outbox-store.ts'
import { writeUnsent } from '#src/realtime/unsent-accounts.ts'

const uuid = (n: number) => `00000000-0000-4000-8000-${String(n).padStart(12, '0')}`
const COMING = uuid(1)
const PAST = uuid(2)

function show(): void {
  const shoot = { studioId: uuid(9), role: 'stylist', place: '', shots: 0, pictures: [], readiness: [] }
  const queryClient = new QueryClient({ defaultOptions: { queries: { staleTime: Infinity } } })
  queryClient.setQueryData(
    shootQueries.list().queryKey,
    shootCardsSchema.parse({
      shoots: [
        { ...shoot, id: PAST, title: 'Hay loft', date: '2027-05-02' },
        { ...shoot, id: COMING, title: 'Dusk', date: '2027-10-14' },
      ],
    }),
  )
  render(
    <QueryClientProvider client={queryClient}>
      <MemoryRouter>
        <ShootsScreen userId="ines" studios={[]} today="2027-10-01" nameStudio={null} />
      </MemoryRouter>
    </QueryClientProvider>,
  )
}

beforeEach(() => localStorage.clear())
afterEach(cleanup)

describe('ShootsScreen', () => {
  it('says of each shoot what only this device has of it, live', () => {
    writeUnsent(cacheName('ines', COMING, 'board', 1), 1)
    writeUnsent(cacheName('ines', COMING, 'plan', 1), 1)
    writeUnsent(outboxName('ines', PAST), 1)
    show()
    expect(screen.getByRole('article').textContent).toContain(
      '2 changes are still on this device. Open the shoot to send them.',
    )
    expect(screen.getByRole('table').textContent).toContain(
      '1 picture is still on this device. Open the shoot to send it.',
    )
    act(() => writeUnsent(outboxName('ines', COMING), 1))
    expect(screen.getByText(/^2 changes and 1 picture are still/)).toBeTruthy()
  })

  it('says nothing of what somebody else has here, nor of what can never be sent', () => {
    writeUnsent(cacheName('soren', COMING, 'board', 1), 3)
    writeUnsent(cacheName('ines', COMING, 'board', 'aside'), 3)
    show()
    expect(screen.getByText('Dusk')).toBeTruthy()
    expect(screen.queryByText(/on this device/)).toBeNull()
  })
})
