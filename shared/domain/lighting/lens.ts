/** The camera's frame is 36 × 24 mm throughout. */
export const FRAME_LONG_MM = 36
export const FRAME_SHORT_MM = 24
/** Circle of confusion for 36 × 24 mm: diagonal/1442, the common 0.030 mm. */
export const CIRCLE_MM = 0.03

/** Angle of view over one side of the frame, degrees: 2·atan(d/2f). */
export function angleOfViewDeg(sideMm: number, focalMm: number): number {
  return (2 * Math.atan(sideMm / (2 * focalMm)) * 180) / Math.PI
}

/** Distance from the lens at which `subjectM` just fills a side of the frame, metres: f·(1 + S/h). */
export function framingDistanceM(focalMm: number, sideMm: number, subjectM: number): number {
  return (focalMm / 1000) * (1 + (subjectM * 1000) / sideMm)
}

/** What a side of the frame covers at a distance from the lens, metres (far formula: d·h/f). */
export function fieldM(focalMm: number, sideMm: number, distanceM: number): number {
  return (distanceM * sideMm) / focalMm
}

export type Depth = { hyperfocalM: number; nearM: number; /** null: to infinity. */ farM: number | null }

/**
 * Depth of field: H = f²/(N·c) + f, near = s(H − f)/(H + s − 2f), far = s(H − f)/(H − s), infinite from s ≥ H.
 * Focus distance in metres, focal length and circle of confusion in mm.
 */
export function depthOfField(focalMm: number, fNumber: number, focusM: number, circleMm = CIRCLE_MM): Depth {
  const f = focalMm / 1000
  const hyperfocalM = (focalMm * focalMm) / (fNumber * circleMm) / 1000 + f
  const nearM = (focusM * (hyperfocalM - f)) / (hyperfocalM + focusM - 2 * f)
  const farM = focusM >= hyperfocalM ? null : (focusM * (hyperfocalM - f)) / (hyperfocalM - focusM)
  return { hyperfocalM, nearM, farM }
}
