import { describe, expect, it } from 'vitest'
import { clockLabel, listLabel, minutesLabel } from '#shared/domain/order/clock.ts'

describe('clockLabel', () => {
  it('cuts off parts of a minute and begins again at midnight', () => {
    expect([630, 630.75, 0, 1470, -10].map(clockLabel)).toEqual(['10:30', '10:30', '00:00', '00:30', '23:50'])
  })
})

describe('minutesLabel', () => {
  it('rounds up', () => {
    expect([8, 8.25, 0].map(minutesLabel)).toEqual(['8 min', '9 min', '0 min'])
  })
})

describe('listLabel', () => {
  it('reads as a list', () => {
    expect([[], ['a'], ['a', 'b'], ['a', 'b', 'c']].map(listLabel)).toEqual(['', 'a', 'a and b', 'a, b and c'])
  })
})
