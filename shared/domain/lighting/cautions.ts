import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { type LengthUnit, METRES_PER_FOOT, lengthLabel } from '#shared/units/length.ts'
import { type BoomBalance, boomBalanceOf, loadKgOf } from './boom.ts'
import type { Orientation } from './frame.ts'
import { frameCautions } from './in-frame.ts'
import { faceOf, outputOf } from './light-output.ts'
import { LONG_LOAD_SHARE, type MainsLoad } from './mains.ts'
import { type Supply, suppliesOf } from './power.ts'
import type { ProblemKey } from './problems.ts'
import { type SetupReading, readSetup } from './readings.ts'
import { type Light, isLamp } from './schema.ts'
import { SOCKET_LIMIT_DEG } from './softness.ts'
import { shutterLabel, stopsBetween } from './stops.ts'
import type { Sync } from './sync.ts'
import { fNumberLabel, inSentence, powerLabel, purposeWord } from './words.ts'

/** `red`: must be put right (in frame, over load, over power). `mind`: take care. `fine`: settled, with its number. */
export type Caution = {
  key: string
  tone: 'red' | 'mind' | 'fine'
  title: string
  words: string
  lightId: string | null
  /** How the number came about, and what is assumed. */
  how: string
}

export type CautionOptions = {
  /** Orientations of the shots that use the setup. */
  orientations: readonly Orientation[]
  /** Frames of all shots that use the setup; null leaves batteries out. */
  frames: number | null
  /** What lengths are said in. */
  unit: LengthUnit
}

const DEFAULTS: CautionOptions = { orientations: ['upright'], frames: null, unit: 'm' }

/** Heads above this stand with a bag, metres; faces larger than this catch draughts, m² (assumptions). */
const BAG_ABOVE_M = 1.8
const SAIL_M2 = 0.5
/** Nearer than this a strong flash is unkind to eyes and skin, metres (assumption). */
const NEAR_M = 0.5

const exactLabel = (metres: number, unit: LengthUnit) =>
  unit === 'm' ? `${Number(metres.toFixed(2))} m` : lengthLabel(metres, unit, true)
const areaLabel = (squareM: number, unit: LengthUnit) =>
  unit === 'm' ? `${squareM} m²` : `${(squareM / METRES_PER_FOOT ** 2).toFixed(1)} sq ft`

const BOOM_PARTS: Readonly<Record<BoomBalance['assumed'][number], string>> = {
  reachM: 'reach',
  counterReachM: 'place of the counterweight',
  armMassKg: 'mass of the arm',
}

function boomHow({ reachM, counterReachM, armMassKg, assumed }: BoomBalance, unit: LengthUnit): string {
  const parts = assumed.map((part) => BOOM_PARTS[part])
  const from = parts.length === 0 ? 'the boom’s own numbers' : `assumed: ${parts.join(', ')}; put in your boom’s own`
  return `W = (w·a + m(a − b)/2)/b with an arm of ${armMassKg} kg, a = ${exactLabel(reachM, unit)}, b = ${exactLabel(counterReachM, unit)} (${from}).`
}

function supportCautions(light: Light, unit: LengthUnit): Caution[] {
  const { support } = light
  if (!support) return []
  const name = purposeWord(light.purpose).toLowerCase()
  const load = loadKgOf(light)
  const { kind, maxHeightM, maxLoadKg } = support.numbers
  const cautions: Caution[] = []
  const add = (key: string, tone: Caution['tone'], title: string, words: string, how: string) =>
    cautions.push({ key: `${light.id}:${key}`, tone, title, words, lightId: light.id, how })
  const massHow = `${light.unit.name} ${light.unit.numbers.massKg.value} kg (${light.unit.numbers.massKg.from})${light.modifier ? ` + ${light.modifier.name} ${light.modifier.numbers.massKg.value} kg (${light.modifier.numbers.massKg.from})` : ''}; support ${maxLoadKg.value} kg (${maxLoadKg.from}).`
  if (load > maxLoadKg.value) {
    add(
      'load',
      'red',
      `Too heavy for its ${inSentence(support.name)}`,
      `${load.toFixed(1)} kg on a support for ${maxLoadKg.value} kg. Take a stronger one; the maker’s limit decides.`,
      massHow,
    )
  }
  if (light.at[1] > maxHeightM.value + 0.05) {
    add(
      'height',
      'red',
      `Higher than its ${inSentence(support.name)} goes`,
      `The ${name} is drawn at ${lengthLabel(light.at[1], unit)}; the support goes to ${lengthLabel(maxHeightM.value, unit)}. Never extend past the maker’s mark.`,
      `Support height ${exactLabel(maxHeightM.value, unit)} (${maxHeightM.from}).`,
    )
  }
  const boom = boomBalanceOf(light)
  if (boom) {
    const weight = boom.counterweightKg
    add(
      'boom',
      'mind',
      `Balance and bag the ${name} boom`,
      `${load.toFixed(1)} kg out at ${exactLabel(boom.reachM, unit)} wants about ${weight.toFixed(1)} kg at ${exactLabel(boom.counterReachM, unit)}${weight > 0 ? ` (${boom.bags}, slid until it balances)` : ''}, and a bag on the base. Nobody sits under it. The boom maker’s limits and the venue’s rules decide.`,
      `${boomHow(boom, unit)} ${massHow}`,
    )
  } else if (kind === 'stand') {
    const { widthM, heightM } = faceOf(light)
    const large = widthM * heightM >= SAIL_M2
    if (light.at[1] >= BAG_ABOVE_M || large) {
      const why = large
        ? `A ${lengthLabel(Math.max(widthM, heightM), unit)} face is a sail`
        : `A head at ${lengthLabel(light.at[1], unit)} on a light stand tips easily`
      add(
        'bag',
        'mind',
        `Bag the ${name} stand`,
        `${why}. Bag it, tape the cable. Follow the stand maker’s limits and the venue’s rules.`,
        `Said from ${exactLabel(BAG_ABOVE_M, unit)} up or ${areaLabel(SAIL_M2, unit)} of face (assumptions).`,
      )
    }
  }
  return cautions
}

function powerCautions(light: Light): Caution[] {
  const name = purposeWord(light.purpose).toLowerCase()
  const { numbers } = light.unit
  const cautions: Caution[] = []
  const least = 1 / numbers.minPowerDenominator
  if (light.isOn && light.power > 0 && light.power < least * 0.99) {
    cautions.push({
      key: `${light.id}:under-power`,
      tone: 'red',
      title: `The ${name} cannot go that low`,
      words: `It is set to ${powerLabel(light.power)}; the ${isLamp(numbers) ? 'lamp' : 'head'} goes down to ${powerLabel(least)}. Move it back, or add a gel or a diffuser.`,
      lightId: light.id,
      how: `Least power of ${light.unit.name}: 1/${numbers.minPowerDenominator}.`,
    })
  }
  const closed =
    light.modifier !== null &&
    ['snoot', 'grid', 'softbox', 'octa', 'strip', 'lantern'].includes(light.modifier.numbers.shape)
  if (light.isOn && light.power >= 0.5 && (light.gels.length > 0 || closed)) {
    cautions.push({
      key: `${light.id}:heat`,
      tone: 'mind',
      title: `The ${name} gets hot`,
      words: `${powerLabel(light.power) === 'full' ? 'Full power' : `${powerLabel(light.power)} power`} behind ${light.gels.length > 0 ? 'a gel' : 'a closed modifier'} heats ${isLamp(numbers) ? 'lamp and gel. Keep to the maker’s limits' : 'head, gel and bulb. Keep the pace the maker allows'}, let it cool before touching, and keep cloth off it.`,
      lightId: light.id,
      how: `Said from half power with a gel or a closed modifier (assumption). The maker’s limit ${isLamp(numbers) ? 'of what may be before it' : 'on pops in a row'} decides.`,
    })
  }
  return cautions
}

function eyeCautions(reading: SetupReading, whole: WholeSetup, unit: LengthUnit): Caution[] {
  const { main } = reading
  const mainLight = whole.lights.find((light) => light.id === main?.lightId)
  if (!main || !mainLight) return []
  const words = `The main stands ${Math.round(Math.abs(main.elevationDeg))}° ${main.elevationDeg >= 0 ? 'above' : 'below'} the eye line.`
  const how = `atan(rise / distance on the floor). Pupils fall into the brow’s shadow above about ${Math.round(SOCKET_LIMIT_DEG)}°: a rule of thumb from assumed face measures (brow to pupil 12 mm, overhang 15 mm).`
  const cautions: Caution[] = [
    main.elevationDeg > SOCKET_LIMIT_DEG
      ? {
          key: 'eyes',
          tone: 'mind',
          title: 'Eyes may fall into shadow',
          words: `${words} Lower it, take it further off, or let the sitter look up.`,
          lightId: mainLight.id,
          how,
        }
      : { key: 'eyes', tone: 'fine', title: 'Eyes stay open', words, lightId: mainLight.id, how },
  ]
  const near = reading.lights.filter(
    (light) =>
      light.where === 'sitter' &&
      light.isOn &&
      light.distanceM - halfFaceM(whole, light.lightId) < NEAR_M &&
      light.fullGuideNumberM > 0,
  )
  return [
    ...cautions,
    ...near.map((light): Caution => ({
      key: `${light.lightId}:near`,
      tone: 'mind',
      title: `The ${purposeWord(light.purpose).toLowerCase()} is close to the face`,
      words: `${lengthLabel(light.distanceM, unit)} from the eyes. Tell the sitter before it ${light.isLamp ? 'is switched on' : 'flashes'}, begin low, and mind hair and lashes near a hot ${light.isLamp ? 'lamp' : 'head'}.`,
      lightId: light.lightId,
      how: `Said under ${exactLabel(NEAR_M, unit)} from the edge of its face (assumption).`,
    })),
  ]
}

/** From its middle to the edge of a light's face, metres. */
function halfFaceM(whole: WholeSetup, lightId: string): number {
  const light = whole.lights.find((candidate) => candidate.id === lightId)
  if (!light) return 0
  const { widthM, heightM } = faceOf(light)
  return Math.max(widthM, heightM) / 2
}

function exposureCautions(reading: SetupReading, whole: WholeSetup): Caution[] {
  const { camera } = whole.setup
  const cautions: Caution[] = []
  const main = whole.lights.find((light) => light.id === reading.main?.lightId)
  if (main && reading.mainFNumber !== null && reading.mainFNumber > 0) {
    const short = stopsBetween(camera.fNumber, reading.totalFNumber)
    const room = stopsBetween(1, Math.sqrt(main.power))
    const how = `Main, fill and ambient together read ${fNumberLabel(reading.totalFNumber)} at ISO ${camera.iso}; the main has ${Math.max(0, room).toFixed(1)} stops up to full power (guide number ${outputOf(main).fullGuideNumberM.toFixed(0)}).`
    if (short > room + 1 / 3) {
      cautions.push({
        key: 'over-power',
        tone: 'red',
        title: 'Not enough power',
        words: `Even at full power the face stays ${(short - Math.max(0, room)).toFixed(1)} stops under the camera’s ${fNumberLabel(camera.fNumber)}. Come closer, open up, or raise the ISO.`,
        lightId: main.id,
        how,
      })
    } else if (Math.abs(short) > 1 / 2) {
      cautions.push({
        key: 'exposure',
        tone: 'mind',
        title: short > 0 ? 'The face comes out dark' : 'The face comes out bright',
        words: `The light reads ${fNumberLabel(reading.totalFNumber)}, the camera is set to ${fNumberLabel(camera.fNumber)}: ${Math.abs(short).toFixed(1)} stops ${short > 0 ? 'under' : 'over'}.`,
        lightId: null,
        how,
      })
    }
  }
  return cautions
}

function syncCautions(sync: Sync | null): Caution[] {
  if (!sync?.isTooFast) return []
  const limit = shutterLabel(sync.limitS)
  return [
    {
      key: 'sync',
      tone: 'mind',
      title: 'Shutter may be faster than the flash',
      words: `At ${shutterLabel(sync.shutterS)} a part of the frame stays dark: flash lights all of it up to ${limit}${sync.isAssumed ? ' (assumed)' : ''}.${sync.units.length > 0 ? ` ${sync.units.join('. ')}.` : ''}`,
      lightId: null,
      how: sync.isAssumed
        ? `Sync speed taken as ${limit} s (assumed; your camera’s own decides).`
        : `Sync speed of the camera as put in: ${limit} s.`,
    },
  ]
}

/** From this share of a charge on fresh ones are asked for (assumption). */
const FRESH_FROM = 0.8

function batteryCautions(whole: WholeSetup, frames: number, supplies: readonly Supply[]): Caution[] {
  const lights = supplies
    .flatMap((supply) => {
      const light = whole.lights.find((candidate) => candidate.id === supply.lightId)
      return light && supply.charges !== null ? [{ ...supply, light, charges: supply.charges }] : []
    })
    .sort((a, b) => b.charges - a.charges)
  const short = lights.filter(({ charges }) => charges > FRESH_FROM)
  return (short.length > 0 ? short : lights.slice(0, 1)).map(({ light, charges, pops, popsPerCharge, recycleS }) => {
    const name = purposeWord(light.purpose).toLowerCase()
    const sets = charges > 1 ? ` Bring ${Math.ceil(charges)} sets or charges.` : ''
    const needs = charges > FRESH_FROM
    return {
      key: needs ? `${light.id}:power` : 'power',
      tone: needs ? 'mind' : 'fine',
      title: needs ? 'Bring fresh batteries' : 'Power to spare',
      words: `${frames} frames: ${Math.ceil(pops ?? 0)} full pops of ${popsPerCharge} from the ${name}.${sets} Ready again in ${recycleS.toFixed(1)} s.`,
      lightId: light.id,
      how: `Frames × power; recycling = full recycle × power (assumption). Cells give less when old or cold.`,
    }
  })
}

function mainsCautions(mains: MainsLoad | null): Caution[] {
  if (!mains) return []
  const { circuit } = mains
  const watts = `${Math.round(mains.watts)} W`
  const defer = 'A licensed electrician and the venue decide; this is no permit.'
  const how = `Sum of nameplate watts, every light on the mains at full power, dimmed or not. ${
    circuit
      ? `${circuit.volts} V × ${circuit.amps} A = ${Math.round(circuit.watts)} W; for three hours or more ${LONG_LOAD_SHARE * 100} %, ${Math.round(circuit.longWatts)} W (NEC 210.20(A); local code prevails).`
      : 'Circuit not known: put in its voltage and rating.'
  }`
  const caution = (tone: Caution['tone'], title: string, words: string): Caution[] => [
    { key: 'mains', tone, title, words: `${words} ${defer}`, lightId: null, how },
  ]
  if (!circuit) return caution('mind', 'Ask for the circuit', `The lights on the mains draw up to ${watts} together.`)
  const of = `${watts} (${circuit.drawnA.toFixed(1)} A) of ${Math.round(circuit.watts)} W`
  if (mains.watts > circuit.watts)
    return caution('red', 'Too much for one circuit', `${of}: split the lights over circuits.`)
  if (mains.watts > circuit.longWatts)
    return caution('mind', 'Close to the circuit’s limit', `${of}: more than is planned on for three hours or more.`)
  return caution('mind', 'Keep the circuit for the lights', `${of}. Nothing else belongs on it.`)
}

const TONES = ['red', 'mind', 'fine'] as const

/**
 * What to mind about a setup, worst first: what stands in the picture, supports beyond their limits, power that is not
 * there, sync, mains, eyes, heat, batteries. Where the work can hurt, makers' limits and the venue's rules decide.
 */
export function cautionsOf(
  whole: WholeSetup,
  options: Partial<CautionOptions> = {},
  reading: SetupReading = readSetup(whole, options),
): Caution[] {
  const { orientations, frames, unit } = { ...DEFAULTS, ...options }
  const all = [
    ...frameCautions(whole, orientations.length > 0 ? orientations : DEFAULTS.orientations, unit),
    ...whole.lights.flatMap((light) => [...supportCautions(light, unit), ...powerCautions(light)]),
    ...exposureCautions(reading, whole),
    ...syncCautions(reading.sync),
    ...mainsCautions(reading.mains),
    ...eyeCautions(reading, whole, unit),
    ...(frames === null ? [] : batteryCautions(whole, frames, suppliesOf(whole.lights, frames))),
  ]
  return TONES.flatMap((tone) => all.filter((caution) => caution.tone === tone))
}

/** Colours that no temperature tells are a matter of taste: they keep no lamp from being lit. */
const TASTE: ReadonlySet<ProblemKey> = new Set(['colour', 'gel-colour'])

/**
 * What keeps the section's lamp from being lit, one sentence each: what cannot be worked out, then the red cautions.
 */
export function redCautions(whole: WholeSetup, options: Partial<CautionOptions> = {}): string[] {
  const reading = readSetup(whole, options)
  return [
    ...reading.problems.filter(({ key }) => !TASTE.has(key)).map(({ words }) => words),
    ...cautionsOf(whole, options, reading)
      .filter((caution) => caution.tone === 'red')
      .map((caution) => caution.title),
  ]
}
