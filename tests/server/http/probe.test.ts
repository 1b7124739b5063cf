import { describe, expect, it } from 'vitest'
import { createProbe } from '#server/http/probe.ts'

describe('createProbe', () => {
  it('answers with what was said, and with nothing when the question fails or takes too long', async () => {
    expect(await createProbe(async () => 7, 10_000)()).toBe(7)
    expect(await createProbe(() => Promise.reject(new Error('away')), 10_000)()).toBe(undefined)
    expect(await createProbe(() => new Promise(() => undefined), 5)()).toBe(undefined)
  })

  it('asks once for all who want to know meanwhile, and anew afterwards', async () => {
    let asked = 0
    const probe = createProbe(async () => ++asked, 10_000)
    expect(await Promise.all([probe(), probe(), probe()])).toEqual([1, 1, 1])
    expect(await probe()).toBe(2)
  })
})
