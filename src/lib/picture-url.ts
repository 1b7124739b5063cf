import { RENDITIONS, type RenditionPx } from '#shared/api/uploads.ts'

/** Address of a picture at a long edge of 320, 960 or 2048 px; the same for ever, so the browser keeps it. */
export function pictureUrl(uploadId: string, longEdgePx: RenditionPx): string {
  return `/api/uploads/${uploadId}/${longEdgePx}`
}

/** Every size of a picture for `srcset`, each with its width; without its size in pixels every picture counts as square. */
export function pictureSrcSet(uploadId: string, size?: { widthPx: number; heightPx: number }): string {
  const share = size ? Math.min(1, size.widthPx / size.heightPx) : 1
  return RENDITIONS.map((edge) => `${pictureUrl(uploadId, edge)} ${Math.max(1, Math.round(edge * share))}w`).join(', ')
}
