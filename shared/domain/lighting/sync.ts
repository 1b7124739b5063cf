import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { isLamp } from './schema.ts'

/** Fastest shutter with ordinary flash when the camera's own is not known, seconds (assumption). */
const ASSUMED_SYNC_S = 1 / 200
/** Shutter times are labels: 1/250 may be 1/256. Within this share a time counts as the limit itself. */
const SLACK = 0.95

export type Sync = {
  shutterS: number
  limitS: number
  isAssumed: boolean
  isTooFast: boolean
  /** What the units that flash say of keeping time, "Small flash: …", each once. */
  units: string[]
}

/** Whether a shutter time is shorter than the shortest at which flash lights the whole frame, both in seconds. */
export function isFasterThanSync(shutterS: number, syncS: number): boolean {
  return shutterS < syncS * SLACK
}

/** The shutter against the sync speed of the camera; null when nothing flashes. */
export function syncOf(whole: WholeSetup): Sync | null {
  const { shutterS, syncS } = whole.setup.camera
  const flashes = whole.lights.filter((light) => light.isOn && !isLamp(light.unit.numbers))
  if (flashes.length === 0) return null
  const limitS = syncS ?? ASSUMED_SYNC_S
  const units = flashes.flatMap(({ unit }) =>
    isLamp(unit.numbers) || !unit.numbers.sync ? [] : [`${unit.name}: ${unit.numbers.sync}`],
  )
  return {
    shutterS,
    limitS,
    isAssumed: syncS === null,
    isTooFast: isFasterThanSync(shutterS, limitS),
    units: [...new Set(units)],
  }
}
