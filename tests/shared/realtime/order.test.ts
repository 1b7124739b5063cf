import fc from 'fast-check'
import { describe, expect, it, vi } from 'vitest'
import {
  type Deed,
  EMPTY_VIEW,
  Person,
  type View,
  actOf,
  canonical,
  deedOf,
  demandOneOrder,
  hand,
  randomDeeds,
  settle,
  tiesIn,
  viewAfter,
  viewOf,
} from '#tests/support/order-history.ts'

type Tally = { wentBack: number; handed: number; ties: number }

/** Three people who exchange what they have at random moments, away from each other for a while at times. */
function live(deeds: readonly Deed[]): Tally {
  const people = [new Person(11), new Person(12), new Person(13)]
  const tally: Tally = { wentBack: 0, handed: 0, ties: 0 }
  deeds.forEach((deed, n) => {
    const person = people[deed.who]
    if (!person) return
    if (deed.kind === 'leave' || deed.kind === 'return') person.isAway = deed.kind === 'leave'
    else if (deed.kind === 'exchange') {
      const other = people[(deed.who + (deed.one < 0.5 ? 1 : 2)) % people.length]
      if (!other || person.isAway || other.isAway) return
      hand(person, other)
      hand(other, person)
      tally.handed++
      tally.ties += tiesIn(person.doc)
    } else if (person.do(deed, n) && (deed.kind === 'undo' || deed.kind === 'redo')) tally.wentBack++
  })
  settle(people)
  demandOneOrder(people.map(({ doc }) => doc))
  return tally
}

// Not drawn to the edges, or most deeds would be of one kind and one person.
const share = fc.integer({ min: 0, max: 2 ** 24 - 1 }).map((n) => n / 2 ** 24)
const deeds = fc.noBias(fc.array(fc.tuple(share, share, share, share, share), { maxLength: 300, size: 'max' }))

// Long histories on a busy machine.
vi.setConfig({ testTimeout: 90_000 })

describe('a board that three people order, with undo and redo', () => {
  it('holds every living shot once and in one order over 60 histories of 300 deeds', () => {
    const sum: Tally = { wentBack: 0, handed: 0, ties: 0 }
    for (let run = 1; run <= 60; run++) {
      const { wentBack, handed, ties } = live(randomDeeds(run, 300))
      sum.wentBack += wentBack
      sum.handed += handed
      sum.ties += ties
    }
    // The histories are worth something: much was undone, exchanged, and put at the same place at the same moment.
    expect(sum.wentBack).toBeGreaterThan(2_000)
    expect(sum.handed).toBeGreaterThan(1_000)
    expect(sum.ties).toBeGreaterThan(100)
  })

  it('does so over histories that shrink when they fail', () => {
    fc.assert(
      fc.property(deeds, (drawn) => {
        live(drawn.map((numbers) => deedOf(...numbers)))
      }),
      { seed: 20_261_201, numRuns: 60, interruptAfterTimeLimit: 12_000 },
    )
  })
})

describe('a board that one person orders', () => {
  it('is what plain arrays are, and undo and redo go through the states it had', () => {
    for (let run = 1; run <= 40; run++) {
      const person = new Person(11)
      let states: View[] = [EMPTY_VIEW]
      let at = 0
      randomDeeds(1000 + run, 300).forEach((deed, n) => {
        const state = states[at] ?? EMPTY_VIEW
        const wrote = person.do({ ...deed, joins: false }, n)
        if (deed.kind === 'undo') at = Math.max(0, at - 1)
        else if (deed.kind === 'redo') at = Math.min(states.length - 1, at + 1)
        else {
          const act = actOf(state, deed, n)
          if (act && wrote) {
            states = [...states.slice(0, at + 1), viewAfter(state, act)]
            at++
          }
        }
        expect(canonical(viewOf(person.doc))).toBe(canonical(states[at] ?? EMPTY_VIEW))
      })
    }
  })
})
