import sharp from 'sharp'
import { fileKind } from '#shared/domain/uploads/picture-kind.ts'
import { AppError } from '#server/errors.ts'
import type { SheetFrame } from './recipe-sheet.tsx'

/** A test frame is at most 960 × 1200; four times as much is let through. */
const MOST_PIXELS = 5_000_000
/** Printed 118 points high at 300 dots an inch, this is enough. */
const EDGE_PX = 800

/** Pictures as the sheet prints them: decoded, turned upright, made small, on white. @throws BAD_REQUEST, UNSUPPORTED naming the one that cannot be read */
export async function readFrames(pictures: readonly { caption: string; bytes: Uint8Array }[]): Promise<SheetFrame[]> {
  const frames: SheetFrame[] = []
  for (const [index, { caption, bytes }] of pictures.entries()) {
    const kind = fileKind(bytes)
    if (kind.kind === 'other' || kind.mime === 'image/avif')
      throw new AppError(
        'UNSUPPORTED',
        `Picture ${index + 1} of the sheet is no JPEG, PNG or WebP. No sheet was made; leave it out and try again.`,
      )
    try {
      const { data, info } = await sharp(bytes, { limitInputPixels: MOST_PIXELS })
        .autoOrient()
        .resize(EDGE_PX, EDGE_PX, { fit: 'inside', withoutEnlargement: true })
        .flatten({ background: '#ffffff' })
        .jpeg({ quality: 88 })
        .toBuffer({ resolveWithObject: true })
      frames.push({ caption, jpeg: data, widthPx: info.width, heightPx: info.height })
    } catch (error) {
      throw new AppError(
        'BAD_REQUEST',
        `Picture ${index + 1} of the sheet cannot be read, or is larger than ${MOST_PIXELS / 1e6} million pixels. No sheet was made; leave it out and try again.`,
        { cause: error },
      )
    }
  }
  return frames
}
