// @vitest-environment jsdom
import { cleanup, fireEvent, render, screen, waitFor } from '@testing-library/react'
import { afterEach, beforeAll, describe, expect, it } from 'vitest'
import { Button } from '#src/ui/button.tsx'
import { Menu } from '#src/ui/menu.tsx'

beforeAll(() => {
  // jsdom lays nothing out and so has no observer of sizes.
  globalThis.ResizeObserver = class {
    observe() {}
    unobserve() {}
    disconnect() {}
  }
})
afterEach(cleanup)

function setUp() {
  const chosen: string[] = []
  render(
    <Menu
      trigger={<Button>More</Button>}
      items={[
        { label: 'Duplicate', onSelect: () => chosen.push('duplicate') },
        'line',
        { label: 'Print', onSelect: () => chosen.push('print'), disabled: true },
        { label: 'Remove', onSelect: () => chosen.push('remove'), danger: true },
      ]}
    />,
  )
  const trigger = screen.getByRole('button', { name: 'More' })
  trigger.focus()
  fireEvent.keyDown(trigger, { key: 'Enter' })
  return { chosen }
}

describe('Menu', () => {
  it('opens by keyboard and offers its items by name', async () => {
    setUp()
    await screen.findByRole('menu')
    expect(screen.getAllByRole('menuitem').map((item) => item.textContent)).toEqual(['Duplicate', 'Print', 'Remove'])
  })

  it('runs what is chosen and closes', async () => {
    const { chosen } = setUp()
    fireEvent.click(await screen.findByRole('menuitem', { name: 'Remove' }))
    expect(chosen).toEqual(['remove'])
    await waitFor(() => expect(screen.queryByRole('menu')).toBeNull())
  })

  it('leaves alone what cannot be chosen', async () => {
    const { chosen } = setUp()
    const print = await screen.findByRole('menuitem', { name: 'Print' })
    expect(print.getAttribute('aria-disabled')).toBe('true')
    fireEvent.click(print)
    expect(chosen).toEqual([])
  })
})
