import { describe, expect, it } from 'vitest'
import { frameCautions, sightsOf } from '#shared/domain/lighting/in-frame.ts'
import { GRID, light, whole } from '#tests/support/lighting-sample.ts'

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
