const DEG_PER_RAD = 180 / Math.PI

/**
 * Above this elevation of the main the pupils fall into the shadow of the brow: a ledge model with a brow 15 mm
 * before the pupil and 12 mm above it. A rule of thumb: the face measures are assumed, no published angle was found.
 */
export const SOCKET_LIMIT_DEG = socketLimitDeg(12, 15)

/** Elevation at which a ledge throws its shadow onto the pupil, degrees: atan(brow to pupil / overhang), both in mm. */
export function socketLimitDeg(browToPupilMm: number, overhangMm: number): number {
  return Math.atan(browToPupilMm / overhangMm) * DEG_PER_RAD
}

/** Angle a source of this size covers as seen from the skin, degrees: 2·atan(D/2d). */
export function apparentSizeDeg(sizeM: number, distanceM: number): number {
  return 2 * Math.atan(sizeM / (2 * distanceM)) * DEG_PER_RAD
}

/** Width of the soft edge of a shadow, metres: D·b/a with a from source to edge and b from edge to skin. */
export function penumbraM(sizeM: number, sourceToEdgeM: number, edgeToSkinM: number): number {
  return (sizeM * edgeToSkinM) / sourceToEdgeM
}

/** Height of a light above the eye line, degrees: atan(rise/horizontal distance). Negative from below. */
export function elevationDeg(heightAboveEyesM: number, horizontalM: number): number {
  return Math.atan2(heightAboveEyesM, horizontalM) * DEG_PER_RAD
}
