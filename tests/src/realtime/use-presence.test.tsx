// @vitest-environment jsdom
import { cleanup, fireEvent, screen } from '@testing-library/react'
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import { useShootContext } from '#src/realtime/shoot-realtime.tsx'
import { useSetPresence } from '#src/realtime/use-presence.ts'
import { shootScreen } from '#tests/support/shoot-screen.tsx'

beforeEach(() => localStorage.clear())
afterEach(() => {
  vi.useRealTimers()
  cleanup()
})

/** A shoot in which one button says where one is; `state` is what the others are told of this page. */
async function open() {
  let state = (): unknown => undefined
  function Screen() {
    const { awareness } = useShootContext().documents.board.provider
    const setPresence = useSetPresence()
    state = () => awareness.getLocalState()
    return (
      <>
        <button onClick={() => setPresence({ at: 'board' })}>Look at the board</button>
        <button onClick={() => setPresence({ at: 'light' })}>Look at the light</button>
        <button onClick={() => awareness.setLocalState(null)}>Leave</button>
      </>
    )
  }
  shootScreen('photographer').show(<Screen />)
  await screen.findByText('Leave')
  vi.useFakeTimers()
  return { press: (label: string) => fireEvent.click(screen.getByText(label)), state: () => state() }
}

describe('useSetPresence', () => {
  it('says what was last, fifty milliseconds after the first', async () => {
    const { press, state } = await open()
    press('Look at the board')
    press('Look at the light')
    expect(state()).toEqual({})
    vi.advanceTimersByTime(50)
    expect(state()).toMatchObject({ at: 'light' })
  })

  it('says nothing any more once the shoot is left', async () => {
    const { press, state } = await open()
    press('Look at the board')
    press('Leave')
    press('Look at the light')
    vi.advanceTimersByTime(1000)
    expect(state()).toBeNull()
  })
})
