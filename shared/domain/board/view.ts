import type { Box } from './schema.ts'
import type { Point } from './geometry.ts'

/** What of the wall is seen: the wall point at the screen's top left, and screen pixels per wall unit. */
export type View = { x: number; y: number; zoom: number }

/** Size of the part of the screen that shows the wall, CSS pixels. */
export type Viewport = { widthPx: number; heightPx: number }

export const MIN_ZOOM = 0.05
export const MAX_ZOOM = 4

/** A zoom inside what the wall allows. */
export function clampZoom(zoom: number): number {
  return Math.min(MAX_ZOOM, Math.max(MIN_ZOOM, Number.isFinite(zoom) ? zoom : 1))
}

/** Screen point (CSS pixels from the wall's top left corner on screen) to wall point. */
export function toWall(view: View, px: Point): Point {
  return { x: view.x + px.x / view.zoom, y: view.y + px.y / view.zoom }
}

/** Wall point to screen point, CSS pixels. */
export function toScreen(view: View, point: Point): Point {
  return { x: (point.x - view.x) * view.zoom, y: (point.y - view.y) * view.zoom }
}

/** The view after the wall was pushed by (dx, dy) screen pixels: positive dx moves what hangs there to the right. */
export function panBy(view: View, dxPx: number, dyPx: number): View {
  return { ...view, x: view.x - dxPx / view.zoom, y: view.y - dyPx / view.zoom }
}

/** The view zoomed by a factor so that the wall point under `px` stays under it. */
export function zoomAt(view: View, px: Point, factor: number): View {
  const zoom = clampZoom(view.zoom * factor)
  const fixed = toWall(view, px)
  return { x: fixed.x - px.x / zoom, y: fixed.y - px.y / zoom, zoom }
}

/**
 * The view while two fingers hold the wall: the wall points that were under the fingers at the start stay under them
 * (their middle exactly, their distance as zoom).
 */
export function pinch(start: View, from: readonly [Point, Point], to: readonly [Point, Point]): View {
  const distance = ([a, b]: readonly [Point, Point]) => Math.hypot(a.x - b.x, a.y - b.y)
  const middle = ([a, b]: readonly [Point, Point]) => ({ x: (a.x + b.x) / 2, y: (a.y + b.y) / 2 })
  const zoom = clampZoom(start.zoom * (distance(to) / Math.max(1, distance(from))))
  const held = toWall(start, middle(from))
  const now = middle(to)
  return { x: held.x - now.x / zoom, y: held.y - now.y / zoom, zoom }
}

/** Factor of one wheel notch or trackpad step: `deltaPx` down (positive) zooms out. */
export function wheelFactor(deltaPx: number): number {
  return Math.exp(-Math.min(120, Math.max(-120, deltaPx)) * 0.0035)
}

/** What of the wall is on the screen. */
export function visibleBox(view: View, viewport: Viewport): Box {
  return [view.x, view.y, viewport.widthPx / view.zoom, viewport.heightPx / view.zoom]
}

/** A view that shows all of a box with a margin, never larger than life (or `maxZoom`), the box in the middle. */
export function fitBox(box: Box, viewport: Viewport, marginPx: number, maxZoom = 1): View {
  const room = (px: number) => Math.max(1, px - 2 * marginPx)
  const zoom = clampZoom(
    Math.min(maxZoom, room(viewport.widthPx) / Math.max(1, box[2]), room(viewport.heightPx) / Math.max(1, box[3])),
  )
  return {
    x: box[0] + box[2] / 2 - viewport.widthPx / zoom / 2,
    y: box[1] + box[3] / 2 - viewport.heightPx / zoom / 2,
    zoom,
  }
}

/** The nearest view at the same zoom in which a box is on the screen with a margin; the same view when it already is. */
export function reveal(view: View, box: Box, viewport: Viewport, marginPx: number): View {
  const margin = marginPx / view.zoom
  const along = (from: number, seen: number, at: number, size: number) => {
    if (size + 2 * margin > seen) return at - margin
    if (at - margin < from) return at - margin
    if (at + size + margin > from + seen) return at + size + margin - seen
    return from
  }
  const x = along(view.x, viewport.widthPx / view.zoom, box[0], box[2])
  const y = along(view.y, viewport.heightPx / view.zoom, box[1], box[3])
  return x === view.x && y === view.y ? view : { ...view, x, y }
}
