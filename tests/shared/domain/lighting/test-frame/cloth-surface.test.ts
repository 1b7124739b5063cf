import { describe, expect, it } from 'vitest'
import { GARMENT_CUTS } from '#shared/domain/lighting/schema.ts'
import { clothSpot } from '#shared/domain/lighting/test-frame/cloth-surface.ts'
import { emptySpot } from '#shared/domain/lighting/test-frame/spot.ts'
import { ROUGH, stageOf } from '#shared/domain/lighting/test-frame/stage.ts'
import { figure, scene } from '#tests/support/frame-sample.ts'

describe('clothSpot', () => {
  it('has the garment’s colour in the mean, with a weave that is gone when it is too small to be seen', () => {
    for (const cut of GARMENT_CUTS) {
      const person = figure({ cut, garment: [0.3, 0.3, 0.3] })
      const [, body] = stageOf(scene({ figures: [person] }), ROUGH).solids
      if (!body) throw new Error('no body')
      const mean = (blurM: number) => {
        let sum = 0
        for (let i = 0; i < 400; i++) {
          const spot = emptySpot()
          clothSpot(spot, person, body, ((i % 20) - 10) * 0.0013, -0.4 - Math.floor(i / 20) * 0.0017, 0.12, blurM)
          sum += spot.g / 400
        }
        return sum
      }
      expect(Math.abs(mean(0.0005) / mean(0.05) - 1), cut).toBeLessThan(0.2)
      expect(Math.abs(mean(0.05) / 0.3 - 1), cut).toBeLessThan(0.25)
    }
  })
})
