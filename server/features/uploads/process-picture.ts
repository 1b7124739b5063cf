import sharp, { type Sharp } from 'sharp'
import { MAX_UPLOAD_PIXELS, RENDITIONS, type RenditionPx } from '#shared/api/uploads.ts'
import { paletteOf } from '#shared/domain/uploads/palette.ts'
import { HASH_INPUT, perceptualHash } from '#shared/domain/uploads/perceptual-hash.ts'
import { fileKind } from '#shared/domain/uploads/picture-kind.ts'
import { AppError } from '#server/errors.ts'
import { type KeptExif, readExif } from './read-exif.ts'
import { queueOf } from './queue.ts'

// One thread a picture and no cache of decoded ones: memory stays bounded by the queue below.
sharp.concurrency(1)
sharp.cache(false)
const queue = queueOf(3)

const PALETTE_EDGE_PX = 128
const PALETTE_COLOURS = 5

export type ProcessedPicture = {
  mime: string
  widthPx: number
  heightPx: number
  palette: string[]
  exposure: string
  exif: KeptExif
  perceptualHash: string
  renditions: { longEdgePx: RenditionPx; bytes: Uint8Array }[]
}

/** Decodes a picture and makes all that is kept beside it; at most three at once. @throws AppError with a sentence for people. */
export async function processPicture(bytes: Uint8Array): Promise<ProcessedPicture> {
  const type = fileKind(bytes)
  if (type.kind === 'other') throw new AppError('UNSUPPORTED', type.sentence)
  return queue(async () => {
    const size = await sizeOf(bytes)
    const { exif, exposure } = await readExif(bytes)
    const largest = await decode(bytes)
    const picture = () => sharp(largest.data, { raw: largest.info })
    const grey = await picture()
      .flatten({ background: '#808080' })
      .greyscale()
      .resize(HASH_INPUT.widthPx, HASH_INPUT.heightPx, { fit: 'fill' })
      .extractChannel(0)
      .raw()
      .toBuffer()
    const renditions: ProcessedPicture['renditions'] = []
    for (const longEdgePx of RENDITIONS) {
      renditions.push({ longEdgePx, bytes: await inside(picture(), longEdgePx).webp({ quality: 82 }).toBuffer() })
    }
    return {
      mime: type.mime,
      ...size,
      palette: paletteOf(await smallRgb(picture()), PALETTE_COLOURS),
      exposure,
      exif,
      perceptualHash: perceptualHash(grey),
      renditions,
    }
  })
}

/** Size as people see it (turned upright), from the header alone, refused before anything is decoded. */
async function sizeOf(bytes: Uint8Array): Promise<{ widthPx: number; heightPx: number }> {
  const header = await sharp(bytes, { limitInputPixels: false })
    .metadata()
    .catch((error: unknown) => {
      throw broken(error)
    })
  const { width, height } = header.autoOrient
  if (width * height > MAX_UPLOAD_PIXELS) {
    const count = (value: number) => value.toLocaleString('en-GB')
    throw new AppError(
      'TOO_LARGE',
      `This picture is ${count(width)} × ${count(height)} pixels; up to ${count(MAX_UPLOAD_PIXELS / 1e6)} million in all can be kept. Nothing was kept. Save it smaller and add that.`,
    )
  }
  return { widthPx: width, heightPx: height }
}

type Decoded = { data: Buffer; info: { width: number; height: number; channels: 1 | 2 | 3 | 4 } }

/** Decoded once, upright, in sRGB, at the size of the largest rendition. */
async function decode(bytes: Uint8Array): Promise<Decoded> {
  const longest = Math.max(...RENDITIONS)
  try {
    const { data, info } = await inside(
      sharp(bytes, { limitInputPixels: MAX_UPLOAD_PIXELS, failOn: 'error' }).autoOrient(),
      longest,
    )
      .toColourspace('srgb')
      .raw()
      .toBuffer({ resolveWithObject: true })
    return { data, info: { width: info.width, height: info.height, channels: info.channels } }
  } catch (error) {
    throw broken(error)
  }
}

function inside(picture: Sharp, longEdgePx: number): Sharp {
  return picture.resize(longEdgePx, longEdgePx, { fit: 'inside', withoutEnlargement: true })
}

/** Picked pixels, not averaged ones: averages along edges are colours that the picture has not. */
async function smallRgb(picture: Sharp): Promise<Uint8Array> {
  return picture
    .flatten({ background: '#ffffff' })
    .resize(PALETTE_EDGE_PX, PALETTE_EDGE_PX, { fit: 'inside', withoutEnlargement: true, kernel: 'nearest' })
    .toColourspace('srgb')
    .raw()
    .toBuffer()
}

function broken(cause: unknown): AppError {
  return new AppError(
    'UNSUPPORTED',
    'This picture is broken or not complete. Nothing was kept. Open it where it came from, save it again and add that.',
    { cause },
  )
}
