/** What a camera wrote about an exposure; null where it wrote nothing. */
export type Exposure = {
  fNumber: number | null
  exposureTimeS: number | null
  focalLengthMm: number | null
  iso: number | null
}

/** An exposure on one line: `f/5.6 · 1/200 · 85 mm · ISO 100`; what is not known is left out, nothing known is ''. */
export function exposureLine({ fNumber, exposureTimeS, focalLengthMm, iso }: Exposure): string {
  const parts: string[] = []
  if (isUsable(fNumber)) parts.push(`f/${rounded(fNumber)}`)
  if (isUsable(exposureTimeS)) parts.push(shutterLabel(exposureTimeS))
  if (isUsable(focalLengthMm)) parts.push(`${rounded(focalLengthMm)} mm`)
  if (isUsable(iso)) parts.push(`ISO ${Math.round(iso)}`)
  return parts.join(' · ')
}

/** Below about a third of a second people say a fraction, above it seconds. */
function shutterLabel(exposureTimeS: number): string {
  return exposureTimeS < 0.3 ? `1/${Math.round(1 / exposureTimeS)}` : `${rounded(exposureTimeS)} s`
}

function rounded(value: number): string {
  return String(Math.round(value * 10) / 10)
}

function isUsable(value: number | null): value is number {
  return value !== null && Number.isFinite(value) && value > 0
}
