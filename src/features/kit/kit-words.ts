import type {
  KitBody,
  KitInput,
  KitKind,
  Metered,
  Provenance,
  Stated,
  SupportNumbers,
} from '#shared/domain/kit/schema.ts'

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
    empty: 'Stands, booms, clamps and floor plates, with their heights and what they carry.',
  },
}

export const PROVENANCE_WORDS: Readonly<Record<Provenance, string>> = {
  published: 'published',
  measured: 'measured',
  assumed: 'assumed',
}

/** Supports as people say them. */
export const SUPPORT_WORDS: Readonly<Record<SupportNumbers['kind'], string>> = {
  stand: 'stand',
  boom: 'boom',
  clamp: 'clamp',
  'floor stand': 'floor stand',
  'floor plate': 'floor plate',
  hand: 'held by hand',
  'magic arm': 'magic arm',
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

const maybe = (label: string, number: Stated | null, show: (value: number) => string, none = '–'): Reading =>
  number ? stated(label, number, show) : plain(label, none)
const beam = (number: Stated | null) => maybe('Beam', number, (value) => `${digits(value, 0)}°`, 'unknown')
const mass = (number: Stated) => stated('Mass', number, (value) => `${digits(value)} kg`)
const metres = (value: number) => `${digits(value)} m`
const powers = (denominator: number) => plain('Power', denominator === 1 ? 'full only' : `full to 1/${denominator}`)

/** The numbers of an item in the order people read them. */
export function readingsOf(body: KitBody): Reading[] {
  switch (body.kind) {
    case 'unit': {
      const { numbers } = body
      return [
        stated('Guide number', numbers.guideNumberM, (value) => `${digits(value, 1)} m`),
        powers(numbers.minPowerDenominator),
        stated('Colour', numbers.flashColourK, (value) => `${digits(value, 0)} K`),
        stated('Full pops', numbers.fullPops, (value) => digits(value, 0)),
        stated('Recycles in', numbers.fullRecycleS, (value) => `${digits(value, 1)} s`),
        maybe('Mains', numbers.mainsWatts, (value) => `${digits(value, 0)} W`, 'battery'),
        mass(numbers.massKg),
      ]
    }
    case 'lamp': {
      const { numbers } = body
      return [
        stated('At a metre', numbers.luxAtMetre, (value) => `${digits(value, 0)} lx`),
        stated('Draws', numbers.watts, (value) => `${digits(value, 0)} W`),
        plain('Runs on', numbers.onMains ? 'mains' : 'battery'),
        powers(numbers.minPowerDenominator),
        stated('Colour', numbers.colourK, (value) => `${digits(value, 0)} K`),
        beam(numbers.beamDeg),
        mass(numbers.massKg),
      ]
    }
    case 'modifier': {
      const { numbers } = body
      return [
        plain('Shape', numbers.shape),
        plain('Size', numbers.widthM === 0 ? '–' : faceSize(numbers.widthM, numbers.heightM)),
        stated('Takes', numbers.lossStops, (value) => `${digits(value, 1)} stops`),
        beam(numbers.beamDeg),
        mass(numbers.massKg),
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
        plain('Kind', SUPPORT_WORDS[numbers.kind]),
        maybe('Lowest', numbers.minHeightM, metres),
        stated('Goes to', numbers.maxHeightM, metres),
        stated('Carries', numbers.maxLoadKg, (value) => `${digits(value, 1)} kg`),
        maybe('Reach', numbers.reachM, metres),
        maybe('Counterweight at', numbers.counterReachM, metres),
        maybe('Arm', numbers.armMassKg, (value) => `${digits(value)} kg`),
      ]
    }
    case 'panel': {
      const { numbers } = body
      return [plain('Use', numbers.use), plain('Size', faceSize(numbers.widthM, numbers.heightM)), mass(numbers.massKg)]
    }
  }
}

/** What a meter read of a unit, in words: "90 cm octa, 50 mm: guide number 41.2 m". */
export function meteredWords({ modifierKitId, zoomMm, guideNumberM }: Metered, nameOf: NameOf): string {
  const on = modifierKitId === null ? 'Bare' : (nameOf(modifierKitId) ?? 'A modifier no longer in the kit')
  return `${on}${zoomMm === null ? '' : `, ${digits(zoomMm)} mm`}: guide number ${digits(guideNumberM, 1)} m`
}

/** Name of a modifier in the kit; undefined when it is not there any more. */
export type NameOf = (kitId: string) => string | undefined

/** What else there is to say of an item, one press away: words first, then what each number rests on. */
export function detailsOf(body: KitBody, nameOf: NameOf): { label: string; words: string }[] {
  const details: { label: string; words: string }[] = []
  const add = (label: string, words: string) => words.trim() !== '' && details.push({ label, words })
  if (body.kind === 'unit') {
    const { zoom, sync, triggers, remotePower, metered } = body.numbers
    add(
      'Guide number by zoom',
      zoom.map(({ focalMm, guideNumberM }) => `${digits(focalMm)} mm ${digits(guideNumberM, 1)} m`).join(' · '),
    )
    add('Sync', sync)
    add('Triggers', triggers)
    add('Power', remotePower ? 'Can be set from the camera.' : 'Is set on the head.')
    for (const entry of metered) add('Measured', `${meteredWords(entry, nameOf)} (${entry.source})`)
  }
  for (const { label, stated: number } of readingsOf(body)) {
    if (number) add(label, `${PROVENANCE_WORDS[number.from]}${number.source === '' ? '' : `: ${number.source}`}`)
  }
  return details
}
