import { type KitKind, MODIFIER_SHAPES, PANEL_USES, SUPPORT_KINDS } from './schema.ts'

/** How the cells of a column read. `stated` has two more columns beside it: where the number comes from, and its source. */
export type ColumnType =
  | { is: 'stated'; mayBeEmpty?: true }
  | { is: 'number'; mayBeEmpty?: true }
  | { is: 'words' }
  | { is: 'yes or no' }
  | { is: 'power' }
  | { is: 'zoom' }
  | { is: 'readings' }
  | { is: 'one of'; words: readonly string[] }

/** One column of a kind: its head in words, and the key of `body.numbers` that it holds. */
export type Column = { head: string; key: string; type: ColumnType }

const STATED = { is: 'stated' } as const
const MAYBE = { is: 'stated', mayBeEmpty: true } as const
const NUMBER = { is: 'number' } as const
const MASS: Column = { head: 'Mass (kg)', key: 'massKg', type: STATED }
const SIZE: readonly Column[] = [
  { head: 'Width (m)', key: 'widthM', type: NUMBER },
  { head: 'Height (m)', key: 'heightM', type: NUMBER },
]
const BEAM: Column = { head: 'Beam (degrees)', key: 'beamDeg', type: MAYBE }
const LEAST: Column = { head: 'Smallest power', key: 'minPowerDenominator', type: { is: 'power' } }
const REMOTE: Column = { head: 'Power from the camera', key: 'remotePower', type: { is: 'yes or no' } }
const DRAWN: Column = { head: 'Drawn colour', key: 'colour', type: { is: 'words' } }

/** Columns by kind, beside kind, name, how many and note, in the order they are written. Kinds share heads. */
export const KIT_COLUMNS: Readonly<Record<KitKind, readonly Column[]>> = {
  unit: [
    { head: 'Guide number (m)', key: 'guideNumberM', type: STATED },
    { head: 'Guide number by zoom', key: 'zoom', type: { is: 'zoom' } },
    LEAST,
    { head: 'Colour (K)', key: 'flashColourK', type: STATED },
    { head: 'Full pops', key: 'fullPops', type: STATED },
    { head: 'Ready after a full pop (s)', key: 'fullRecycleS', type: STATED },
    MASS,
    REMOTE,
    { head: 'Draws from the mains (W)', key: 'mainsWatts', type: MAYBE },
    { head: 'Sync', key: 'sync', type: { is: 'words' } },
    { head: 'Triggers', key: 'triggers', type: { is: 'words' } },
    { head: 'Meter readings', key: 'metered', type: { is: 'readings' } },
  ],
  lamp: [
    { head: 'Light at a metre (lx)', key: 'luxAtMetre', type: STATED },
    { head: 'Draws (W)', key: 'watts', type: STATED },
    { head: 'Colour (K)', key: 'colourK', type: STATED },
    BEAM,
    LEAST,
    MASS,
    REMOTE,
    { head: 'On the mains', key: 'onMains', type: { is: 'yes or no' } },
  ],
  modifier: [
    { head: 'Shape', key: 'shape', type: { is: 'one of', words: MODIFIER_SHAPES } },
    ...SIZE,
    { head: 'Takes (stops)', key: 'lossStops', type: STATED },
    BEAM,
    MASS,
  ],
  gel: [
    { head: 'Shift (mired)', key: 'miredShift', type: STATED },
    { head: 'Maker prints (mired)', key: 'printedMired', type: { is: 'number', mayBeEmpty: true } },
    { head: 'Lets through (of 1)', key: 'transmission', type: STATED },
    DRAWN,
  ],
  support: [
    { head: 'Support', key: 'kind', type: { is: 'one of', words: SUPPORT_KINDS } },
    { head: 'Lowest (m)', key: 'minHeightM', type: MAYBE },
    { head: 'Goes to (m)', key: 'maxHeightM', type: STATED },
    { head: 'Carries (kg)', key: 'maxLoadKg', type: STATED },
    { head: 'Reach (m)', key: 'reachM', type: MAYBE },
    { head: 'Counterweight at (m)', key: 'counterReachM', type: MAYBE },
    { head: 'Mass of the arm (kg)', key: 'armMassKg', type: MAYBE },
  ],
  panel: [{ head: 'Use', key: 'use', type: { is: 'one of', words: PANEL_USES } }, ...SIZE, DRAWN, MASS],
}

/** What stands behind the head of a stated number for its two other columns. */
export const FROM = ', from'
export const SOURCE = ', source'

export const KIND_HEAD = 'Kind'
export const NAME_HEAD = 'Name'
export const QUANTITY_HEAD = 'How many'
export const NOTE_HEAD = 'Note'
