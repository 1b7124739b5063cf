import { describe, expect, it } from 'vitest'
import { firstClock } from '#shared/domain/order/search/clock.ts'
import { type Compiled, compile } from '#shared/domain/order/search/compiled.ts'
import {
  type Label,
  dominates,
  extendTails,
  labelTables,
  leastMoved,
  makeNode,
  orderOf,
  readyTimes,
} from '#shared/domain/order/search/labels.ts'
import { handDay } from '#tests/support/hand-day.ts'

function label(c: Compiled, shot: number, more: Partial<Label> = {}): Label {
  return {
    ...firstClock(c),
    shot,
    before: null,
    broken: 0,
    split: 0,
    must: 0,
    should: 0,
    light: 0,
    wait: 0,
    tails: new Uint8Array(0),
    ready: new Float64Array(0),
    least: 0,
    ...more,
  }
}

const looks = { coat: { sitter: 'Ada', changeMin: 10 }, gown: { sitter: 'Ada', changeMin: 25 } }
const c = compile(handDay({ shots: [{ looks: ['coat'] }, {}, { looks: ['gown'] }], looks }))

describe('makeNode and readyTimes', () => {
  it('asks when sitters would be ready for what is to come', () => {
    const node = makeNode(c, labelTables(c), 0b001, 0)
    expect(node.needs).toEqual([{ sitter: 0, look: 1, notWithin: 10, started: true }])
    expect([...readyTimes(c, node, { ...firstClock(c), free: Float64Array.of(590), look: Int16Array.of(0) })]).toEqual([
      615,
    ])
  })

  it('asks for nobody who is not needed any more', () => {
    expect(makeNode(c, labelTables(c), 0b101, 2).needs).toEqual([])
  })
})

describe('dominates', () => {
  const node = makeNode(c, labelTables(c), 0b011, 1)
  const made = (end: number, ready: number, more: Partial<Label> = {}) =>
    label(c, 1, { end, ready: Float64Array.of(ready), ...more })

  it('takes the earlier with everybody ready no later', () => {
    expect(dominates(c, node, made(600, 620), made(605, 620, { light: 1 }))).toBe(true)
    expect(dominates(c, node, made(600, 640), made(605, 620, { light: 1 }))).toBe(false)
  })

  it('does not look at readiness before anybody can be wanted', () => {
    expect(dominates(c, node, made(600, 610), made(600, 590, { light: 1 }))).toBe(true)
  })

  it('keeps one that is later but breaks less', () => {
    expect(dominates(c, node, made(600, 620, { broken: 1 }), made(605, 620))).toBe(false)
  })

  it('counts the waiting that an earlier end of the last shot will bring', () => {
    // Ready 20 minutes sooner, not wanted any sooner: 20 minutes more to wait.
    expect(dominates(c, node, made(600, 590), made(600, 610, { wait: 15 }))).toBe(false)
    expect(dominates(c, node, made(600, 590), made(600, 610, { wait: 25 }))).toBe(true)
  })
})

describe('extendTails and leastMoved', () => {
  it('know how many shots have to be moved at least', () => {
    const tails = [2, 0].reduce<Uint8Array>(extendTails, new Uint8Array(0))
    expect([...tails]).toEqual([0])
    // Shots 2 and 0 are done; 0, 1, 3 can still be in order.
    expect(leastMoved(4, tails, 0b0101)).toBe(1)
  })
})

describe('orderOf', () => {
  it('goes back to the beginning', () => {
    expect(orderOf(label(c, 2, { before: label(c, 0) }))).toEqual([0, 2])
  })
})
