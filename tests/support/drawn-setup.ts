import fc from 'fast-check'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { LIGHT_PURPOSES, type Light, sitterPlaceSchema } from '#shared/domain/lighting/schema.ts'
import { lampUnit } from './lamp-sample.ts'
import { BOOM, FULL_WARM, GRID, HALF_BLUE, OCTA, STAND, id, light, unit, whole } from './lighting-sample.ts'

const within = (min: number, max: number) =>
  fc.double({ min, max, noNaN: true }).map((value) => Math.round(value * 1000) / 1000 + 0)
const point = fc.tuple(within(-4, 4), within(0.2, 2.8), within(-1.8, 4))

/** A light somewhere in the room, of any make. */
function drawnLight(n: number): fc.Arbitrary<Light> {
  return fc
    .record({
      purpose: fc.constantFrom(...LIGHT_PURPOSES),
      at: point,
      aim: fc.tuple(within(-1, 1), within(0.5, 2), within(-2, 0.5)),
      modifier: fc.constantFrom(null, OCTA, GRID),
      support: fc.constantFrom(null, STAND, BOOM),
      gel: fc.constantFrom(null, FULL_WARM, HALF_BLUE),
      unit: fc.constantFrom(unit(), lampUnit(4000)),
      power: fc.integer({ min: 0, max: 18 }).map((thirds) => 2 ** (-thirds / 3)),
      isOn: fc.boolean(),
    })
    .map(({ gel, ...input }) => light(n, { ...input, gels: gel ? [gel] : [] }))
}

/** A setup as somebody might draw it: up to five lights, two sitters, a panel, a camera a little to one side. */
export function drawnSetup(): fc.Arbitrary<WholeSetup> {
  return fc
    .record({
      lights: fc
        .integer({ min: 0, max: 5 })
        .chain((count) => fc.tuple(...Array.from({ length: count }, (_, n) => drawnLight(n + 1)))),
      cameraX: within(-1, 1),
      aim: fc.option(fc.tuple(within(-0.5, 0.5), within(0.8, 1.8), within(-1, 0.5)), { nil: null }),
      second: fc.tuple(within(0.3, 1), within(-1, 1), within(-180, 180)),
      panel: fc.tuple(point, within(-180, 180)),
      ambientLux: within(0, 400),
      walled: fc.option(fc.tuple(within(1, 5), within(1, 5)), { nil: null }),
    })
    .map(({ lights, cameraX, aim, second, panel, ambientLux, walled }) => {
      const setup = whole({
        lights: [...lights],
        props: [{ at: panel[0], turnDeg: panel[1] }],
        camera: { at: [cameraX, 1.4, 3], aim },
        ambientLux,
      })
      const beside = { id: id(802), setupId: setup.setup.id, at: [second[0], second[1]], eyeHeightM: 1.6 }
      setup.places.push(sitterPlaceSchema.parse({ ...beside, turnDeg: second[2], headTurnDeg: 10 }))
      setup.setup.walled = walled && { leftM: walled[0], rightM: walled[1], frontM: 4, ceilingM: 3 }
      return setup
    })
}
