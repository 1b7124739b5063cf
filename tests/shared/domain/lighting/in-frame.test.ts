import { describe, expect, it } from 'vitest'
import { frameCautions, sightsOf } from '#shared/domain/lighting/in-frame.ts'
import { BOOM, GRID, OCTA, STAND, light, whole } from '#tests/support/lighting-sample.ts'

const rim = (x: number) => light(2, { purpose: 'rim', at: [x, 1.9, -1], aim: [0, 1.5, 0], modifier: GRID })

describe('sightsOf', () => {
  it('has each light once, nearest to the picture first', () => {
    const setup = whole({ lights: [rim(3), light(1, { purpose: 'main', at: [-1.2, 1.9, 1], aim: [0, 1.5, 0] })] })
    const sights = sightsOf(setup, ['upright', 'across'])
    expect(sights).toHaveLength(2)
    expect(sights[0]?.clearance.marginM).toBeLessThanOrEqual(sights[1]?.clearance.marginM ?? 0)
  })
  it('does not see what stands behind the background', () => {
    expect(
      sightsOf(whole({ lights: [light(2, { purpose: 'background', at: [0, 1, -3], aim: [0, 1, 0] })] }), ['across']),
    ).toEqual([])
  })
})

describe('frameCautions', () => {
  it('is red for a head in the picture, naming it and the edge', () => {
    const [caution] = frameCautions(whole({ lights: [rim(0.5)] }), ['across'])
    expect(caution).toMatchObject({ tone: 'red', lightId: rim(0.5).id })
    expect(caution?.title).toMatch(/^The rim(’s stand)? is in the picture$/)
  })
  it('is fine and says how far the nearest clears otherwise', () => {
    const [caution] = frameCautions(whole({ lights: [rim(1.8)] }), ['across'])
    expect(caution).toMatchObject({ tone: 'fine', title: 'Out of frame' })
    expect(caution?.words).toMatch(/clears the right edge by \d\.\d m at 85 mm\.$/)
  })
  it('sees a panel in the picture', () => {
    const [caution] = frameCautions(whole({ props: [{ at: [0.4, 1, 0] }] }), ['across'])
    expect(caution?.title).toBe('The white panel is in the picture')
  })
  it('says nothing of an empty setup', () => {
    expect(frameCautions(whole({}), ['upright'])).toEqual([])
  })
})

describe('a boom', () => {
  const boom = (at: [number, number, number], more: object = {}) =>
    light(1, {
      purpose: 'main',
      at,
      aim: [0, 1.5, 0],
      modifier: OCTA,
      support: { ...BOOM, numbers: { ...BOOM.numbers, ...more } },
    })
  it('keeps its arm and stand out on the side that clears best', () => {
    // The head is high over the picture; a plain stand under it would be in the middle.
    const over: [number, number, number] = [0, 3.2, 0.4]
    expect(sightsOf(whole({ lights: [boom(over)] }), ['upright'])[0]?.clearance.marginM).toBeGreaterThan(0)
    const onStand = light(1, { purpose: 'main', at: over, aim: [0, 1.5, 0], modifier: OCTA, support: STAND })
    expect(sightsOf(whole({ lights: [onStand] }), ['upright'])[0]?.clearance.marginM).toBeLessThan(0)
  })
  it('is in the picture when its arm is too short to keep the stand out', () => {
    const short = {
      reachM: { value: 0.3, from: 'assumed', source: '' },
      counterReachM: { value: 0.3, from: 'assumed', source: '' },
    }
    const [sight] = sightsOf(whole({ lights: [boom([0, 3.2, 0.4], short)] }), ['across'])
    expect(sight?.name).toBe('main’s boom')
    expect(sight?.clearance.marginM).toBeLessThan(0)
  })
})

describe('a camera with an aim', () => {
  it('decides what is in frame', () => {
    const lights = [rim(1.3)]
    const margin = (aim: [number, number, number] | null) =>
      sightsOf(whole({ lights, camera: { aim } }), ['across'])[0]?.clearance.marginM ?? NaN
    expect(margin(null)).toBeGreaterThan(0)
    expect(margin([0.8, 1.5, 0])).toBeLessThan(0)
  })
})
