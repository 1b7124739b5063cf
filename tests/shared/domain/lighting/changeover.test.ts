import * as fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { changeActions, changesLight, lightingMinutes } from '#shared/domain/lighting/changeover.ts'
import { lightSchema, type Light } from '#shared/domain/lighting/schema.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { lampUnit } from '#tests/support/lamp-sample.ts'
import {
  BOOM,
  FULL_WARM,
  GRID,
  HALF_BLUE,
  MAINS_KIT,
  MINUTES,
  OCTA,
  SOFTBOX,
  STAND,
  id,
  light,
  unit,
  whole,
} from '#tests/support/lighting-sample.ts'

const here = { sameRoom: true, minutes: MINUTES }
const FACE: [number, number, number] = [0, 1.5, 0]
const main = (more: Partial<Light> = {}) =>
  lightSchema.parse({ ...light(1, { purpose: 'main', at: [-1.2, 1.9, 1], aim: FACE, modifier: OCTA }), ...more })
const rim = (more: Partial<Light> = {}) =>
  lightSchema.parse({
    ...light(2, { purpose: 'rim', at: [1.2, 1.9, -1.2], aim: FACE, unit: unit(MAINS_KIT, { remotePower: false }) }),
    ...more,
  })

/** The same setup with other ids, as a variation has. */
function renamed(setup: WholeSetup, by: number): WholeSetup {
  const other = (own: string) => id(Number(own.slice(-6)) + by)
  return {
    ...setup,
    lights: setup.lights.map((entry) => lightSchema.parse({ ...entry, id: other(entry.id) })),
  }
}

function kinds(from: WholeSetup | null, to: WholeSetup, sameRoom = true): string[] {
  return changeActions(from, to, { sameRoom, minutes: MINUTES }).map((action) => action.kind)
}

describe('changeActions', () => {
  it('has nothing to do between a setup and its untouched variation', () => {
    const setup = whole({ lights: [main(), rim()], props: [{}] })
    const actions = changeActions(setup, renamed(setup, 100), here)
    expect(actions).toEqual([])
    expect(lightingMinutes(actions, 2, MINUTES)).toBe(0)
  })

  it('adds and strikes the same light by turns', () => {
    const one = whole({ lights: [main()] })
    const two = whole({ lights: [main(), rim()] })
    expect(changeActions(one, two, here)).toMatchObject([{ kind: 'add', minutes: 4, key: `${id(2)}:add` }])
    expect(changeActions(two, one, here)).toMatchObject([{ kind: 'strike', minutes: 1.5, what: 'Rim: strike' }])
  })

  it('switches a light by remote for nothing, by hand for half a minute, and asks nothing of one that is off', () => {
    const both = whole({ lights: [main(), rim()] })
    const off = whole({ lights: [main({ isOn: false, power: 1 / 16 }), rim({ isOn: false })] })
    expect(changeActions(both, off, here)).toMatchObject([
      { kind: 'switch', what: 'Main: switch off', minutes: 0 },
      { kind: 'switch', what: 'Rim: switch off', minutes: 0.5 },
    ])
    expect(changeActions(off, both, here).map((action) => action.kind)).toEqual(['switch', 'power', 'switch'])
  })

  it('adds a light that is off as off, and takes a lamp for a unit of its own', () => {
    const [added] = changeActions(whole({ lights: [main()] }), whole({ lights: [main(), rim({ isOn: false })] }), here)
    expect(added?.detail).toMatch(/ · off$/)
    const lamp = lightSchema.parse({ ...main(), unit: lampUnit(4000) })
    expect(kinds(whole({ lights: [main()] }), whole({ lights: [lamp] }))).toEqual(['strike', 'add'])
    expect(kinds(whole({ lights: [lamp] }), whole({ lights: [{ ...lamp, at: [-2, 1.9, 1] }] }))).toEqual(['move'])
  })

  it('names each thing that changes on one light, one action each', () => {
    const to = whole({
      lights: [
        main({
          at: [1.2, 1.9, 1],
          modifier: SOFTBOX,
          gels: [FULL_WARM],
          support: BOOM,
          power: 0.125,
          zoomMm: 50,
          group: 'A',
        } as Partial<Light>),
      ],
    })
    const actions = changeActions(whole({ lights: [main()] }), to, here)
    expect(actions.map(({ kind, what, minutes }) => [kind, what, minutes])).toEqual([
      ['move', 'Main to camera right, 1.6 m', 3],
      ['modifier', 'Main: 90 cm octa off, 60 cm softbox on', 2],
      ['gel', 'Main: full warm +167 on', 0.5],
      ['support', 'Main: onto boom arm', 2],
      ['power', 'Main to 1/8', 0],
      ['zoom', 'Main: zoom to 50 mm', 0],
      ['group', 'Main: into group A', 0.5],
    ])
  })

  it('tells small moves by what changed', () => {
    const from = whole({ lights: [main()] })
    expect(changeActions(from, whole({ lights: [main({ at: [-1.2, 1.3, 1] })] }), here)).toMatchObject([
      { what: 'Main 0.6 m lower', detail: '1.3 m up' },
    ])
    expect(changeActions(from, whole({ lights: [main({ at: [-0.9, 1.9, 0.75] })] }), here)).toMatchObject([
      { what: 'Main 0.4 m closer' },
    ])
  })

  it('does not call five centimetres a move', () => {
    const from = whole({ lights: [main()] })
    expect(kinds(from, whole({ lights: [main({ at: [-1.2, 1.95, 1] })] }))).toEqual([])
    expect(kinds(from, whole({ lights: [main({ at: [-1.2, 1.96, 1] })] }))).toEqual(['move'])
  })

  it('turns a head that stays where it is', () => {
    const to = whole({ lights: [main({ aim: [0, 1.2, -2] })] })
    expect(changeActions(whole({ lights: [main()] }), to, here)).toMatchObject([
      { kind: 'aim', what: 'Main: turn to the background' },
    ])
  })

  it('asks half a minute for power by hand and none by remote', () => {
    const to = whole({ lights: [main({ power: 0.5 }), rim({ power: 0.5 })] })
    const actions = changeActions(whole({ lights: [main(), rim()] }), to, here)
    expect(actions.map((action) => [action.kind, action.minutes])).toEqual([
      ['power', 0],
      ['power', 0.5],
    ])
  })

  it('moves every light in another room, with its differences, and the camera and panels with it', () => {
    const from = whole({ lights: [main(), rim()], props: [{}] })
    const to = whole({ lights: [main(), rim({ gels: [HALF_BLUE] } as Partial<Light>)], props: [{}] })
    expect(kinds(from, to, false)).toEqual(['move', 'move', 'gel', 'panel', 'camera'])
  })

  it('rigs everything from nothing', () => {
    expect(kinds(null, whole({ lights: [main(), rim()], props: [{}] }))).toEqual([
      'add',
      'add',
      'panel',
      'camera',
      'background',
    ])
  })

  it('counts camera, lens and background, and no camera settings', () => {
    const from = whole({ lights: [main()] })
    const to = whole({
      lights: [main()],
      camera: { at: [0.5, 1.4, 3], focalMm: 50, fNumber: 4 },
      background: { zM: -3 },
    })
    expect(changeActions(from, to, here).map((action) => [action.kind, action.minutes])).toEqual([
      ['camera', 2],
      ['lens', 1],
      ['background', 6],
    ])
  })

  it('adds, moves and strikes panels and flags', () => {
    const bare = whole({})
    const there = whole({ props: [{}] })
    expect(changeActions(bare, there, here)).toMatchObject([
      { kind: 'panel', what: 'White panel: add, camera right, 1.6 m', minutes: 2 },
    ])
    expect(changeActions(there, bare, here)).toMatchObject([{ kind: 'panel', what: 'White panel: strike', minutes: 2 }])
    expect(changeActions(there, whole({ props: [{ turnDeg: 20 }] }), here)).toHaveLength(1)
  })

  it('pairs equal units so that least is done', () => {
    const a = light(1, { purpose: 'main', at: [-1, 1.9, 1], aim: FACE, modifier: OCTA })
    const b = light(2, { purpose: 'rim', at: [1, 1.9, -1], aim: FACE, modifier: GRID })
    const from = whole({ lights: [a, b] })
    const swapped = whole({
      lights: [lightSchema.parse({ ...b, id: id(1), rank: 'a0' }), lightSchema.parse({ ...a, id: id(2), rank: 'a1' })],
    })
    expect(changeActions(from, swapped, here)).toEqual([])
  })

  it('keeps the octa standing when one of two equal lights goes', () => {
    const a = light(1, { purpose: 'main', at: [-1, 1.9, 1], aim: FACE, modifier: OCTA })
    const b = light(2, { purpose: 'rim', at: [1, 1.9, -1], aim: FACE, modifier: GRID })
    const actions = changeActions(whole({ lights: [a, b] }), whole({ lights: [b] }), here)
    expect(actions).toMatchObject([{ kind: 'strike', what: 'Main: strike' }])
  })
})

describe('lightingMinutes', () => {
  /** Three setups by hand: minutes of each changeover for two hands, test frames (2) included. */
  const bare = whole({ lights: [main()] })
  const softer = whole({ lights: [main({ modifier: SOFTBOX, at: [-1.2, 1.3, 1] } as Partial<Light>)] })
  const full = whole({ lights: [main({ modifier: SOFTBOX } as Partial<Light>), rim()] })
  it.each([
    ['octa to softbox, lower', bare, softer, 1, 2 + 2 + 2],
    ['octa to softbox, lower, two hands', bare, softer, 2, 2 + 2],
    ['a rim more, higher', softer, full, 1, 4 + 2 + 2],
    ['a rim more, higher, two hands', softer, full, 2, 4 + 2],
    ['back: rim struck, octa on', full, bare, 1, 1.5 + 2 + 2],
    ['back, two hands', full, bare, 2, 2 + 2],
  ])('%s', (_, from, to, hands, expected) => {
    expect(lightingMinutes(changeActions(from, to, here), hands, MINUTES)).toBeCloseTo(expected, 9)
  })

  it('asks for test frames when the light changed, not for camera and lens alone', () => {
    const moved = whole({ lights: [main()], camera: { at: [0.5, 1.4, 3], focalMm: 50 } })
    const actions = changeActions(bare, moved, here)
    expect(actions.some(changesLight)).toBe(false)
    expect(lightingMinutes(actions, 1, MINUTES)).toBe(3)
    const remote = changeActions(bare, whole({ lights: [main({ power: 0.5 })] }), here)
    expect(lightingMinutes(remote, 1, MINUTES)).toBe(2)
  })

  const point = fc.tuple(fc.constantFrom(-2, -1, 0, 1, 2), fc.constantFrom(1, 1.9), fc.constantFrom(-2, 0, 2))
  const anyLight = fc.record({
    at: point,
    modifier: fc.constantFrom(null, OCTA, GRID),
    support: fc.constantFrom(STAND, BOOM),
    gels: fc.boolean().map((warm) => (warm ? [FULL_WARM] : [])),
    power: fc.constantFrom(1, 0.5, 0.25),
    mains: fc.boolean(),
  })
  const anySetup = fc.array(anyLight, { maxLength: 5 }).map((rows) =>
    rows.map(({ mains, ...row }, n) =>
      light(n + 1, {
        purpose: 'main',
        aim: FACE,
        unit: unit(mains ? MAINS_KIT : undefined, { remotePower: !mains }),
        ...row,
      }),
    ),
  )

  it('is never longer with more hands than with one', () => {
    fc.assert(
      fc.property(anySetup, anySetup, fc.integer({ min: 1, max: 6 }), (a, b, hands) => {
        const actions = changeActions(whole({ lights: a }), whole({ lights: b }), here)
        expect(lightingMinutes(actions, hands, MINUTES)).toBeLessThanOrEqual(
          lightingMinutes(actions, 1, MINUTES) + 1e-9,
        )
      }),
      { numRuns: 200 },
    )
  })

  it('does not depend on ids or on the order of the lights', () => {
    fc.assert(
      fc.property(
        anySetup,
        anySetup,
        fc.integer({ min: 1, max: 3 }),
        fc.infiniteStream(fc.nat(1000)),
        (a, b, hands, stream) => {
          const plain = changeActions(whole({ lights: a }), whole({ lights: b }), here)
          const shuffled = b
            .map((entry, n) => ({ entry, n, key: stream.next().value ?? 0 }))
            .sort((x, y) => x.key - y.key || x.n - y.n)
            .map(({ entry }, n) => lightSchema.parse({ ...entry, id: id(300 - n) }))
          const other = changeActions(whole({ lights: a }), whole({ lights: shuffled }), here)
          expect(lightingMinutes(other, hands, MINUTES)).toBeCloseTo(lightingMinutes(plain, hands, MINUTES), 9)
        },
      ),
      { numRuns: 200 },
    )
  })

  it('strikes as many lights one way as it adds the other way', () => {
    fc.assert(
      fc.property(anySetup, anySetup, (a, b) => {
        const count = (from: Light[], to: Light[], kind: string) =>
          changeActions(whole({ lights: from }), whole({ lights: to }), here).filter((action) => action.kind === kind)
            .length
        expect(count(a, b, 'strike')).toBe(count(b, a, 'add'))
      }),
    )
  })
})
