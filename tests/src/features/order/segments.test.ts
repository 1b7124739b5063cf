import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { schedule } from '#shared/domain/order/schedule.ts'
import { randomDay } from '#tests/support/random-days.ts'
import { segmentsOf, spreadLabels } from '#src/features/order/segments.ts'

describe('segmentsOf', () => {
  it('covers the day from lights-on to wrap without gaps or overlaps, each shot once', () => {
    fc.assert(
      fc.property(fc.infiniteStream(fc.double({ min: 0, max: 1, maxExcluded: true, noNaN: true })), (stream) => {
        const problem = randomDay(() => stream.next().value ?? 0, { shots: 6 })
        const day = schedule(
          problem,
          problem.shots.map(({ id }) => id),
        )
        const segments = segmentsOf(day)
        let at = day.lightsOnMin
        for (const segment of segments) {
          expect(segment.startMin).toBe(at)
          expect(segment.endMin).toBeGreaterThan(at)
          at = segment.endMin
        }
        expect(at).toBe(day.wrapMin)
        expect(segments.filter(({ kind }) => kind === 'shot')).toHaveLength(6)
      }),
      { numRuns: 60 },
    )
  })
})

describe('spreadLabels', () => {
  it('pushes a label down only as far as the one above it needs', () => {
    expect(spreadLabels([10, 15, 80], 17)).toEqual([10, 27, 80])
  })
})
