// @vitest-environment jsdom
import { act, cleanup, render, screen } from '@testing-library/react'
import { afterEach, beforeEach, expect, it, vi } from 'vitest'
import { OpeningShoot } from '#src/app/layouts/opening-shoot.tsx'

beforeEach(() => void vi.useFakeTimers())
afterEach(() => {
  cleanup()
  vi.useRealTimers()
})

it('says what it waits for when a shoot takes long to open', () => {
  render(<OpeningShoot title="Leaf, Brass & Star" />)
  expect(screen.getByRole('status').textContent).toBe('Opening Leaf, Brass & Star…')
  act(() => void vi.advanceTimersByTime(7_000))
  expect(screen.queryByText(/not all of this shoot is on this device/)).toBeNull()
  act(() => void vi.advanceTimersByTime(1_500))
  expect(screen.getByText(/not all of this shoot is on this device/)).toBeTruthy()
})
