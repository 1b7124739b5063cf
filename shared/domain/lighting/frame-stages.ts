import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import type { LightReading, SetupReading } from './readings.ts'
import type { Light, LightPurpose } from './schema.ts'
import { fNumberLabel, stopsLabel } from './words.ts'

/** A step of building up the light: this light and all before it. */
export type FrameStage = {
  light: Light
  /** "Main", "+ background", "+ fill". */
  caption: string
  /** "f/5.6" for the first main, "−2" or "wall −⅔" against the mains for all others; "off". */
  reading: string
}

/** Mains, background, fill, then what draws edges: common practice, no source. */
const BUILT: readonly LightPurpose[] = ['main', 'background', 'fill', 'rim', 'accent']

/** Lights in the order in which they are built, those for the same in their own order. */
export function inBuildOrder(lights: readonly Light[]): Light[] {
  const place = (light: Light) => BUILT.indexOf(light.purpose)
  return [...lights].sort((a, b) => place(a) - place(b))
}

function readingWords(own: LightReading | undefined, isFirstMain: boolean): string {
  if (!own) return ''
  if (!own.isOn) return 'off'
  if (own.purpose === 'main' && isFirstMain) return fNumberLabel(own.fNumber)
  const words = own.underMainStops === null ? fNumberLabel(own.fNumber) : stopsLabel(-own.underMainStops)
  return own.where === 'wall' ? `wall ${words}` : words
}

/** The steps of a setup's test frames, with what each light reads: `readSetup`'s numbers, nothing new. */
export function frameStages(whole: WholeSetup, reading: SetupReading): FrameStage[] {
  const lights = inBuildOrder(whole.lights)
  const firstMain = lights.find((light) => light.purpose === 'main')
  return lights.map((light, index) => ({
    light,
    caption: index === 0 ? `${light.purpose.charAt(0).toUpperCase()}${light.purpose.slice(1)}` : `+ ${light.purpose}`,
    reading: readingWords(
      reading.lights.find((own) => own.lightId === light.id),
      light === firstMain,
    ),
  }))
}
