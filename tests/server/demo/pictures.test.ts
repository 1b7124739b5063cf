import sharp from 'sharp'
import { describe, expect, it } from 'vitest'
import { DEMO_PICTURES, demoPicture } from '#server/demo/pictures.ts'
import { renderStudy } from '#server/demo/studies/render-study.ts'
import { STUDIES } from '#server/demo/studies/studies.ts'

/** Width at which a study is rendered again, px. */
const SMALL_PX = 120

describe('demoPicture', () => {
  it('is a file of the study’s own size, at least 960 px, one for every name', async () => {
    expect(new Set(DEMO_PICTURES).size).toBe(STUDIES.length)
    for (const study of STUDIES) {
      const { width, height } = await sharp(await demoPicture(study.name)).metadata()
      expect([width, height], study.name).toEqual(study.size)
      expect(Math.min(...study.size)).toBeGreaterThanOrEqual(960)
    }
  })

  it('is what its study gives when it is rendered again', async () => {
    for (const name of ['with-fill', 'globe']) {
      const study = STUDIES.find((candidate) => candidate.name === name)
      if (!study) throw new Error(`no study ${name}`)
      const { bytes, width, height } = renderStudy(study, 'fine', SMALL_PX)
      const kept = await sharp(await demoPicture(name))
        .resize(width, height)
        .ensureAlpha()
        .raw()
        .toBuffer()
      let sum = 0
      for (let i = 0; i < kept.length; i++) sum += Math.abs((kept[i] ?? 0) - (bytes[i] ?? 0))
      // Small structure differs with the size of a pixel; the picture does not.
      expect(sum / kept.length, name).toBeLessThan(4)
    }
  })

  it('differs from study to study', async () => {
    const means = await Promise.all(
      DEMO_PICTURES.map(async (name) =>
        (
          await sharp(await demoPicture(name))
            .resize(4, 4, { fit: 'fill' })
            .raw()
            .toBuffer()
        ).join(' '),
      ),
    )
    expect(new Set(means).size).toBe(DEMO_PICTURES.length)
  })
})
