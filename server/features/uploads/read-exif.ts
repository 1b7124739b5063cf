import exifr from 'exifr'
import { exposureLine } from '#shared/domain/uploads/exposure.ts'

/** What is kept of a camera's notes. Position, serial numbers and owners' names are not even read. */
export type KeptExif = {
  make?: string
  model?: string
  lens?: string
  /** As the camera wrote it, `2026:05:04 10:11:12`: wall time without a zone. */
  takenAt?: string
  fNumber?: number
  exposureTimeS?: number
  focalLengthMm?: number
  iso?: number
}

const PICK = ['Make', 'Model', 'LensModel', 'DateTimeOriginal', 'FNumber', 'ExposureTime', 'FocalLength', 'ISO']

/** Exposure, camera and time of a picture; broken notes are no reason to refuse it. */
export async function readExif(bytes: Uint8Array): Promise<{ exif: KeptExif; exposure: string }> {
  let raw: unknown
  try {
    raw = await exifr.parse(Buffer.from(bytes), { pick: PICK, gps: false, reviveValues: false, translateValues: false })
  } catch {
    raw = undefined
  }
  const text = (tag: string): string | undefined => {
    const value = field(raw, tag)
    if (typeof value !== 'string') return undefined
    const clean = value
      .replace(/\p{Cc}/gu, '')
      .trim()
      .slice(0, 80)
    return clean === '' ? undefined : clean
  }
  const number = (tag: string): number | undefined => {
    const value = field(raw, tag)
    return typeof value === 'number' && Number.isFinite(value) && value > 0 ? value : undefined
  }
  const exif = withoutUndefined({
    make: text('Make'),
    model: text('Model'),
    lens: text('LensModel'),
    takenAt: text('DateTimeOriginal'),
    fNumber: number('FNumber'),
    exposureTimeS: number('ExposureTime'),
    focalLengthMm: number('FocalLength'),
    iso: number('ISO'),
  })
  const exposure = exposureLine({
    fNumber: exif.fNumber ?? null,
    exposureTimeS: exif.exposureTimeS ?? null,
    focalLengthMm: exif.focalLengthMm ?? null,
    iso: exif.iso ?? null,
  })
  return { exif, exposure }
}

function field(value: unknown, key: string): unknown {
  return typeof value === 'object' && value !== null ? Reflect.get(value, key) : undefined
}

/** `Object.fromEntries` forgets which keys there are; leaving some out makes every one optional and none undefined. */
function withoutUndefined<T extends Record<string, unknown>>(value: T): { [K in keyof T]?: Exclude<T[K], undefined> } {
  return Object.fromEntries(Object.entries(value).filter(([, entry]) => entry !== undefined)) as {
    [K in keyof T]?: Exclude<T[K], undefined>
  }
}
