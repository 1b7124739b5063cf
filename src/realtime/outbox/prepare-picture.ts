import { MAX_UPLOAD_BYTES, MAX_UPLOAD_PIXELS } from '#shared/api/uploads.ts'
import { fileKind } from '#shared/domain/uploads/picture-kind.ts'

export type PreparedPicture = { blob: Blob; widthPx: number; heightPx: number }

/** Why a file cannot be added, in a sentence for people. */
export class NotAPicture extends Error {
  constructor(sentence: string) {
    super(sentence)
    this.name = 'NotAPicture'
  }
}

/** Long edge that a picture too large to be kept is brought down to. */
const REDUCED_EDGE_PX = 8000
const JPEG_QUALITY = 0.92

let previous: Promise<unknown> = Promise.resolve()

/**
 * Reads a picture's size in this browser and converts what the server does not take but the browser can read (HEIC on
 * some devices, GIF, BMP; pictures that are too large). One at a time: decoded pictures are large. @throws NotAPicture
 */
export function preparePicture(file: Blob): Promise<PreparedPicture> {
  const work = previous.then(() => prepare(file))
  previous = work.catch(() => undefined)
  return work
}

async function prepare(file: Blob): Promise<PreparedPicture> {
  const head = new Uint8Array(await file.slice(0, 1024).arrayBuffer())
  const type = fileKind(head)
  let bitmap: ImageBitmap
  try {
    bitmap = await createImageBitmap(file)
  } catch {
    throw new NotAPicture(
      type.kind === 'other'
        ? type.sentence
        : 'This picture cannot be opened: it is broken, not complete, or too large for this device. Nothing was kept. Save it again where it came from and add that.',
    )
  }
  try {
    const { width, height } = bitmap
    if (type.kind === 'picture' && file.size <= MAX_UPLOAD_BYTES && width * height <= MAX_UPLOAD_PIXELS) {
      return { blob: file, widthPx: width, heightPx: height }
    }
    return await redrawn(bitmap)
  } finally {
    bitmap.close()
  }
}

async function redrawn(bitmap: ImageBitmap): Promise<PreparedPicture> {
  const scale = Math.min(1, REDUCED_EDGE_PX / Math.max(bitmap.width, bitmap.height))
  const widthPx = Math.max(1, Math.round(bitmap.width * scale))
  const heightPx = Math.max(1, Math.round(bitmap.height * scale))
  const canvas = document.createElement('canvas')
  canvas.width = widthPx
  canvas.height = heightPx
  const context = canvas.getContext('2d')
  if (context) {
    context.fillStyle = '#ffffff'
    context.fillRect(0, 0, widthPx, heightPx)
    context.drawImage(bitmap, 0, 0, widthPx, heightPx)
  }
  const blob = await new Promise<Blob | null>((resolve) => canvas.toBlob(resolve, 'image/jpeg', JPEG_QUALITY))
  if (!context || !blob || blob.size > MAX_UPLOAD_BYTES) {
    throw new NotAPicture(
      'This picture is too large to be made smaller on this device. Nothing was kept. Save it smaller and add that.',
    )
  }
  return { blob, widthPx, heightPx }
}
