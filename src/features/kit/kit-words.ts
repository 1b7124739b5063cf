import type { KitBody, KitInput, KitKind, Provenance, Stated } from '#shared/domain/kit/schema.ts'

export const KIND_WORDS: Readonly<Record<KitKind, { one: string; many: string; empty: string }>> = {
  unit: { one: 'Flash unit', many: 'Flash units', empty: 'Heads with their guide number, colour and charge.' },
  modifier: {
    one: 'Modifier',
    many: 'Modifiers',
    empty: 'Softboxes, umbrellas and grids, with their size and what they swallow.',
  },
  lamp: { one: 'Lamp', many: 'Lamps', empty: 'Lamps that burn all the time, with watts and lux at a metre.' },
  panel: { one: 'Panel or flag', many: 'Panels and flags', empty: 'What gives light back, and what keeps it off.' },
  gel: {
    one: 'Gel',
    many: 'Gels',
    empty: 'Filters with how far they shift the colour and how much light they let through.',
  },
  support: {
    one: 'Support',
    many: 'Supports',
    empty: 'Stands, booms and clamps with their height and what they carry.',
  },
}

export const PROVENANCE_WORDS: Readonly<Record<Provenance, string>> = {
  published: 'published',
  measured: 'measured',
  assumed: 'assumed',
}

const assumed = (value: number): Stated => ({ value, from: 'assumed', source: '' })

/** A new item of a kind with numbers that are marked as assumed until somebody changes them. */
export function blankItem(kind: KitKind): KitInput {
  return { name: '', quantity: 1, note: '', body: blankBody(kind) }
}

function blankBody(kind: KitKind): KitBody {
  switch (kind) {
    case 'unit':
      return {
        kind,
        numbers: {
          guideNumberM: assumed(40),
          zoom: [],
          minPowerDenominator: 128,
          flashColourK: assumed(5600),
          fullPops: assumed(200),
          fullRecycleS: assumed(2.5),
          massKg: assumed(0.6),
          remotePower: true,
          mainsWatts: null,
          sync: '',
          triggers: '',
          metered: [],
        },
      }
    case 'modifier':
      return {
        kind,
        numbers: {
          shape: 'softbox',
          widthM: 0.6,
          heightM: 0.6,
          lossStops: assumed(1.5),
          beamDeg: null,
          massKg: assumed(0.8),
        },
      }
    case 'gel':
      return {
        kind,
        numbers: { miredShift: assumed(0), printedMired: null, transmission: assumed(0.8), colour: '#ffffff' },
      }
    case 'support':
      return {
        kind,
        numbers: {
          kind: 'stand',
          maxHeightM: assumed(2.6),
          maxLoadKg: assumed(3),
          minHeightM: null,
          reachM: null,
          counterReachM: null,
          armMassKg: null,
        },
      }
    case 'lamp':
      return {
        kind,
        numbers: {
          luxAtMetre: assumed(5000),
          watts: assumed(100),
          colourK: assumed(5600),
          beamDeg: null,
          minPowerDenominator: 100,
          massKg: assumed(1.5),
          remotePower: false,
          onMains: true,
        },
      }
    case 'panel':
      return { kind, numbers: { use: 'panel', widthM: 1, heightM: 1.5, colour: '#ffffff', massKg: assumed(1.5) } }
  }
}

/** One number of an item as the table shows it. */
export type Reading = { label: string; value: string; stated: Stated | null }

const plain = (label: string, value: string): Reading => ({ label, value, stated: null })
const stated = (label: string, number: Stated, show: (value: number) => string): Reading => ({
  label,
  value: show(number.value),
  stated: number,
})
/** Thousands parted by a narrow space, so that no comma can be read as a decimal one. */
const digits = (value: number, most = 2) =>
  new Intl.NumberFormat('en-GB', { maximumFractionDigits: most }).format(value).replaceAll(',', '\u202f')
const signed = (value: number) => `${value > 0 ? '+' : value < 0 ? '−' : ''}${digits(Math.abs(value), 0)}`

/** Size of an emitting face: one diameter for a disc. */
export function faceSize(widthM: number, heightM: number): string {
  const cm = (metres: number) => digits(metres * 100, 0)
  return widthM === heightM ? `${cm(widthM)} cm` : `${cm(widthM)} × ${cm(heightM)} cm`
}

/** The numbers of an item in the order people read them. */
export function readingsOf(body: KitBody): Reading[] {
  switch (body.kind) {
    case 'unit': {
      const { numbers } = body
      return [
        stated('Guide number', numbers.guideNumberM, (value) => `${digits(value, 1)} m`),
        plain('Power', `1/1 to 1/${numbers.minPowerDenominator}`),
        stated('Colour', numbers.flashColourK, (value) => `${digits(value, 0)} K`),
        stated('Full pops', numbers.fullPops, (value) => digits(value, 0)),
        stated('Recycles in', numbers.fullRecycleS, (value) => `${digits(value, 1)} s`),
        stated('Mass', numbers.massKg, (value) => `${digits(value)} kg`),
      ]
    }
    case 'modifier': {
      const { numbers } = body
      return [
        plain('Shape', numbers.shape),
        plain('Size', numbers.widthM === 0 ? '–' : faceSize(numbers.widthM, numbers.heightM)),
        stated('Takes', numbers.lossStops, (value) => `${digits(value, 1)} stops`),
        numbers.beamDeg ? stated('Beam', numbers.beamDeg, (value) => `${digits(value, 0)}°`) : plain('Beam', 'unknown'),
        stated('Mass', numbers.massKg, (value) => `${digits(value)} kg`),
      ]
    }
    case 'gel': {
      const { numbers } = body
      return [
        stated('Shift', numbers.miredShift, (value) => `${signed(value)} mired`),
        plain('Maker prints', numbers.printedMired === null ? '–' : `${signed(numbers.printedMired)} mired`),
        stated('Lets through', numbers.transmission, (value) => `${digits(value * 100, 0)} %`),
      ]
    }
    case 'support': {
      const { numbers } = body
      return [
        plain('Kind', numbers.kind),
        stated('Reaches', numbers.maxHeightM, (value) => `${digits(value)} m`),
        stated('Carries', numbers.maxLoadKg, (value) => `${digits(value, 1)} kg`),
      ]
    }
    case 'lamp': {
      const { numbers } = body
      return [
        stated('At a metre', numbers.luxAtMetre, (value) => `${digits(value, 0)} lx`),
        stated('Draws', numbers.watts, (value) => `${digits(value, 0)} W`),
        stated('Colour', numbers.colourK, (value) => `${digits(value, 0)} K`),
        numbers.beamDeg ? stated('Beam', numbers.beamDeg, (value) => `${digits(value, 0)}°`) : plain('Beam', 'unknown'),
        stated('Mass', numbers.massKg, (value) => `${digits(value)} kg`),
      ]
    }
    case 'panel': {
      const { numbers } = body
      return [
        plain('Use', numbers.use),
        plain('Size', faceSize(numbers.widthM, numbers.heightM)),
        stated('Mass', numbers.massKg, (value) => `${digits(value)} kg`),
      ]
    }
  }
}
