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

/** cosⁿ; 0 from 90° off axis. */
export function cosinePower(offAxisDeg: number, exponent: number): number {
  return offAxisDeg >= 90 ? 0 : Math.cos((offAxisDeg * Math.PI) / 180) ** exponent
}

/** Share of the width of the covered angle over which a bare zoom head fades (assumption). */
const SOFT_EDGE = 0.35

/**
 * A bare zoom head: even over what an N mm lens sees (its mean angle, since the head's roll is not known), then fading
 * (assumption).
 */
function zoomProfile(zoomMm: number): (offAxisDeg: number) => number {
  const across = angleOfViewDeg(FRAME_LONG_MM, zoomMm)
  const upright = angleOfViewDeg(FRAME_SHORT_MM, zoomMm)
  const half = (across + upright) / 4
  const fade = Math.max(3, half * SOFT_EDGE * 2)
  return (offAxisDeg) => {
    const beyond = (offAxisDeg - half + fade / 2) / fade
    if (beyond <= 0) return 1
    if (beyond >= 1) return 0
    return 1 - beyond * beyond * (3 - 2 * beyond)
  }
}

export type BeamKind = 'gaussian' | 'cosine' | 'zoom head' | 'unknown'

/** What is known of a head's beam. */
export type Beam = { beamDeg: number | null; zoomMm: number | null; bare: boolean }

/** Share of the intensity on axis by the angle off axis in degrees. */
export type Profile = { kind: BeamKind; shareAt: (offAxisDeg: number) => number }

/** The profile of a head: from its beam angle, else from a bare head's zoom, else 1 (unknown; nothing is taken off). */
export function profileOf({ beamDeg, zoomMm, bare }: Beam): Profile {
  if (beamDeg !== null && beamDeg > 0 && beamDeg < 180) {
    if (beamDeg <= 90) return { kind: 'gaussian', shareAt: (offAxisDeg) => gaussianProfile(offAxisDeg, beamDeg) }
    const exponent = cosineExponent(beamDeg)
    return { kind: 'cosine', shareAt: (offAxisDeg) => cosinePower(offAxisDeg, exponent) }
  }
  if (bare && zoomMm !== null) return { kind: 'zoom head', shareAt: zoomProfile(zoomMm) }
  return { kind: 'unknown', shareAt: (offAxisDeg) => (offAxisDeg < 90 || !bare ? 1 : 0) }
}
