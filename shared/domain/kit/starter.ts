import { GEL_ROWS } from './gels.ts'
import type { KitInput, ModifierNumbers, PanelNumbers, Stated, SupportNumbers, UnitNumbers } from './schema.ts'

const CLASS = 'typical of this class of head; put in your maker’s figure or a meter reading'
const GUESS = 'common practice, no source; measure yours'
const LIMIT = 'typical; the maker’s label on yours decides'

function assumed(value: number, source: string): Stated {
  return { value, from: 'assumed', source }
}

type UnitRow = {
  name: string
  quantity: number
  guideNumberM: number
  zoom?: UnitNumbers['zoom']
  minPowerDenominator: number
  flashColourK: number
  fullPops: number
  fullRecycleS: number
  massKg: number
  remotePower: boolean
  note: string
}

function unit(row: UnitRow): KitInput {
  return {
    name: row.name,
    quantity: row.quantity,
    note: row.note,
    body: {
      kind: 'unit',
      numbers: {
        guideNumberM: assumed(row.guideNumberM, CLASS),
        zoom: row.zoom ?? [],
        minPowerDenominator: row.minPowerDenominator,
        flashColourK: assumed(row.flashColourK, CLASS),
        fullPops: assumed(row.fullPops, CLASS),
        fullRecycleS: assumed(row.fullRecycleS, CLASS),
        massKg: assumed(row.massKg, CLASS),
        remotePower: row.remotePower,
        mainsWatts: null,
        sync: '',
        triggers: '',
        metered: [],
      },
    },
  }
}

type ModifierRow = [
  name: string,
  quantity: number,
  shape: ModifierNumbers['shape'],
  widthM: number,
  heightM: number,
  lossStops: number,
  beamDeg: number | null,
  massKg: number,
  note?: string,
]

function modifier([name, quantity, shape, widthM, heightM, lossStops, beamDeg, massKg, note]: ModifierRow): KitInput {
  return {
    name,
    quantity,
    note: note ?? '',
    body: {
      kind: 'modifier',
      numbers: {
        shape,
        widthM,
        heightM,
        lossStops: assumed(lossStops, GUESS),
        beamDeg:
          beamDeg === null ? null : assumed(beamDeg, shape === 'grid' ? 'nominal, as sold; measure yours' : GUESS),
        massKg: assumed(massKg, GUESS),
      },
    },
  }
}

function support(
  name: string,
  quantity: number,
  kind: SupportNumbers['kind'],
  maxHeightM: number,
  maxLoadKg: number,
): KitInput {
  return {
    name,
    quantity,
    note: 'Keep to the maker’s limits for height and load; weigh it down before anything goes up.',
    body: {
      kind: 'support',
      numbers: {
        kind,
        maxHeightM: assumed(maxHeightM, LIMIT),
        maxLoadKg: assumed(maxLoadKg, LIMIT),
        minHeightM: null,
        reachM: null,
        counterReachM: null,
        armMassKg: null,
      },
    },
  }
}

const ON_BATTERIES = 'Guide number at the longest zoom. Pops from four cells.'
const WITH_REFLECTOR = 'Guide number with the standard reflector, which therefore loses nothing here.'

const UNITS: readonly KitInput[] = [
  unit({
    name: 'Small flash, guide number 36',
    quantity: 2,
    guideNumberM: 36,
    zoom: [
      { focalMm: 24, guideNumberM: 22 },
      { focalMm: 35, guideNumberM: 27 },
      { focalMm: 50, guideNumberM: 31 },
      { focalMm: 85, guideNumberM: 36 },
    ],
    minPowerDenominator: 64,
    flashColourK: 5600,
    fullPops: 200,
    fullRecycleS: 4,
    massKg: 0.4,
    remotePower: false,
    note: ON_BATTERIES,
  }),
  unit({
    name: 'Small flash, guide number 58',
    quantity: 4,
    guideNumberM: 58,
    zoom: [
      { focalMm: 24, guideNumberM: 28 },
      { focalMm: 35, guideNumberM: 36 },
      { focalMm: 50, guideNumberM: 42 },
      { focalMm: 70, guideNumberM: 50 },
      { focalMm: 105, guideNumberM: 58 },
    ],
    minPowerDenominator: 128,
    flashColourK: 5600,
    fullPops: 150,
    fullRecycleS: 3.5,
    massKg: 0.55,
    remotePower: true,
    note: ON_BATTERIES,
  }),
  unit({
    name: 'Battery head 200 Ws',
    quantity: 2,
    guideNumberM: 52,
    minPowerDenominator: 128,
    flashColourK: 5600,
    fullPops: 450,
    fullRecycleS: 2.1,
    massKg: 0.9,
    remotePower: true,
    note: WITH_REFLECTOR,
  }),
  unit({
    name: 'Battery head 400 Ws',
    quantity: 1,
    guideNumberM: 70,
    minPowerDenominator: 256,
    flashColourK: 5600,
    fullPops: 380,
    fullRecycleS: 1.2,
    massKg: 2.1,
    remotePower: true,
    note: WITH_REFLECTOR,
  }),
  unit({
    name: 'Mains head 500 Ws',
    quantity: 1,
    guideNumberM: 76,
    minPowerDenominator: 64,
    flashColourK: 5600,
    fullPops: 100000,
    fullRecycleS: 1,
    massKg: 2.6,
    remotePower: false,
    note: `${WITH_REFLECTOR} Runs on mains: the venue’s circuit decides, ask a licensed electrician.`,
  }),
]

const MODIFIERS: readonly KitInput[] = (
  [
    ['Standard reflector 18 cm', 3, 'reflector', 0.18, 0.18, 0, 65, 0.4],
    ['60 cm softbox', 2, 'softbox', 0.6, 0.6, 2, 100, 0.8],
    ['90 cm octa', 1, 'octa', 0.9, 0.9, 2.3, 105, 1.2],
    ['120 cm octa', 1, 'octa', 1.2, 1.2, 2.5, 105, 1.6],
    ['Strip 30 × 120 cm', 2, 'strip', 0.3, 1.2, 2.3, 100, 1.1],
    ['White umbrella 110 cm', 2, 'umbrella', 1.1, 1.1, 1.8, 110, 0.6],
    ['Shoot-through umbrella 100 cm', 2, 'umbrella', 1, 1, 2, 130, 0.5],
    ['Beauty dish 55 cm', 1, 'beauty dish', 0.55, 0.55, 1.3, 80, 1.2],
    ['Lantern 65 cm', 1, 'lantern', 0.65, 0.65, 2.5, null, 0.7],
    ['10° grid', 2, 'grid', 0.18, 0.18, 1.3, 10, 0.2],
    ['20° grid', 2, 'grid', 0.18, 0.18, 1, 20, 0.2],
    ['30° grid', 2, 'grid', 0.18, 0.18, 0.7, 30, 0.2],
    ['40° grid', 1, 'grid', 0.18, 0.18, 0.5, 40, 0.2],
    ['Snoot', 1, 'snoot', 0.07, 0.07, 0.7, 15, 0.3],
  ] satisfies ModifierRow[]
).map(modifier)

const GELS: readonly KitInput[] = GEL_ROWS.map((row) => ({
  name: row.name,
  quantity: 4,
  note: '',
  body: {
    kind: 'gel',
    numbers: {
      miredShift: {
        value: row.miredShift,
        from: row.printedMired === null ? 'published' : 'measured',
        source: row.source,
      },
      printedMired: row.printedMired,
      transmission: {
        value: row.transmission,
        from: row.transmissionSource.startsWith('from memory') ? 'assumed' : 'published',
        source: row.transmissionSource,
      },
      colour: '#ffffff',
    },
  },
}))

function panel(
  name: string,
  quantity: number,
  use: PanelNumbers['use'],
  widthM: number,
  heightM: number,
  colour: string,
  massKg: number,
): KitInput {
  return {
    name,
    quantity,
    note: '',
    body: { kind: 'panel', numbers: { use, widthM, heightM, colour, massKg: assumed(massKg, GUESS) } },
  }
}

const PANELS: readonly KitInput[] = [
  panel('White panel 1 × 1.5 m', 2, 'panel', 1, 1.5, '#ffffff', 1.5),
  panel('Silver panel 1 × 1.5 m', 1, 'panel', 1, 1.5, '#d9dbde', 1.5),
  panel('Black panel 1 × 2 m', 2, 'flag', 1, 2, '#1f1c1a', 2),
]

const SUPPORTS: readonly KitInput[] = [
  support('2.4 m stand', 4, 'stand', 2.4, 2.5),
  support('3.3 m stand', 2, 'stand', 3.3, 6),
  support('Boom arm', 1, 'boom', 3, 3),
  support('Floor stand', 2, 'floor stand', 0.6, 4),
  support('Clamp', 2, 'clamp', 2.5, 1.5),
  support('Magic arm', 1, 'magic arm', 2.5, 1),
]

/**
 * Kit for a studio that has typed none yet: generic heads, modifiers, gels and supports, each number marked as
 * published, measured or assumed with its source. Lengths in metres, masses in kg, guide numbers at ISO 100.
 */
export const STARTER_KIT: readonly KitInput[] = [...UNITS, ...MODIFIERS, ...GELS, ...SUPPORTS, ...PANELS]
