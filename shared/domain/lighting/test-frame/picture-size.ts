import { type Orientation, frameSidesMm } from '../frame.ts'

export type PictureSize = { width: number; height: number }

/** As many pixels as 240 × 300, 48 × 60 and 960 × 1200 have. */
export const STRIP_PIXELS = 240 * 300
export const ROUGH_PIXELS = 48 * 60
export const LARGE_PIXELS = 960 * 1200

/** Size in pixels of a picture of about so many in the shape of the camera's frame: its pixels are square. */
export function pictureSize(orientation: Orientation, pixels: number): PictureSize {
  const { widthMm, heightMm } = frameSidesMm(orientation)
  const perMm = Math.sqrt(pixels / (widthMm * heightMm))
  return { width: Math.round(widthMm * perMm), height: Math.round(heightMm * perMm) }
}
