import type { Box } from './schema.ts'

/** A print's white edge at the left, top and right, and the strip below that holds one line of caption, wall units. */
export const PRINT_EDGE = 6
export const PRINT_CAPTION = 30

/** What of a frame's box is not picture, wall units. */
export const PRINT_INSET = { w: 2 * PRINT_EDGE, h: PRINT_EDGE + PRINT_CAPTION }

/** Surface a new print's picture takes, wall units squared: upright and across look equally large. */
const PICTURE_SURFACE = 48_000

/** Width and height of a new print for a picture of this many pixels, wall units. */
export function printSize(widthPx: number, heightPx: number): { w: number; h: number } {
  const aspect = Math.min(4, Math.max(0.25, widthPx / Math.max(1, heightPx)))
  const w = Math.sqrt(PICTURE_SURFACE * aspect)
  return { w: Math.round(w + PRINT_INSET.w), h: Math.round(w / aspect + PRINT_INSET.h) }
}

/** A print's box with its picture in the picture's own proportions, width and place kept. */
export function fitPrint(box: Box, widthPx: number, heightPx: number): Box {
  const inner = Math.max(1, box[2] - PRINT_INSET.w)
  return [box[0], box[1], box[2], Math.round((inner * heightPx) / Math.max(1, widthPx) + PRINT_INSET.h)]
}
