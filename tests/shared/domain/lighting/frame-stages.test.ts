import { describe, expect, it } from 'vitest'
import { frameStages, inBuildOrder } from '#shared/domain/lighting/frame-stages.ts'
import { readSetup } from '#shared/domain/lighting/readings.ts'
import { GRID, OCTA, light, whole } from '#tests/support/lighting-sample.ts'

const FACE: [number, number, number] = [0, 1.5, 0]

const lights = [
  light(1, { purpose: 'rim', at: [1.6, 1.5, -1.2], aim: FACE, modifier: GRID, isOn: false }),
  light(2, { purpose: 'fill', at: [0, 1.5, 4], aim: FACE }),
  light(3, { purpose: 'main', at: [0, 1.5, 2], aim: FACE, modifier: OCTA }),
  light(4, { purpose: 'background', at: [0, 1.5, -1], aim: [0, 1.5, -2] }),
  light(5, { purpose: 'main', at: [0, 1.5, 2], aim: FACE, modifier: OCTA }),
]

describe('inBuildOrder', () => {
  it('is mains, background, fill, edges; equal ones as they were', () => {
    expect(inBuildOrder(lights)).toEqual([lights[2], lights[4], lights[3], lights[1], lights[0]])
  })
})

describe('frameStages', () => {
  const setup = whole({ lights })
  const stages = frameStages(setup, readSetup(setup))

  it('names each step as it is built', () => {
    expect(stages.map((stage) => stage.caption)).toEqual(['Main', '+ main', '+ background', '+ fill', '+ rim'])
  })

  // Guide number 40 at a quarter is 20: f/10 at 2 m, and two mains are a stop over one of them. The fill is at f/5 from
  // 4 m, two stops under one main and three under both. The background light meets the wall at 1 m: f/20, one over both.
  it('says f-number, stops against the mains, and what is off', () => {
    expect(stages.map((stage) => stage.reading)).toEqual(['f/10', '−1', 'wall +1', '−3', 'off'])
  })

  it('is f-numbers where there is no main to compare with, and nothing without lights', () => {
    const alone = whole({ lights: [light(2, { purpose: 'fill', at: [0, 1.5, 4], aim: FACE })] })
    expect(frameStages(alone, readSetup(alone))).toMatchObject([{ caption: 'Fill', reading: 'f/5' }])
    expect(frameStages(whole({}), readSetup(whole({})))).toEqual([])
  })
})
