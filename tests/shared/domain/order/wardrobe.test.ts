import { describe, expect, it } from 'vitest'
import { Chairs, doneAt, latestBegin, latestTurns, wardrobeWork } from '#shared/domain/order/wardrobe.ts'
import { seededRandom } from '#shared/domain/order/search/random.ts'
import { handDay } from '#tests/support/hand-day.ts'

const meal = { startMin: 100, endMin: 145 }

describe('doneAt', () => {
  it('stops for the meal and goes on after it', () => {
    expect(doneAt(80, 20, meal)).toBe(100)
    expect(doneAt(80, 30, meal)).toBe(155)
    expect(doneAt(120, 10, meal)).toBe(155)
    expect(doneAt(145, 10, meal)).toBe(155)
    expect(doneAt(80, 30, null)).toBe(110)
    expect(doneAt(-Infinity, 30, meal)).toBe(-Infinity)
  })
})

describe('latestBegin', () => {
  it('goes back over the meal', () => {
    expect(latestBegin(155, 30, meal)).toBe(80)
    expect(latestBegin(155, 10, meal)).toBe(145)
    expect(latestBegin(100, 30, meal)).toBe(70)
    expect(latestBegin(120, 30, meal)).toBe(70)
  })

  it('is the latest begin that is done in time', () => {
    const random = seededRandom(3)
    for (let time = 0; time < 300; time++) {
      const byMin = Math.floor(random() * 250)
      const workMin = 1 + Math.floor(random() * 80)
      const begin = latestBegin(byMin, workMin, meal)
      expect(doneAt(begin, workMin, meal)).toBeLessThanOrEqual(byMin)
      expect(doneAt(begin + 1, workMin, meal)).toBeGreaterThan(byMin > 100 && byMin < 145 ? 100 : byMin)
    }
  })
})

describe('wardrobeWork', () => {
  const problem = handDay({
    shots: [{ looks: ['a'] }],
    sitters: { Ada: { chairMin: 40 } },
    looks: {
      a: { sitter: 'Ada', changeMin: 10, style: 'x' },
      b: { sitter: 'Ada', changeMin: 15, style: 'x' },
      c: { sitter: 'Ada', changeMin: 5, style: 'y' },
    },
  })

  it('asks for the chair at first and where the style differs, and for nothing while the look stays', () => {
    expect(wardrobeWork(problem, -1, 0)).toEqual({ chairMin: 40, changeMin: 10 })
    expect(wardrobeWork(problem, 0, 1)).toEqual({ chairMin: 0, changeMin: 15 })
    expect(wardrobeWork(problem, 0, 2)).toEqual({ chairMin: 40, changeMin: 5 })
    expect(wardrobeWork(problem, 1, 1)).toEqual({ chairMin: 0, changeMin: 0 })
  })
})

describe('Chairs', () => {
  it('seats at once without a limit', () => {
    const chairs = new Chairs(null)
    expect(chairs.seat(10, 30, null)).toMatchObject({ beginMin: 10, endMin: 40, chair: null })
    expect(chairs.seat(10, 30, null).endMin).toBe(40)
  })

  it('makes the third wait for the first of two chairs to be free', () => {
    const chairs = new Chairs(2)
    expect([30, 20, 10].map((minutes) => chairs.seat(0, minutes, null).endMin)).toEqual([30, 20, 30])
  })

  it('copies what is taken', () => {
    const chairs = new Chairs(1)
    const copy = chairs.copy()
    copy.seat(0, 30, null)
    expect(chairs.seat(0, 5, null).endMin).toBe(5)
    expect(copy.seat(0, 5, null).endMin).toBe(35)
  })
})

describe('latestTurns', () => {
  it('ends each turn before its shot and before the next turn on its chair', () => {
    const turn = (shot: number, chairMin: number) => ({
      sitter: 0,
      shot,
      fromLook: -1,
      toLook: 0,
      chair: 0,
      chairMin,
      changeMin: 5,
      beginMin: 0,
      readyMin: 0,
    })
    expect(latestTurns([turn(0, 30), turn(1, 20)], ({ shot }) => [100, 110][shot] ?? 0, null)).toEqual([55, 85])
  })
})
