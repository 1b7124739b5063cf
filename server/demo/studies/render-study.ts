import sharp from 'sharp'
import { develop } from '#shared/domain/lighting/test-frame/develop.ts'
import { type Quality, renderFrame } from '#shared/domain/lighting/test-frame/render.ts'
import { sceneOfStudy, type Study } from './study.ts'

/** A study as raw RGBA bytes at its own size, or at another width. */
export function renderStudy(study: Study, quality: Quality, widthPx: number = study.size[0]) {
  const [width, height] = [widthPx, Math.round((widthPx * study.size[1]) / study.size[0])]
  const { scene, weights } = sceneOfStudy(study)
  const bytes = develop(renderFrame(scene, quality, width, height), weights)
  return { bytes: Buffer.from(bytes.buffer), width, height }
}

/** A study as a WebP file. */
export async function studyFile(study: Study, quality: Quality, widthPx?: number): Promise<Buffer> {
  const { bytes, width, height } = renderStudy(study, quality, widthPx)
  return sharp(bytes, { raw: { width, height, channels: 4 } })
    .removeAlpha()
    .webp({ quality: 84, smartSubsample: true })
    .toBuffer()
}
