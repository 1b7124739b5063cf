import { describe, expect, it } from 'vitest'
import type { OrderProblem } from '#shared/domain/order/problem.ts'
import { schedule } from '#shared/domain/order/schedule.ts'
import { seededRandom } from '#shared/domain/order/search/random.ts'
import { type HandDay, handDay, inOrder, sitterId } from '#tests/support/hand-day.ts'
import { shotId } from '#tests/support/plain-day.ts'
import { plannedDay, randomDay } from '#tests/support/random-days.ts'

// All times below are worked out by hand from the definitions in the docstring of `schedule`.

const times = (problem: OrderProblem, ...order: number[]) =>
  schedule(problem, inOrder(...order)).shots.map((shot) => [shot.startMin, shot.endMin])
const kinds = (problem: OrderProblem, ...order: number[]) =>
  schedule(problem, inOrder(...order)).broken.map((rule) => rule.kind)
const two = (more: Partial<HandDay> = {}): OrderProblem => handDay({ shots: [{}, {}], ...more })

describe('schedule', () => {
  it('rigs from lights-on, then changes over between shots', () => {
    expect(times(two(), 0, 1)).toEqual([
      [560, 590],
      [600, 630],
    ])
    const day = schedule(two(), inOrder(0, 1))
    expect(day).toMatchObject({ wrapMin: 630, changeoverMin: 30, lightingChanges: 1, broken: [], meal: null })
  })

  it('is lights-on to lights-on without shots', () => {
    expect(schedule(handDay({ shots: [] }), [])).toMatchObject({ wrapMin: 540, shots: [], broken: [], calls: [] })
  })

  it('refuses a shot it does not know or sees twice', () => {
    expect(() => schedule(two(), inOrder(0, 0))).toThrow(RangeError)
    expect(() => schedule(two(), inOrder(5))).toThrow(RangeError)
  })

  it('adds set move, strike and dressing to the light', () => {
    const bare = two()
    const moved = { lightingMin: 10, changesLight: true, moveMin: 15, strikeMin: 4, dressMin: 6, actions: 0 }
    const problem = {
      ...bare,
      transitions: bare.transitions.map((row, from) => row.map((cell) => (from === 0 ? cell : moved))),
    }
    expect(times(problem, 0, 1)[1]).toEqual([625, 655])
  })

  describe('wardrobe', () => {
    const looks = {
      coat: { sitter: 'Ada', changeMin: 15, style: 'a' },
      gown: { sitter: 'Ada', changeMin: 25, style: 'a' },
      night: { sitter: 'Ada', changeMin: 25, style: 'b' },
    }

    it('never holds up the first shot of a sitter who is here all day', () => {
      const day = schedule(
        handDay({ shots: [{ looks: ['coat'] }], looks, sitters: { Ada: { chairMin: 60 } } }),
        inOrder(0),
      )
      expect(day.shots[0]?.startMin).toBe(560)
    })

    it('takes no time while the look stays on', () => {
      expect(times(two({ shots: [{ looks: ['coat'] }, { looks: ['coat'] }], looks }), 0, 1)[1]).toEqual([600, 630])
    })

    it('costs the clock what goes beyond the light: 25 of change against 10', () => {
      const day = schedule(two({ shots: [{ looks: ['coat'] }, { looks: ['gown'] }], looks }), inOrder(0, 1))
      expect(day.shots[1]).toMatchObject({ startMin: 615, changeover: { minutes: 25, wardrobeWaitMin: 15 } })
      expect(day.shots[1]?.changeover.wardrobe).toMatchObject([
        { lookName: 'gown', chairMin: 0, changeMin: 25, first: false, onClockMin: 15 },
      ])
      expect(day.wardrobeOnClock).toBe(1)
    })

    it('is hidden behind another person’s shot', () => {
      const day = schedule(handDay({ shots: [{ looks: ['coat'] }, {}, { looks: ['gown'] }], looks }), inOrder(0, 1, 2))
      expect(day.shots[2]).toMatchObject({ startMin: 640, changeover: { wardrobeWaitMin: 0 } })
      expect(day.wardrobeOnClock).toBe(0)
    })

    it('takes the chair again where hair or make-up differs', () => {
      const problem = two({
        shots: [{ looks: ['coat'] }, { looks: ['night'] }],
        looks,
        sitters: { Ada: { chairMin: 40 } },
      })
      expect(times(problem, 0, 1)[1]).toEqual([590 + 40 + 25, 590 + 40 + 25 + 30])
    })

    it('begins when the sitter’s hours begin', () => {
      const problem = handDay({
        shots: [{ looks: ['coat'] }],
        looks,
        sitters: { Ada: { hours: [550, 900], chairMin: 20 } },
      })
      expect(times(problem, 0)).toEqual([[585, 615]])
    })
  })

  describe('meal', () => {
    const meal = { minutes: 45, latestAfterMin: 90 } // no later than 630

    it('is taken at the latest gap that keeps it in time', () => {
      const day = schedule(handDay({ shots: [{}, {}, {}, {}], meal }), inOrder(0, 1, 2, 3))
      // Shots end at 590, 630, then the third would end at 670: the meal goes before it.
      expect(day.meal).toEqual({ startMin: 630, endMin: 675 })
      expect(day.shots[2]).toMatchObject({ startMin: 685, mealBefore: { startMin: 630 }, changeover: { minutes: 10 } })
      expect(day.broken).toEqual([])
    })

    it('is taken at the last gap when it could wait longer', () => {
      expect(schedule(two({ meal: { minutes: 45, latestAfterMin: 400 } }), inOrder(0, 1)).meal).toEqual({
        startMin: 590,
        endMin: 635,
      })
    })

    it('comes after a first shot that is too long, and is late', () => {
      const problem = handDay({ shots: [{ minutes: 120 }, {}], meal })
      expect(schedule(problem, inOrder(0, 1)).meal).toEqual({ startMin: 680, endMin: 725 })
      expect(kinds(problem, 0, 1)).toEqual(['meal'])
    })

    it('stops chair and change', () => {
      const looks = { coat: { sitter: 'Ada', changeMin: 0 }, gown: { sitter: 'Ada', changeMin: 60 } }
      const problem = handDay({ shots: [{ looks: ['coat'] }, {}, { looks: ['gown'] }], looks, meal })
      // Ada is free at 590 and has changed for 40 minutes when the meal begins at 630; 20 are left after it ends at 675.
      expect(times(problem, 0, 1, 2)[2]?.[0]).toBe(695)
    })
  })

  it('gives out chairs in running order', () => {
    const looks = { a: { sitter: 'Ada', changeMin: 5 }, b: { sitter: 'Bea', changeMin: 5 } }
    const sitters = {
      Ada: { hours: [540, 900] as const, chairMin: 30 },
      Bea: { hours: [540, 900] as const, chairMin: 30 },
    }
    const shots = [{ looks: ['a'] }, { looks: ['b'], minutes: 10 }]
    // Unlimited: both ready at 575. One chair: Bea sits 570–600, ready at 605; shot 1 is 575–605.
    expect(
      times(handDay({ shots: [{ looks: ['a'], minutes: 5 }, { looks: ['b'] }], looks, sitters }), 0, 1)[1]?.[0],
    ).toBe(590)
    expect(
      times(
        handDay({ shots: [{ looks: ['a'], minutes: 5 }, { looks: ['b'] }], looks, sitters, chairs: 1 }),
        0,
        1,
      )[1]?.[0],
    ).toBe(605)
    expect(times(handDay({ shots, looks, sitters, chairs: 2 }), 0, 1)).toEqual([
      [575, 605],
      [615, 625],
    ])
  })

  describe('calls', () => {
    const looks = { coat: { sitter: 'Ada', changeMin: 12 }, gown: { sitter: 'Bea', changeMin: 10 } }

    it('are first start less change, chair and travel, rounded down to five minutes', () => {
      const day = schedule(
        two({ shots: [{}, { looks: ['coat'] }], looks, sitters: { Ada: { chairMin: 40, travelMin: 30 } } }),
        inOrder(0, 1),
      )
      // 600 − 12 − 40 = 548 into the chair; 518 on the way; 515.
      expect(day.calls).toMatchObject([{ sitterId: sitterId(0), callMin: 515, beginMin: 548, firstStartMin: 600 }])
    })

    it('leave a limited chair to whoever needs it next', () => {
      const sitters = { Ada: { chairMin: 30 }, Bea: { chairMin: 30 } }
      const day = schedule(
        two({ shots: [{ looks: ['coat'], minutes: 10 }, { looks: ['gown'] }], looks, sitters, chairs: 1 }),
        inOrder(0, 1),
      )
      // Shots at 560 and 580: Bea into the chair at 540, so Ada at 510, not at 518.
      expect(day.calls.map((call) => [call.sitterName, call.beginMin])).toEqual([
        ['Ada', 510],
        ['Bea', 540],
      ])
    })
  })

  it('counts as waiting what is neither chair, change nor meal between own shots', () => {
    const looks = { coat: { sitter: 'Ada', changeMin: 0 }, gown: { sitter: 'Ada', changeMin: 20 } }
    const day = schedule(handDay({ shots: [{ looks: ['coat'] }, {}, { looks: ['gown'] }], looks }), inOrder(0, 1, 2))
    // 590 to 640 less 20 of change.
    expect(day.waiting).toEqual([{ sitterId: sitterId(0), minutes: 30 }])
    expect(day.waitingMin).toBe(30)
  })

  describe('rules', () => {
    it('holds a shot until its window opens and says when it ends too late', () => {
      const problem = two({ rules: [{ kind: 'window', shot: 1, fromMin: 620, toMin: 640 }] })
      const day = schedule(problem, inOrder(0, 1))
      expect(day.shots[1]).toMatchObject({
        startMin: 620,
        notBeforeMin: 620,
        changeover: { minutes: 30, holdWaitMin: 20 },
      })
      expect(day.broken[0]?.words).toBe('“Shot 2” lies between 10:20 and 10:40, but ends at 10:50, 10 min late.')
    })

    it('holds a shot until its clock time and allows the tolerance', () => {
      const pin = (atMin: number, toleranceMin: number) =>
        two({ rules: [{ kind: 'pin-clock', shot: 1, atMin, toleranceMin }] })
      expect(times(pin(610, 0), 0, 1)[1]).toEqual([610, 640])
      expect(kinds(pin(595, 5), 0, 1)).toEqual([])
      expect(kinds(pin(595, 4), 0, 1)).toEqual(['pin-clock'])
    })

    it('knows places, the last one too, and takes a place beyond the last for the last', () => {
      const pin = (index: number) => two({ rules: [{ kind: 'pin-place', shot: 0, index }] })
      expect(kinds(pin(0), 0, 1)).toEqual([])
      expect(kinds(pin(-1), 0, 1)).toEqual(['pin-place'])
      expect(kinds(pin(9), 1, 0)).toEqual([])
    })

    it('knows what comes after what, and what belongs together', () => {
      const problem = handDay({
        shots: [{}, {}, {}],
        rules: [
          { kind: 'after', shot: 0, after: 2 },
          { kind: 'together', shots: [0, 2] },
        ],
      })
      expect(kinds(problem, 2, 0, 1)).toEqual([])
      expect(kinds(problem, 0, 1, 2)).toEqual(['after', 'together'])
      expect(kinds(problem, 2, 1, 0)).toEqual(['together'])
    })

    it('says every breach, sitters’ hours shot by shot', () => {
      const looks = { coat: { sitter: 'Ada', changeMin: 0 } }
      const problem = two({
        shots: [{ looks: ['coat'] }, { looks: ['coat'] }],
        looks,
        sitters: { Ada: { hours: [500, 580] } },
      })
      expect(schedule(problem, inOrder(0, 1)).broken.map((rule) => rule.words)).toEqual([
        'Ada leaves at 09:40, but “Shot 1” ends at 09:50, 10 min late.',
        'Ada leaves at 09:40, but “Shot 2” ends at 10:30, 50 min late.',
      ])
    })
  })

  it('does not call a shot made that ends after the hard out', () => {
    const day = schedule(two({ hardOutMin: 629 }), inOrder(0, 1))
    expect(day.shots.map((shot) => shot.made)).toEqual([true, false])
    expect(day.broken).toEqual([])
  })

  it('keeps its laws on random days', () => {
    for (let seed = 0; seed < 150; seed++) {
      const make = seed % 2 === 0 ? randomDay : plannedDay
      const problem = make(seededRandom(seed), { shots: 2 + (seed % 8), rules: 4 })
      const day = schedule(
        problem,
        problem.shots.map((shot) => shot.id),
      )
      let end = problem.lightsOnMin
      for (const shot of day.shots) {
        const { changeover, mealBefore } = shot
        const mealMin = mealBefore ? mealBefore.endMin - mealBefore.startMin : 0
        expect(shot.startMin).toBe(end + mealMin + changeover.minutes)
        const set = changeover.setMove
        const lightMin = changeover.lightingMin + (set ? set.moveMin + set.strikeMin + set.dressMin : 0)
        expect(changeover.minutes).toBe(lightMin + changeover.wardrobeWaitMin + changeover.holdWaitMin)
        end = shot.endMin
      }
      expect(day.wrapMin).toBe(end)
      expect(day.waiting.every((wait) => wait.minutes >= 0)).toBe(true)
      expect(
        day.calls.every(
          (call) => call.callMin % 5 === 0 && call.beginMin + call.chairMin + call.changeMin <= call.firstStartMin,
        ),
      ).toBe(true)
      expect(day.shots.filter((shot) => shot.mealBefore).length).toBe(problem.meal && problem.shots.length > 1 ? 1 : 0)
    }
  })

  it('knows shots by id whatever their order', () => {
    expect(schedule(two(), inOrder(1, 0)).shots.map((shot) => shot.shotId)).toEqual([shotId(2), shotId(1)])
  })
})
