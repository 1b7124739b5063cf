import { FRAME_LONG_MM, FRAME_SHORT_MM, angleOfViewDeg } from './lens.ts'

/**
 * Profiles of a beam: intensity off axis against intensity on axis. The beam angle is the full angle between the
 * half-intensity directions.
 */

/** Exponent of cosⁿ whose half intensity lies at half the beam angle: ln 0.5 / ln cos(beam/2). Beam in (0, 180). */
export function cosineExponent(beamDeg: number): number {
  return Math.log(0.5) / Math.log(Math.cos((beamDeg * Math.PI) / 360))
}

/** Gaussian profile, for beams up to 90°: 2^−(2θ/beam)². */
export function gaussianProfile(offAxisDeg: number, beamDeg: number): number {
  return 2 ** -(((2 * offAxisDeg) / beamDeg) ** 2)
}

/** cosⁿ profile; 0 from 90° off axis. */
export function cosineProfile(offAxisDeg: number, beamDeg: number): number {
  if (offAxisDeg >= 90) return 0
  return Math.cos((offAxisDeg * Math.PI) / 180) ** cosineExponent(beamDeg)
}

/** Share of the width of the covered angle over which a bare zoom head fades (assumption). */
const SOFT_EDGE = 0.35

/**
 * A bare zoom head: even over what an N mm lens sees (its mean angle, since the head's roll is not known), then fading
 * (assumption).
 */
export function zoomHeadProfile(offAxisDeg: number, zoomMm: number): number {
  const across = angleOfViewDeg(FRAME_LONG_MM, zoomMm)
  const upright = angleOfViewDeg(FRAME_SHORT_MM, zoomMm)
  const half = (across + upright) / 4
  const fade = Math.max(3, half * SOFT_EDGE * 2)
  const beyond = (offAxisDeg - half + fade / 2) / fade
  if (beyond <= 0) return 1
  if (beyond >= 1) return 0
  return 1 - beyond * beyond * (3 - 2 * beyond)
}

export type BeamKind = 'gaussian' | 'cosine' | 'zoom head' | 'unknown'

/**
 * Share of the intensity on axis that a head gives off axis: from the modifier's beam angle, else from a bare head's
 * zoom, else 1 (unknown; nothing is taken off).
 */
export function relativeIntensity(
  offAxisDeg: number,
  head: { beamDeg: number | null; zoomMm: number | null; bare: boolean },
): { share: number; kind: BeamKind } {
  if (head.beamDeg !== null && head.beamDeg > 0 && head.beamDeg < 180) {
    return head.beamDeg <= 90
      ? { share: gaussianProfile(offAxisDeg, head.beamDeg), kind: 'gaussian' }
      : { share: cosineProfile(offAxisDeg, head.beamDeg), kind: 'cosine' }
  }
  if (head.bare && head.zoomMm !== null) return { share: zoomHeadProfile(offAxisDeg, head.zoomMm), kind: 'zoom head' }
  return { share: offAxisDeg < 90 || !head.bare ? 1 : 0, kind: 'unknown' }
}
