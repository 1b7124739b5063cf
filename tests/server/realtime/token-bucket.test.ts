import { describe, expect, it } from 'vitest'
import { TokenBucket } from '#server/realtime/token-bucket.ts'

describe('TokenBucket', () => {
  it('gives its capacity at once, then its rate', () => {
    const bucket = new TokenBucket(100, 200, 0)
    expect(bucket.take(200, 0)).toBe(0)
    expect(bucket.take(50, 0)).toBe(500)
    expect(bucket.take(50, 1000)).toBe(0)
  })

  it('makes a debt of what is too much and refuses nothing', () => {
    const bucket = new TokenBucket(100, 100, 0)
    expect(bucket.take(1100, 0)).toBe(10_000)
    expect(bucket.take(0, 10_000)).toBe(0)
  })

  it('does not save up beyond its capacity', () => {
    const bucket = new TokenBucket(100, 100, 0)
    expect(bucket.take(101, 3_600_000)).toBeGreaterThan(0)
  })
})
