import type { KitBody, ModifierNumbers, Stated, SupportNumbers, UnitNumbers } from './schema.ts'

/** What is wrong with one number of a kit item: where it stands within `body.numbers`, and what to do. */
export type KitFault = { path: (string | number)[]; message: string }

/** No head has more, with whatever is on it. */
export const MOST_GUIDE_NUMBER_M = 500

type Limits = {
  /** Least that is taken; with `above` it has to be more than that. */
  least: number
  above?: boolean
  most: number
  unit?: string
  what: string
  /** Said when it is too little. */
  tooLittle?: string
}

function outside(key: string, stated: Stated | null, limits: Limits): KitFault[] {
  if (stated === null) return []
  const { least, above = false, most, unit = '', what } = limits
  const { value } = stated
  const path = [key, 'value']
  const withUnit = (number: number) => `${number}${unit === '' ? '' : ` ${unit}`}`
  if (above ? value <= least : value < least) {
    const rule = above ? `has to be more than ${withUnit(least)}` : `cannot be less than ${withUnit(least)}`
    return [{ path, message: limits.tooLittle ?? `${what} ${rule}.` }]
  }
  if (value > most) return [{ path, message: `${what} of more than ${withUnit(most)} is not taken: check the unit.` }]
  return []
}

const mass = (stated: Stated, what: string) =>
  outside('massKg', stated, { least: 0, above: true, most: 100, unit: 'kg', what })
const colour = (key: string, stated: Stated) =>
  outside(key, stated, { least: 1000, most: 20000, unit: 'K', what: 'A colour temperature' })
const beam = (stated: Stated | null) =>
  outside('beamDeg', stated, { least: 0, above: true, most: 360, unit: 'degrees', what: 'A beam' })

function unitFaults(numbers: UnitNumbers): KitFault[] {
  const faults = [
    ...outside('guideNumberM', numbers.guideNumberM, {
      least: 0,
      above: true,
      most: MOST_GUIDE_NUMBER_M,
      unit: 'm',
      what: 'A guide number',
      tooLittle: 'Without a guide number nothing can be worked out: put in the maker’s figure or measure it.',
    }),
    ...colour('flashColourK', numbers.flashColourK),
    ...outside('fullPops', numbers.fullPops, { least: 1, most: 1_000_000, what: 'The number of full pops' }),
    ...outside('fullRecycleS', numbers.fullRecycleS, {
      least: 0,
      above: true,
      most: 120,
      unit: 's',
      what: 'The time to be ready again',
    }),
    ...mass(numbers.massKg, 'The mass of a head'),
    ...outside('mainsWatts', numbers.mainsWatts, {
      least: 0,
      above: true,
      most: 20_000,
      unit: 'W',
      what: 'What it draws from the mains',
    }),
  ]
  const focals = new Set<number>()
  numbers.zoom.forEach(({ focalMm, guideNumberM }, index) => {
    if (focals.has(focalMm))
      faults.push({ path: ['zoom', index, 'focalMm'], message: `${focalMm} mm is there twice: one of them is enough.` })
    focals.add(focalMm)
    if (guideNumberM > MOST_GUIDE_NUMBER_M)
      faults.push({
        path: ['zoom', index, 'guideNumberM'],
        message: `A guide number of more than ${MOST_GUIDE_NUMBER_M} m is not taken: check the unit.`,
      })
  })
  numbers.metered.forEach(({ guideNumberM }, index) => {
    if (guideNumberM > MOST_GUIDE_NUMBER_M)
      faults.push({
        path: ['metered', index, 'guideNumberM'],
        message: `A reading that makes a guide number of more than ${MOST_GUIDE_NUMBER_M} m is not taken: check distance and power.`,
      })
  })
  return faults
}

function modifierFaults(numbers: ModifierNumbers): KitFault[] {
  const faults = [
    ...outside('lossStops', numbers.lossStops, { least: -4, most: 12, unit: 'stops', what: 'What a modifier takes' }),
    ...beam(numbers.beamDeg),
    ...outside('massKg', numbers.massKg, { least: 0, most: 100, unit: 'kg', what: 'The mass of a modifier' }),
  ]
  if ((numbers.widthM === 0) !== (numbers.heightM === 0))
    faults.push({
      path: [numbers.widthM === 0 ? 'widthM' : 'heightM'],
      message: 'A face has a width and a height; put 0 in both when it has no size of its own.',
    })
  return faults
}

function supportFaults(numbers: SupportNumbers): KitFault[] {
  const { minHeightM, maxHeightM } = numbers
  const metres = (what: string): Limits => ({ least: 0, above: true, most: 15, unit: 'm', what })
  const faults = [
    ...outside('maxHeightM', maxHeightM, metres('The height it goes to')),
    ...outside('minHeightM', minHeightM, { ...metres('The lowest height'), above: false }),
    ...outside('maxLoadKg', numbers.maxLoadKg, {
      least: 0,
      above: true,
      most: 500,
      unit: 'kg',
      what: 'What it carries',
    }),
    ...outside('reachM', numbers.reachM, metres('How far the head hangs out')),
    ...outside('counterReachM', numbers.counterReachM, metres('Where the counterweight sits')),
    ...outside('armMassKg', numbers.armMassKg, { least: 0, most: 100, unit: 'kg', what: 'The mass of the arm' }),
  ]
  if (minHeightM && minHeightM.value > maxHeightM.value)
    faults.push({
      path: ['minHeightM', 'value'],
      message: `The lowest height, ${minHeightM.value} m, is above the highest, ${maxHeightM.value} m: swap them.`,
    })
  return faults
}

/**
 * Numbers of a kit item that no setup can be computed with, each with a sentence for its field. Stricter than what is
 * read: copies in lights keep whatever they hold. Limits are guards against slips of the pen (no source), not of the
 * trade. Lengths in metres, masses in kg.
 */
export function faultsOf(body: KitBody): KitFault[] {
  switch (body.kind) {
    case 'unit':
      return unitFaults(body.numbers)
    case 'lamp': {
      const { numbers } = body
      return [
        ...outside('luxAtMetre', numbers.luxAtMetre, {
          least: 0,
          above: true,
          most: 10_000_000,
          unit: 'lx',
          what: 'Light at a metre',
          tooLittle: 'Without its light at a metre nothing can be worked out: put in the maker’s figure or measure it.',
        }),
        ...outside('watts', numbers.watts, { least: 0, above: true, most: 20_000, unit: 'W', what: 'What it draws' }),
        ...colour('colourK', numbers.colourK),
        ...beam(numbers.beamDeg),
        ...mass(numbers.massKg, 'The mass of a lamp'),
      ]
    }
    case 'modifier':
      return modifierFaults(body.numbers)
    case 'gel': {
      const { numbers } = body
      const faults = [
        ...outside('miredShift', numbers.miredShift, { least: -500, most: 500, unit: 'mired', what: 'A shift' }),
        ...outside('transmission', numbers.transmission, {
          least: 0,
          above: true,
          most: 1,
          what: 'The light a gel lets through',
          tooLittle: 'A gel that lets nothing through is a flag: put in a part of 1, such as 0.47.',
        }),
      ]
      if (!/^#[0-9a-f]{6}$/i.test(numbers.colour))
        faults.push({ path: ['colour'], message: 'A colour is # and six hexadecimal digits.' })
      return faults
    }
    case 'support':
      return supportFaults(body.numbers)
    case 'panel':
      return outside('massKg', body.numbers.massKg, { least: 0, most: 100, unit: 'kg', what: 'The mass of a panel' })
  }
}
