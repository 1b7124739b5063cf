import { readFile } from 'node:fs/promises'
import sharp from 'sharp'

/** A crop of one of the study pictures beside this file: left, top, width, height as fractions of the picture. */
export type Crop = { name: string; file: string; crop: readonly [number, number, number, number] }

export const DEMO_CROPS: readonly Crop[] = [
  { name: 'warm-cool', file: 's4', crop: [0, 0, 1, 1] },
  { name: 'brass-edge', file: 'white', crop: [0.5, 0.22, 0.5, 0.62] },
  { name: 'long-line', file: 'green', crop: [0, 0, 1, 1] },
  { name: 'dusk-distance', file: 'wide', crop: [0, 0, 1, 1] },
  { name: 'undyed-brass', file: 'white', crop: [0, 0, 1, 1] },
  { name: 'collar-high', file: 'blue', crop: [0.05, 0.1, 0.8, 0.85] },
  { name: 'eyepiece', file: 'blue', crop: [0, 0, 1, 1] },
  { name: 'ochre-slate', file: 'ochre', crop: [0, 0, 1, 1] },
  { name: 'ochre-head', file: 'ochre', crop: [0.22, 0.15, 0.58, 0.7] },
  { name: 'undyed', file: 'white', crop: [0.12, 0.05, 0.5, 0.95] },
  { name: 'green-bust', file: 'green', crop: [0.2, 0.22, 0.6, 0.42] },
  { name: 'cold-light', file: 's2', crop: [0, 0, 1, 1] },
  { name: 'one-light', file: 's1', crop: [0, 0, 1, 1] },
  { name: 'with-fill', file: 's3', crop: [0, 0, 1, 1] },
  { name: 'two-heads', file: 's4', crop: [0.12, 0.2, 0.88, 0.62] },
  { name: 'globe', file: 'blue', crop: [0.48, 0.45, 0.52, 0.52] },
  { name: 'hem', file: 'green', crop: [0.12, 0.6, 0.76, 0.4] },
  { name: 'knit', file: 'ochre', crop: [0.18, 0.6, 0.64, 0.4] },
  { name: 'room-tone', file: 'wide', crop: [0.05, 0.1, 0.62, 0.85] },
  { name: 'cool-shoulder', file: 's2', crop: [0.1, 0.42, 0.9, 0.56] },
]

/** The crop as a file somebody might have uploaded, three times enlarged. */
export async function demoPicture({ file, crop }: Crop): Promise<Buffer> {
  const source = sharp(await readFile(new URL(`./pictures/${file}.webp`, import.meta.url)))
  const { width, height } = await source.metadata()
  const [left, top, w, h] = crop
  const region = {
    left: Math.round(left * width),
    top: Math.round(top * height),
    width: Math.max(1, Math.min(Math.round(w * width), width - Math.round(left * width))),
    height: Math.max(1, Math.min(Math.round(h * height), height - Math.round(top * height))),
  }
  return source
    .extract(region)
    .resize({ width: region.width * 3, kernel: 'lanczos3' })
    .webp({ quality: 86 })
    .toBuffer()
}
