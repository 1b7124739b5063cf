import * as Y from 'yjs'
import type { KitItem } from '#shared/api/kit.ts'
import type {
  Appearance,
  Light,
  LightGel,
  LightModifier,
  LightSupport,
  LightUnit,
  Walled,
} from '#shared/domain/lighting/schema.ts'
import { putItems } from '#shared/realtime/collection.ts'
import { lights, props, setups, sitterPlaces } from '#shared/realtime/documents.ts'
import { STUDY_LOOKS, type StudyPerson } from '../studies/study.ts'
import type { NamedIds } from './named-ids.ts'

type Point = [number, number, number]
type LightRow = {
  purpose: Light['purpose']
  group: string
  unit: string
  modifier?: string
  gels?: string[]
  support: string
  power: number
  at: Point
  aim: Point
  zoomMm?: number
  note?: string
}

const CLOCK_WALL = 'Clock wall, ochre lime plaster'
const DRUM_WALL = 'Dome drum, grey distemper'
/** The rooms about the mark, as the brief measures them, metres. */
const GALLERY: Walled = { leftM: 2.6, rightM: 1.9, frontM: 6.4, ceilingM: 3.2 }
const DOME: Walled = { leftM: 3.6, rightM: 3.9, frontM: 4.7, ceilingM: 6 }

/** Exact f-numbers, N = 2^(Av/2): f/5.6 and f/8 are labels of Av 5 and 6. */
const F5_6 = 2 ** 2.5
const F6_3 = 2 ** (8 / 3)
const F8 = 8

/** Four setups for two rooms. Lights copy the numbers of the studio's own kit. @throws when the kit lacks one of the names. */
export function demoLighting(id: NamedIds, kit: readonly KitItem[], random: () => number): Uint8Array {
  const doc = new Y.Doc()
  const shelf = shelve(kit)

  const setup = (
    name: string,
    label: string,
    rank: string,
    camera: { at: Point; focalMm: number; fNumber: number },
    background: { zM: number; widthM: number; heightM: number; colour: string; what: string },
    rows: readonly LightRow[],
    note: string,
  ) => {
    putItems(
      doc,
      setups,
      [
        {
          id: id(name),
          name: label,
          rank,
          note,
          background: { ...background, surface: 'plaster' },
          walled: background.what === CLOCK_WALL ? GALLERY : DOME,
          camera: { ...camera, iso: 100, shutterS: 1 / 160, whiteBalanceK: 5500, syncS: 1 / 200 },
        },
      ],
      random,
    )
    putItems(
      doc,
      lights,
      rows.map((row, index) => ({
        id: id(`${name}:${row.group}`),
        setupId: id(name),
        purpose: row.purpose,
        group: row.group,
        unit: taken(shelf.units, row.unit),
        modifier: row.modifier === undefined ? null : taken(shelf.modifiers, row.modifier),
        gels: (row.gels ?? []).map((gel) => taken(shelf.gels, gel)),
        support: taken(shelf.supports, row.support),
        power: row.power,
        at: row.at,
        aim: row.aim,
        zoomMm: row.zoomMm ?? null,
        note: row.note ?? '',
        rank: `a${index}`,
      })),
      random,
    )
  }

  setup(
    'setup-octa',
    'Octa left, soft fill',
    'a0',
    { at: [0, 1.35, 3.4], focalMm: 85, fNumber: F6_3 },
    { zM: -2.6, widthM: 6, heightM: 2.9, colour: '#8a6f56', what: CLOCK_WALL },
    [
      {
        purpose: 'main',
        group: 'A',
        unit: 'Battery head 200 Ws',
        modifier: '90 cm octa',
        support: '2.4 m stand',
        power: 1 / 4,
        at: [-1.25, 1.95, 1.15],
        aim: [0, 1.35, 0],
      },
      {
        purpose: 'rim',
        group: 'B',
        unit: 'Small flash, guide number 58',
        modifier: 'Strip 30 × 120 cm',
        support: '2.4 m stand',
        power: 1 / 8,
        at: [2.0, 1.9, -1.1],
        aim: [0, 1.4, 0],
      },
      {
        purpose: 'fill',
        group: 'C',
        unit: 'Small flash, guide number 58',
        modifier: 'Shoot-through umbrella 100 cm',
        support: '2.4 m stand',
        power: 1 / 4,
        at: [0.7, 1.8, 3.2],
        aim: [0, 1.35, 0],
        zoomMm: 35,
      },
    ],
    'Soft and even enough to turn the head; umbrella by the lens and panel lift the far cheek.',
  )
  setup(
    'setup-close',
    'Octa close, brass edge',
    'a1',
    { at: [0.1, 1.3, 2.6], focalMm: 85, fNumber: F5_6 },
    { zM: -2.6, widthM: 6, heightM: 2.9, colour: '#8a6f56', what: CLOCK_WALL },
    [
      {
        purpose: 'main',
        group: 'A',
        unit: 'Battery head 200 Ws',
        modifier: '90 cm octa',
        support: '2.4 m stand',
        power: 1 / 8,
        at: [-0.85, 1.75, 0.85],
        aim: [0, 1.3, 0],
      },
      {
        purpose: 'rim',
        group: 'B',
        unit: 'Small flash, guide number 58',
        modifier: '20° grid',
        gels: ['Quarter warm +42'],
        support: '2.4 m stand',
        power: 1 / 32,
        at: [1.25, 1.9, -1.2],
        aim: [0.1, 1.2, 0],
        zoomMm: 70,
      },
    ],
    'For hands and small brass things.',
  )
  setup(
    'setup-window',
    'Window side, cool wall',
    'a2',
    { at: [-0.1, 1.4, 3.1], focalMm: 85, fNumber: F5_6 },
    { zM: -2.8, widthM: 7, heightM: 3.2, colour: '#6b7076', what: DRUM_WALL },
    [
      {
        purpose: 'main',
        group: 'A',
        unit: 'Battery head 200 Ws',
        modifier: '60 cm softbox',
        support: '2.4 m stand',
        power: 1 / 8,
        at: [1.5, 1.9, 0.6],
        aim: [0, 1.4, 0],
      },
      {
        purpose: 'rim',
        group: 'B',
        unit: 'Small flash, guide number 58',
        modifier: '10° grid',
        support: '2.4 m stand',
        power: 1 / 32,
        at: [-1.3, 2, -0.9],
        aim: [0, 1.45, 0],
        zoomMm: 105,
      },
      {
        purpose: 'background',
        group: 'C',
        unit: 'Small flash, guide number 58',
        gels: ['Full blue −131'],
        support: 'Floor stand',
        power: 1 / 8,
        at: [-1.2, 0.4, -1.4],
        aim: [0.2, 1.6, -2.8],
        zoomMm: 28,
        note: 'Low, behind the pier.',
      },
    ],
    'The softbox stands where a window would.',
  )
  setup(
    'setup-broad',
    'Broad and rim',
    'a3',
    { at: [0, 1.4, 4.6], focalMm: 50, fNumber: F8 },
    { zM: -2.8, widthM: 7, heightM: 3.2, colour: '#6b7076', what: DRUM_WALL },
    [
      {
        purpose: 'main',
        group: 'A',
        unit: 'Battery head 400 Ws',
        modifier: 'White umbrella 110 cm',
        support: '3.3 m stand',
        power: 1 / 2,
        at: [-1.7, 2.3, 2.9],
        aim: [0, 1.2, 0],
      },
      {
        purpose: 'rim',
        group: 'B',
        unit: 'Battery head 200 Ws',
        modifier: 'Strip 30 × 120 cm',
        support: '3.3 m stand',
        power: 1 / 4,
        at: [3.3, 2, -1.2],
        aim: [0, 1.3, 0],
      },
      {
        purpose: 'background',
        group: 'C',
        unit: 'Small flash, guide number 58',
        support: 'Floor stand',
        power: 1 / 16,
        at: [0, 0.5, -1.6],
        aim: [0, 1.6, -2.8],
        zoomMm: 24,
      },
    ],
    'Room for three and for a raised cup.',
  )

  const place = (
    name: string,
    setupName: string,
    who: StudyPerson['who'],
    at: [number, number],
    eyeHeightM: number,
    cut: Appearance['cut'],
    how: { pose?: 'seated'; turnDeg: number; headTurnDeg?: number; headNodDeg?: number },
  ) => ({
    id: id(name),
    setupId: id(setupName),
    sitterId: id(who),
    at,
    eyeHeightM,
    appearance: { ...STUDY_LOOKS[who], cut },
    ...how,
  })
  putItems(
    doc,
    sitterPlaces,
    [
      place('place-octa', 'setup-octa', 'clockmaker', [0, 0], 1.28, 'coat', {
        pose: 'seated',
        turnDeg: -14,
        headTurnDeg: 8,
      }),
      place('place-octa-2', 'setup-octa', 'astronomer', [0.55, -0.2], 1.6, 'coat', { turnDeg: -22, headTurnDeg: 8 }),
      place('place-close', 'setup-close', 'clockmaker', [0, 0], 1.28, 'coat', {
        pose: 'seated',
        turnDeg: 18,
        headTurnDeg: -6,
        headNodDeg: 8,
      }),
      place('place-window', 'setup-window', 'astronomer', [0, 0], 1.55, 'coat', { turnDeg: 24, headTurnDeg: -6 }),
      place('place-broad-1', 'setup-broad', 'astronomer', [0, 0], 1.6, 'cape', { turnDeg: 4 }),
      place('place-broad-2', 'setup-broad', 'clockmaker', [-0.6, 0.1], 1.62, 'coat', { turnDeg: 18, headTurnDeg: -8 }),
      place('place-broad-3', 'setup-broad', 'botanist', [0.6, 0.1], 1.56, 'dress', { turnDeg: -18, headTurnDeg: 10 }),
    ],
    random,
  )
  putItems(
    doc,
    props,
    [
      {
        id: id('panel-octa'),
        setupId: id('setup-octa'),
        kind: 'panel',
        name: 'White panel 1 × 1.5 m',
        at: [1.25, 0.95, 0.8],
        turnDeg: 57,
        widthM: 1,
        heightM: 1.5,
        colour: '#ffffff',
      },
      {
        id: id('globe-window'),
        setupId: id('setup-window'),
        kind: 'prop',
        name: 'Brass armillary',
        shape: 'globe',
        at: [0.62, 0.85, -0.2],
        turnDeg: 0,
        widthM: 0.5,
        heightM: 1.7,
        colour: '#8e6a22',
      },
      {
        id: id('table-broad'),
        setupId: id('setup-broad'),
        kind: 'prop',
        name: 'Tea table',
        shape: 'table',
        at: [0, 0.35, 0.6],
        turnDeg: 0,
        widthM: 1.2,
        heightM: 0.7,
        colour: '#5d3f23',
      },
    ],
    random,
  )
  return Y.encodeStateAsUpdate(doc)
}

/** The kit by kind and name, as a light copies it. */
function shelve(kit: readonly KitItem[]) {
  const units = new Map<string, LightUnit>()
  const modifiers = new Map<string, LightModifier>()
  const gels = new Map<string, LightGel>()
  const supports = new Map<string, LightSupport>()
  for (const { id, version, name, body } of kit) {
    const copy = { kitId: id, version, name }
    switch (body.kind) {
      case 'unit':
        units.set(name, { ...copy, numbers: body.numbers })
        break
      case 'modifier':
        modifiers.set(name, { ...copy, numbers: body.numbers })
        break
      case 'gel':
        gels.set(name, { ...copy, numbers: body.numbers })
        break
      case 'support':
        supports.set(name, { ...copy, numbers: body.numbers })
        break
      case 'lamp':
      case 'panel':
        // The demo's setups write their panels themselves and have no lamps.
        break
    }
  }
  return { units, modifiers, gels, supports }
}

function taken<T>(shelf: ReadonlyMap<string, T>, name: string): T {
  const item = shelf.get(name)
  if (item === undefined) throw new Error(`the starter kit has nothing named ${name}`)
  return item
}
