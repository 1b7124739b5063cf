import { fNumberOfExposure } from './exposure.ts'
import { distanceBetween, dot, minus, panelNormal } from './geometry.ts'
import { arrivalAt } from './light-output.ts'
import type { Light, Point, Prop } from './schema.ts'

/** Share of the light a matte surface of this colour gives back: linear luminance of `#rrggbb`, at most 0.9. */
export function reflectanceOf(colour: string): number {
  const channel = (from: number) => {
    const value = Number.parseInt(colour.slice(from, from + 2), 16) / 255
    return value <= 0.04045 ? value / 12.92 : ((value + 0.055) / 1.055) ** 2.4
  }
  return Math.min(0.9, 0.2126 * channel(1) + 0.7152 * channel(3) + 0.0722 * channel(5))
}

/**
 * What a panel gives to the face from the mains and fills that light it: an f-number at this ISO,
 * lamps at this shutter time in seconds. The panel is one
 * matte (Lambertian) patch, E = ρ·E₀·A·cos φ/(π·d² + A) with d from its middle; other walls give nothing (assumption).
 * The face must be on the side that is lit.
 */
export function panelReading(
  panel: Prop,
  lights: readonly Light[],
  face: Point,
  { iso, shutterS }: { iso: number; shutterS: number },
): number {
  const normal = panelNormal(panel.turnDeg)
  const toFace = minus(face, panel.at)
  const distanceM = distanceBetween(face, panel.at)
  if (distanceM < 0.05) return 0
  const faceSide = dot(normal, toFace) / distanceM
  const areaM2 = panel.widthM * panel.heightM
  let exposureLxS = 0
  for (const light of lights) {
    if (light.purpose !== 'main' && light.purpose !== 'fill') continue
    const toLight = minus(light.at, panel.at)
    const lightSide = dot(normal, toLight) / Math.max(0.05, Math.hypot(...toLight))
    if (lightSide * faceSide <= 0) continue
    const onPanel = arrivalAt(light, panel.at, iso, shutterS).exposureLxS * Math.abs(lightSide)
    exposureLxS +=
      (reflectanceOf(panel.colour) * onPanel * areaM2 * Math.abs(faceSide)) / (Math.PI * distanceM ** 2 + areaM2)
  }
  return fNumberOfExposure(exposureLxS, iso)
}
