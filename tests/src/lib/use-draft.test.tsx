// @vitest-environment jsdom
import { act, renderHook } from '@testing-library/react'
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import { typingStore } from '#src/lib/typing.ts'
import { useDraft } from '#src/lib/use-draft.ts'

beforeEach(() => vi.useFakeTimers())
afterEach(() => {
  vi.useRealTimers()
  vi.unstubAllGlobals()
})

describe('useDraft', () => {
  it('counts as typing until the words are taken over, twice a second', () => {
    const taken: string[] = []
    const { result } = renderHook(() => useDraft('', (text) => taken.push(text)))
    act(() => result.current.change('felt'))
    expect([result.current.value, typingStore.isTyping(), taken]).toEqual(['felt', true, []])
    act(() => {
      vi.advanceTimersByTime(600)
    })
    expect([typingStore.isTyping(), taken]).toEqual([false, ['felt']])
  })

  it('takes over on leaving, and when the field goes away', () => {
    const taken: string[] = []
    const { result, unmount } = renderHook(() => useDraft('', (text) => taken.push(text)))
    act(() => result.current.change('one'))
    act(() => result.current.leave())
    act(() => result.current.change('two'))
    unmount()
    expect(taken).toEqual(['one', 'two'])
    expect(typingStore.isTyping()).toBe(false)
  })

  it('takes over when the page goes away', () => {
    const taken: string[] = []
    const { result } = renderHook(() => useDraft('', (text) => taken.push(text)))
    act(() => result.current.change('last words'))
    act(() => {
      window.dispatchEvent(new Event('pagehide'))
    })
    expect(taken).toEqual(['last words'])
  })

  it('ends typing, and takes over the other fields, when one cannot be taken over', () => {
    const reported: unknown[] = []
    vi.stubGlobal('reportError', (error: unknown) => reported.push(error))
    const taken: string[] = []
    const broken = renderHook(() =>
      useDraft('', () => {
        throw new Error('gone')
      }),
    )
    const whole = renderHook(() => useDraft('', (text) => taken.push(text)))
    act(() => broken.result.current.change('lost'))
    act(() => whole.result.current.change('kept'))
    act(() => {
      window.dispatchEvent(new Event('pagehide'))
    })
    expect([taken, typingStore.isTyping(), reported]).toEqual([['kept'], false, [new Error('gone')]])
  })

  it('forgets what is dropped', () => {
    const taken: string[] = []
    const { result } = renderHook(() => useDraft('kept', (text) => taken.push(text)))
    act(() => result.current.change('no'))
    act(() => result.current.drop())
    act(() => {
      vi.advanceTimersByTime(600)
    })
    expect([result.current.value, typingStore.isTyping(), taken]).toEqual(['kept', false, []])
  })
})
