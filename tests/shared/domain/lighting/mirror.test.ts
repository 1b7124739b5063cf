import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { sightsOf } from '#shared/domain/lighting/in-frame.ts'
import { mirrored } from '#shared/domain/lighting/mirror.ts'
import { readSetup } from '#shared/domain/lighting/readings.ts'
import { wallMap } from '#shared/domain/lighting/wall.ts'
import { drawnSetup } from '#tests/support/drawn-setup.ts'
import { light, whole } from '#tests/support/lighting-sample.ts'

describe('mirrored', () => {
  it('exchanges left and right of everything that has a side', () => {
    const setup = whole({
      lights: [light(1, { purpose: 'main', at: [-1.2, 2, 1], aim: [0.1, 1.5, 0] })],
      props: [{ at: [1, 1, 0.5], turnDeg: -60 }],
      camera: { at: [0.4, 1.5, 3], aim: [0.1, 1.4, 0] },
    })
    setup.setup.walled = { leftM: 2, rightM: 3, frontM: 5, ceilingM: 3 }
    const other = mirrored(setup)
    expect(other.setup.camera).toMatchObject({ at: [-0.4, 1.5, 3], aim: [-0.1, 1.4, 0] })
    expect(other.setup.walled).toMatchObject({ leftM: 3, rightM: 2 })
    expect(other.lights[0]).toMatchObject({ at: [1.2, 2, 1], aim: [-0.1, 1.5, 0] })
    expect(other.props[0]).toMatchObject({ at: [-1, 1, 0.5], turnDeg: 60 })
    expect(other.places[0]?.at).toEqual([0, 0])
  })

  it('is as it was when mirrored twice, without a minus zero', () => {
    fc.assert(
      fc.property(drawnSetup(), (setup) => {
        const once = mirrored(setup)
        expect(mirrored(once)).toEqual(setup)
        expect(JSON.stringify(mirrored(once))).toBe(JSON.stringify(setup))
        expect(isMinusZero(once)).toBe(false)
      }),
      { numRuns: 100 },
    )
  })

  it('reads the same', () => {
    fc.assert(
      fc.property(drawnSetup(), (setup) => {
        const [a, b] = [readSetup(setup, { frames: 30 }), readSetup(mirrored(setup), { frames: 30 })]
        // The climb to the peak tries the right first, so its exact place is compared with some slack below.
        const plain = ({ glow: _glow, face: _face, wall, framing, ...rest }: typeof a) => ({
          ...rest,
          wall: { ...wall, point: wall.point.slice(1) },
          framing: framing.map(({ sitters: _sitters, ...frame }) => frame),
        })
        close(plain(a), plain(b))
        a.framing[0]?.sitters.forEach((sitter, index) => {
          const other = b.framing[0]?.sitters[index]
          close([sitter.leftM, sitter.rightM], [other?.rightM, other?.leftM])
        })
        if (a.glow && b.glow) expect(Math.abs(Math.log2(a.glow.fNumber / b.glow.fNumber))).toBeLessThan(0.02)
        else expect(a.glow).toEqual(b.glow)
      }),
      { numRuns: 60 },
    )
  })

  it('shows the wall the other way round, and keeps as far from the picture', () => {
    fc.assert(
      fc.property(drawnSetup(), (setup) => {
        const options = { columns: 9, rows: 7 }
        const [a, b] = [wallMap(setup, options), wallMap(mirrored(setup), options)]
        close(
          a?.underMainStops,
          b?.underMainStops.map((row) => [...row].reverse()),
        )
        const margins = (of: typeof setup) =>
          sightsOf(of, ['upright', 'across']).map((sight) => sight.clearance.marginM)
        close(margins(setup), margins(mirrored(setup)))
      }),
      { numRuns: 60 },
    )
  })
})

function isMinusZero(value: unknown): boolean {
  if (typeof value === 'number') return Object.is(value, -0)
  return value !== null && typeof value === 'object' && Object.values(value).some(isMinusZero)
}

/** Equal, numbers to nine digits. */
function close(a: unknown, b: unknown): void {
  if (typeof a === 'number' && typeof b === 'number') {
    if (a !== b) expect(Math.abs(a - b)).toBeLessThanOrEqual(1e-9 * Math.max(1, Math.abs(a)))
  } else if (a !== null && typeof a === 'object' && b !== null && typeof b === 'object') {
    expect(Object.keys(a)).toEqual(Object.keys(b))
    const others = new Map(Object.entries(b))
    for (const [key, value] of Object.entries(a)) close(value, others.get(key))
  } else expect(a).toEqual(b)
}
