import { readFileSync } from 'node:fs'
import { join } from 'node:path'

/** A picture as a phone would hand it over. */
export type PictureFile = { name: string; mimeType: string; buffer: Buffer }

/** One of the study pictures; each name is another one. */
export function picture(name: string): PictureFile {
  const file =
    ['one-light', 'with-fill', 'cold-light', 'globe'][
      [...name].reduce((sum, letter) => sum + letter.charCodeAt(0), 0) % 4
    ] ?? 'globe'
  const buffer = readFileSync(join(import.meta.dirname, `../../../server/demo/pictures/${file}.webp`))
  return { name, mimeType: 'image/webp', buffer }
}
