import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import type { SaveState } from '#src/realtime/save-state.ts'
import { createStore } from '#src/realtime/store.ts'
import { untilSaved } from '#src/realtime/until-saved.ts'

beforeEach(() => void vi.useFakeTimers())
afterEach(() => void vi.useRealTimers())

const document = (kind: 'saved' | 'saving') => ({
  save: createStore<SaveState>(kind === 'saving' ? { kind, kept: true } : { kind }),
})

describe('untilSaved', () => {
  it('waits for every document whose edits are on their way', async () => {
    const board = document('saving')
    const plan = document('saved')
    const answer = untilSaved([board, plan])
    board.save.set({ kind: 'saved' })
    expect(await answer).toBe(true)
  })

  it('says no at once to what is not saved, and after a while to what stays on its way', async () => {
    const board = document('saving')
    const refused = untilSaved([board])
    board.save.set({ kind: 'not-saved', why: 'full' })
    expect(await refused).toBe(false)
    const late = untilSaved([document('saving')])
    await vi.runAllTimersAsync()
    expect(await late).toBe(false)
  })
})
