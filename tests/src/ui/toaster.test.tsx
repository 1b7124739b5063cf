// @vitest-environment jsdom
import { act, cleanup, fireEvent, render, screen } from '@testing-library/react'
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import { toast, toastStore } from '#src/ui/toast.ts'
import { Toaster } from '#src/ui/toaster.tsx'

beforeEach(() => vi.useFakeTimers())
afterEach(() => {
  cleanup()
  for (const { id } of toastStore.read()) toast.dismiss(id)
  vi.useRealTimers()
})

describe('Toaster', () => {
  it('says a message and puts it away after six seconds', () => {
    render(<Toaster />)
    act(() => void toast.say('The letter is sent.'))
    expect(screen.getByRole('status').textContent).toContain('The letter is sent.')
    act(() => void vi.advanceTimersByTime(6000))
    expect(screen.queryByRole('status')).toBeNull()
  })

  it('leaves an error until somebody puts it away', () => {
    render(<Toaster />)
    act(() => void toast.error('Sconce cannot be reached.'))
    act(() => void vi.advanceTimersByTime(60_000))
    expect(screen.getByRole('alert').textContent).toContain('cannot be reached')
    fireEvent.click(screen.getByRole('button', { name: 'Put this message away' }))
    expect(screen.queryByRole('alert')).toBeNull()
  })

  it('keeps a message while a pointer rests on it', () => {
    render(<Toaster />)
    act(() => void toast.say('Removed.'))
    fireEvent.mouseEnter(screen.getByRole('status'))
    act(() => void vi.advanceTimersByTime(60_000))
    expect(screen.getByRole('status').textContent).toContain('Removed.')
  })

  it('says the same thing once and offers its action', () => {
    const pressed: string[] = []
    render(<Toaster />)
    act(() => {
      toast.say('Removed.', { label: 'Undo', onPress: () => pressed.push('undo') })
      toast.say('Removed.', { label: 'Undo', onPress: () => pressed.push('undo') })
    })
    fireEvent.click(screen.getByRole('button', { name: 'Undo' }))
    expect(pressed).toEqual(['undo'])
    expect(screen.queryByRole('status')).toBeNull()
  })
})
