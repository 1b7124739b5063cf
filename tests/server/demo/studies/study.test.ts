import { describe, expect, it } from 'vitest'
import { plainExposure } from '#shared/domain/lighting/test-frame/shade.ts'
import { ROUGH, stageOf } from '#shared/domain/lighting/test-frame/stage.ts'
import { STUDIES } from '#server/demo/studies/studies.ts'
import { sceneOfStudy } from '#server/demo/studies/study.ts'

describe('sceneOfStudy', () => {
  it('weighs each light so that it gives its stops where it looks', () => {
    for (const study of STUDIES) {
      const { scene, weights } = sceneOfStudy(study)
      for (const [index, emitter] of stageOf({ ...scene, figures: [], props: [] }, ROUGH).emitters.entries()) {
        const [x, y, z] = emitter.aim
        const back = emitter.axis.map((value) => -value)
        const exposure = plainExposure(emitter, x, y, z, back[0] ?? 0, back[1] ?? 0, back[2] ?? 0)
        const [r, g, b] = weights.get(emitter.id) ?? [0, 0, 0]
        const luminance = 0.2126729 * r + 0.7151522 * g + 0.072175 * b
        expect(Math.log2(exposure * luminance), study.name).toBeCloseTo(study.lights[index]?.stops ?? NaN, 2)
      }
    }
  })

  it('joins in no study a main from above, a warm glow on the wall and a narrow fill', () => {
    for (const { lights, background } of STUDIES) {
      const fromAbove = lights.some(
        (light) => Math.hypot(light.at[0] - light.aim[0], light.at[2] - light.aim[2]) < 0.5 && light.stops > -1,
      )
      const warmWall = lights.some((light) => light.aim[2] <= background.zM + 0.1 && (light.colourK ?? 5500) < 5000)
      expect(fromAbove && warmWall).toBe(false)
    }
  })
})
