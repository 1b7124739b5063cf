import { describe, expect, it } from 'vitest'
import { snapBox } from '#shared/domain/board/snap.ts'

describe('snapBox', () => {
  it('goes to the nearest edge within the tolerance and draws the guide over both', () => {
    const snap = snapBox([103, 300, 80, 40], [[100, 0, 200, 100]], 6)
    expect(snap.dx).toBe(-3)
    expect(snap.dy).toBe(0)
    expect(snap.guides).toEqual([{ axis: 'x', at: 100, from: 0, to: 340 }])
  })

  it('lines a middle up with a middle, not with an edge', () => {
    expect(snapBox([158, 300, 80, 40], [[100, 0, 200, 100]], 6).dx).toBe(2)
    expect(snapBox([62, 300, 80, 40], [[100, 0, 200, 100]], 3).dx).toBe(0)
  })

  it('stays free beyond the tolerance', () => {
    expect(snapBox([120, 300, 80, 40], [[100, 0, 200, 100]], 6)).toEqual({ dx: 0, dy: 0, guides: [] })
  })
})
