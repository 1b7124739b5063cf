import { GEL_ROWS } from './gels.ts'
import type { KitInput, ModifierNumbers, PanelNumbers, Stated, SupportNumbers, UnitNumbers } from './schema.ts'

const CLASS = 'typical of this class of head; put in your maker’s figure or a meter reading'
const GUESS = 'common practice, no source; measure yours'
const PLATE = 'typical of this class; the plate on yours decides'
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
  mainsWatts?: number
  sync: string
  triggers: string
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
        mainsWatts: row.mainsWatts === undefined ? null : assumed(row.mainsWatts, PLATE),
        sync: row.sync,
        triggers: row.triggers,
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

type SupportRow = {
  name: string
  quantity: number
  kind: SupportNumbers['kind']
  maxHeightM: number
  minHeightM?: number
  maxLoadKg: number
  reachM?: number
  counterReachM?: number
  armMassKg?: number
  note?: string
}

function support(row: SupportRow): KitInput {
  const known = (value: number | undefined) => (value === undefined ? null : assumed(value, LIMIT))
  return {
    name: row.name,
    quantity: row.quantity,
    note: row.note ?? 'Keep to the maker’s limits for height and load; weigh it down before anything goes up.',
    body: {
      kind: 'support',
      numbers: {
        kind: row.kind,
        maxHeightM: assumed(row.maxHeightM, LIMIT),
        maxLoadKg: assumed(row.maxLoadKg, LIMIT),
        minHeightM: known(row.minHeightM),
        reachM: known(row.reachM),
        counterReachM: known(row.counterReachM),
        armMassKg: known(row.armMassKg),
      },
    },
  }
}

type LampRow = [
  name: string,
  quantity: number,
  luxAtMetre: number,
  watts: number,
  colourK: number,
  beamDeg: number,
  minPowerDenominator: number,
  massKg: number,
  onMains: boolean,
  note: string,
]

function lamp([name, quantity, lux, watts, colourK, beamDeg, minPowerDenominator, massKg, onMains, note]: LampRow) {
  return {
    name,
    quantity,
    note,
    body: {
      kind: 'lamp',
      numbers: {
        luxAtMetre: assumed(lux, CLASS),
        watts: assumed(watts, PLATE),
        colourK: assumed(colourK, CLASS),
        beamDeg: assumed(beamDeg, CLASS),
        minPowerDenominator,
        massKg: assumed(massKg, CLASS),
        remotePower: false,
        onMains,
      },
    },
  } satisfies KitInput
}

const ON_BATTERIES = 'Guide number at the longest zoom. Pops from four cells.'
const ORDINARY_SYNC = 'Up to the camera’s sync speed, often 1/200 s; full power is slowest, about 1/300 s (assumed).'
const FAST_SYNC =
  'Up to the camera’s sync speed; beyond it only in high-speed sync, with two stops or more less light (assumed).'
const BY_CELL = 'Sync cable or hot shoe; sees another flash go off (optical cell). Power is set on the head.'
const BY_RADIO = 'Radio from the camera, in groups; hot shoe; optical cell.'
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
    sync: ORDINARY_SYNC,
    triggers: BY_CELL,
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
    sync: FAST_SYNC,
    triggers: BY_RADIO,
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
    sync: FAST_SYNC,
    triggers: BY_RADIO,
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
    sync: FAST_SYNC,
    triggers: BY_RADIO,
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
    mainsWatts: 1000,
    sync: ORDINARY_SYNC,
    triggers: 'Sync cable; optical cell. Power is set on the head.',
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

const SUPPORTS: readonly KitInput[] = (
  [
    { name: '2.4 m stand', quantity: 4, kind: 'stand', minHeightM: 0.8, maxHeightM: 2.4, maxLoadKg: 2.5 },
    { name: '3.3 m stand', quantity: 2, kind: 'stand', minHeightM: 1.1, maxHeightM: 3.3, maxLoadKg: 6 },
    {
      name: 'Boom arm',
      quantity: 1,
      kind: 'boom',
      minHeightM: 1,
      maxHeightM: 3,
      maxLoadKg: 3,
      reachM: 1.5,
      counterReachM: 0.5,
      armMassKg: 1,
      note: 'Goes on a stand that carries head, arm and counterweight together. Balance it before it goes up, bag the base, and nobody stands under it. Keep to the makers’ limits.',
    },
    { name: 'Floor stand', quantity: 2, kind: 'floor stand', minHeightM: 0.2, maxHeightM: 0.6, maxLoadKg: 4 },
    {
      name: 'Floor plate',
      quantity: 2,
      kind: 'floor plate',
      minHeightM: 0.05,
      maxHeightM: 0.15,
      maxLoadKg: 3,
      note: 'Lies where people walk: mark it and tape the cable.',
    },
    { name: 'Clamp', quantity: 2, kind: 'clamp', maxHeightM: 2.5, maxLoadKg: 1.5 },
    { name: 'Magic arm', quantity: 1, kind: 'magic arm', maxHeightM: 2.5, maxLoadKg: 1 },
    {
      name: 'Held by hand',
      quantity: 1,
      kind: 'hand',
      minHeightM: 0.3,
      maxHeightM: 2.2,
      maxLoadKg: 2,
      note: 'Somebody holds it: plan a pair of hands for it, and rests.',
    },
  ] satisfies SupportRow[]
).map(support)

const REFLECTOR = 'With the standard reflector.'
const LAMPS: readonly KitInput[] = (
  [
    ['LED lamp 60 W', 1, 5000, 75, 5600, 60, 100, 1.2, false, `${REFLECTOR} About an hour on its battery (assumed).`],
    ['LED lamp 150 W', 1, 12000, 180, 5600, 60, 100, 2.4, true, REFLECTOR],
    ['LED panel 30 × 30 cm', 2, 1500, 35, 5600, 110, 100, 1.3, false, ''],
    [
      'Tungsten lamp 650 W',
      1,
      7000,
      650,
      3200,
      50,
      1,
      3,
      true,
      'Gets very hot: keep cloth, paper and hands off it. The venue’s circuit decides, ask a licensed electrician.',
    ],
    ['Household bulb 9 W', 2, 65, 9, 2700, 200, 1, 0.1, true, 'About 800 lm all round: 800 / 4π is 64 lx at a metre.'],
  ] satisfies LampRow[]
).map(lamp)

/**
 * Kit for a studio that has typed none yet: generic heads, lamps, modifiers, gels, supports and panels, each number marked as
 * published, measured or assumed with its source. Lengths in metres, masses in kg, guide numbers at ISO 100.
 */
export const STARTER_KIT: readonly KitInput[] = [...UNITS, ...LAMPS, ...MODIFIERS, ...GELS, ...SUPPORTS, ...PANELS]
