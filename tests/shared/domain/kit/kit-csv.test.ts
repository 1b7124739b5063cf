import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { kitItemIdSchema } from '#shared/ids.ts'
import {
  type KitRow,
  type StoredItem,
  KIT_HEADS,
  isKitHead,
  kitTable,
  readKitTable,
} from '#shared/domain/kit/kit-csv.ts'
import { KIT_KINDS, PROVENANCES, kitInputSchema, meteredSchema } from '#shared/domain/kit/schema.ts'
import { STARTER_KIT } from '#shared/domain/kit/starter.ts'
import { readCsv, toCsv } from '#src/lib/csv.ts'
import { id } from '#tests/support/lighting-sample.ts'

const stored: StoredItem[] = STARTER_KIT.map((item, index) => ({
  ...item,
  id: kitItemIdSchema.parse(id(index + 1)),
  version: 1,
}))
const bytes = (text: string) => new TextEncoder().encode(text)

function readText(text: string, kit: readonly StoredItem[] = stored, most = 2000) {
  const file = readCsv(bytes(text), isKitHead)
  if (file.kind === 'refused') throw new Error(file.message)
  let next = 5000
  return readKitTable(file.rows, kit, () => id(next++), most)
}
function rowsOf(text: string, kit: readonly StoredItem[] = stored): KitRow[] {
  const file = readText(text, kit)
  if (file.kind === 'refused') throw new Error(file.message)
  return file.rows
}
const messagesOf = (row: KitRow | undefined) => (row?.kind === 'bad' ? row.messages.join(' ') : row?.kind)

describe('isKitHead', () => {
  it('knows every head, whatever its case and spaces', () => {
    expect(KIT_HEADS.every(isKitHead)).toBe(true)
    expect([isKitHead('  guide  NUMBER (m) '), isKitHead('Price')]).toEqual([true, false])
  })
})

describe('kitTable', () => {
  it('is a line of heads and a row an item, with where each number comes from beside it', () => {
    const [heads, ...rows] = kitTable(stored)
    expect(heads).toEqual(KIT_HEADS)
    expect(rows).toHaveLength(STARTER_KIT.length)
    const at = (head: string) => rows.find(([, name]) => name === 'Full blue −131')?.[KIT_HEADS.indexOf(head)]
    expect([at('Shift (mired)'), at('Shift (mired), from'), at('Shift (mired), source')]).toEqual([
      -131,
      'published',
      'Rosco Cinegel 3202, published data',
    ])
  })

  it('holds no value that a reader of the table would not give back: nothing changes', () => {
    expect(rowsOf(toCsv(kitTable(stored))).map(({ kind }) => kind)).toEqual(stored.map(() => 'same'))
  })
})

const finite = (min: number, max: number) =>
  fc.double({ min, max, noNaN: true, minExcluded: min === 0 }).map((value) => value + 0)
const prose = (max: number) =>
  fc.oneof(
    fc.string({ unit: 'grapheme', maxLength: max / 4 }),
    fc.constantFrom('-2', '=x', 'a|b\\c', 'two\nlines', ' ', '#1'),
  )
const stated = (min: number, max: number) =>
  fc.record({ value: finite(min, max), from: fc.constantFrom(...PROVENANCES), source: prose(200) })
const name = fc
  .oneof(
    fc.string({ unit: 'grapheme', minLength: 1, maxLength: 30 }),
    fc.constantFrom('-2 gel', 'bare', '#7', "'=x", 'a | b'),
  )
  .filter((text) => text.trim() !== '')
const maybe = <T>(arbitrary: fc.Arbitrary<T>) => fc.option(arbitrary, { nil: null })
const least = fc.integer({ min: 1, max: 1024 })

const modifierBody = fc.record({
  kind: fc.constant('modifier'),
  numbers: fc.record({
    shape: fc.constantFrom('octa', 'beauty dish', 'grid'),
    widthM: finite(0.01, 6),
    heightM: finite(0.01, 6),
    lossStops: stated(-4, 12),
    beamDeg: maybe(stated(1, 360)),
    massKg: stated(0, 100),
  }),
})
const otherBody = fc.oneof(
  fc.record({
    kind: fc.constant('unit'),
    numbers: fc.record({
      guideNumberM: stated(0, 500),
      zoom: fc.uniqueArray(fc.record({ focalMm: finite(10, 400), guideNumberM: finite(0, 500) }), {
        maxLength: 5,
        selector: ({ focalMm }) => focalMm,
      }),
      minPowerDenominator: least,
      flashColourK: stated(1000, 20000),
      fullPops: stated(1, 1e6),
      fullRecycleS: stated(0, 120),
      massKg: stated(0, 100),
      remotePower: fc.boolean(),
      mainsWatts: maybe(stated(0, 20000)),
      sync: prose(200),
      triggers: prose(200),
      metered: fc.array(
        fc.record({
          modifierKitId: maybe(fc.integer({ min: 1, max: 8 }).map(id)),
          zoomMm: maybe(finite(10, 400)),
          guideNumberM: finite(0, 500),
          source: prose(200),
        }),
        { maxLength: 4 },
      ),
    }),
  }),
  fc.record({
    kind: fc.constant('gel'),
    numbers: fc.record({
      miredShift: stated(-500, 500),
      printedMired: maybe(finite(-500, 500)),
      transmission: stated(0, 1),
      colour: fc.constantFrom('#ffffff', '#12abEF'),
    }),
  }),
  fc.record({
    kind: fc.constant('support'),
    numbers: fc.record({
      kind: fc.constantFrom('boom', 'floor plate', 'hand'),
      maxHeightM: stated(5, 15),
      minHeightM: maybe(stated(0, 5)),
      maxLoadKg: stated(0, 500),
      reachM: maybe(stated(0, 15)),
      counterReachM: maybe(stated(0, 15)),
      armMassKg: maybe(stated(0, 100)),
    }),
  }),
  fc.record({
    kind: fc.constant('lamp'),
    numbers: fc.record({
      luxAtMetre: stated(0, 1e7),
      watts: stated(0, 20000),
      colourK: stated(1000, 20000),
      beamDeg: maybe(stated(1, 360)),
      minPowerDenominator: least,
      massKg: stated(0, 100),
      remotePower: fc.boolean(),
      onMains: fc.boolean(),
    }),
  }),
  fc.record({
    kind: fc.constant('panel'),
    numbers: fc.record({
      use: fc.constantFrom('panel', 'flag'),
      widthM: finite(0.01, 10),
      heightM: finite(0.01, 10),
      colour: fc.constant('#d9dbde'),
      massKg: stated(0, 100),
    }),
  }),
)
const kit = fc
  .array(
    fc.record({
      name,
      quantity: fc.integer({ min: 0, max: 999 }),
      note: prose(1000),
      body: fc.oneof(modifierBody, otherBody),
    }),
    { minLength: 1, maxLength: 8 },
  )
  .map((items) =>
    items.map((item, index): StoredItem => ({
      ...kitInputSchema.parse(item),
      id: kitItemIdSchema.parse(id(index + 1)),
      version: index + 1,
    })),
  )

describe('readKitTable', () => {
  it('reads any kit back from its own file as unchanged, names such as “-2 gel” among them', () => {
    fc.assert(
      fc.property(kit, (items) => {
        const rows = rowsOf(toCsv(kitTable(items)), items)
        expect(rows.map((row) => [row.name, messagesOf(row)])).toEqual(items.map((item) => [item.name, 'same']))
      }),
      { numRuns: 300 },
    )
  })

  it('makes the same kit in an empty room, with meter readings at the new modifiers', () => {
    const octa = stored.find((item) => item.name === '90 cm octa')
    const unit = stored[0]
    if (unit?.body.kind !== 'unit') throw new Error('the first of the starter kit is a unit')
    const entry = meteredSchema.parse({
      modifierKitId: octa?.id,
      zoomMm: 50,
      guideNumberM: 21.5,
      source: 'f/5 | at 2 m',
    })
    const measured = { ...unit, body: { ...unit.body, numbers: { ...unit.body.numbers, metered: [entry] } } }
    const rows = rowsOf(toCsv(kitTable([measured, ...stored.slice(1)])), [])
    expect(new Set(rows.map(({ kind }) => kind))).toEqual(new Set(['new']))
    const [first] = rows
    const newOcta = rows.find((row) => row.name === '90 cm octa')
    expect(first?.kind === 'new' && first.input.body.kind === 'unit' && first.input.body.numbers.metered).toEqual([
      { ...entry, modifierKitId: newOcta?.kind === 'new' && newOcta.id },
    ])
  })

  it('says what changes of an item, found by kind and name, and keeps what the file does not speak of', () => {
    const [row] = rowsOf(
      'Kind,Name,Guide number (m),"Guide number (m), from"\nUnit,"Small flash, guide number 58",52,measured',
    )
    expect(row).toMatchObject({
      kind: 'change',
      line: 2,
      version: 1,
      changes: [
        'Guide number (m): 58 → 52',
        'Guide number (m), from: assumed → measured',
        expect.stringContaining('source'),
      ],
      input: { quantity: 4, body: { numbers: { massKg: { value: 0.55 }, minPowerDenominator: 128 } } },
    })
  })

  it('marks a number that somebody typed without saying where it comes from as assumed', () => {
    const [row] = rowsOf('Kind,Name,Shift (mired)\ngel,Full warm +167,170')
    expect(row).toMatchObject({
      kind: 'change',
      input: { body: { numbers: { miredShift: { value: 170, from: 'assumed', source: '' } } } },
    })
  })

  it.each([
    ['lens,Fifty,,', 'Kind: “lens” is none of: unit, lamp, modifier, gel, support, panel.'],
    ['gel,,10,0.5', 'Name: it has none.'],
    ['gel,New,warm,0.5', 'Shift (mired): “warm” is not a number.'],
    [
      'gel,New,10,0',
      'Lets through (of 1): A gel that lets nothing through is a flag: put in a part of 1, such as 0.47.',
    ],
    ['gel,New,10,', 'Lets through (of 1): it is missing; put in the maker’s figure or measure it.'],
    [`gel,${'x'.repeat(1_000_000)},10,0.5`, 'Name: it is too long; at most 120 characters fit.'],
    [`gel,New,${'9'.repeat(1_000_000)},0.5`, `Shift (mired): “${'9'.repeat(40)}…” is not a number.`],
  ])('says what is wrong with a row and reads the others: %#', (line, message) => {
    const rows = rowsOf(`Kind,Name,Shift (mired),Lets through (of 1)\n${line}\ngel,Fine,"−12,5","0,81"`)
    expect(messagesOf(rows[0])).toBe(message)
    expect(rows[1]).toMatchObject({
      kind: 'new',
      line: 3,
      input: { body: { numbers: { miredShift: { value: -12.5 } } } },
    })
  })

  it.each([
    ['unit', 'Guide number (m)', '0', 'put in the maker’s figure or measure it'],
    ['unit', 'Guide number by zoom', '50 mm at 42 m', 'is not a zoom setting such as 50 mm: 42 m'],
    ['unit', 'Guide number by zoom', '5 mm: 42 m', 'between 10 and 400 mm'],
    ['unit', 'Smallest power', 'low', 'not a power such as 1/128'],
    ['unit', 'Power from the camera', 'maybe', 'neither yes nor no'],
    ['unit', 'Meter readings', 'Moon | 50 mm | 40 m | x', 'no modifier “Moon” in the kit or in this file'],
    ['unit', 'Mass (kg), from', 'guessed', '“guessed” is none of: published, measured, assumed'],
    ['unit', 'How many', '-1', 'How many'],
    ['support', 'Lowest (m)', '9', 'swap them'],
    ['support', 'Support', 'ladder', 'is none of: stand'],
  ])('says where a %s is wrong: %s %s', (kind, head, cell, words) => {
    const item = stored.find(({ body }) => body.kind === kind)
    const [row] = rowsOf(
      toCsv([
        ['Kind', 'Name', head],
        [kind, item?.name ?? '', cell],
      ]),
    )
    expect(messagesOf(row)).toContain(words)
    expect(messagesOf(row)).toContain(head.replace(', from', ''))
  })

  it('takes a name once, and knows two items of one name apart', () => {
    const twice = rowsOf('Kind,Name,Shift (mired),Lets through (of 1)\ngel,A,1,1\ngel,B,1,1\ngel,A,2,1')
    expect(twice.map(messagesOf)).toEqual([
      'new',
      'new',
      'The same kind and name stands in line 2 already: keep one of them.',
    ])
    const [gel] = stored.filter(({ body }) => body.kind === 'gel')
    if (!gel) throw new Error('the starter kit has gels')
    const two = [gel, { ...gel, id: kitItemIdSchema.parse(id(900)), note: 'the other box' }]
    expect(rowsOf(toCsv(kitTable(two)), two).map(messagesOf)).toEqual(['same', 'same'])
  })

  it('refuses a file without columns, without rows, or with too many, each with a sentence', () => {
    expect(readKitTable([], [], () => id(1), 10)).toMatchObject({ message: expect.stringContaining('is empty') })
    expect(readText('a,b\n1,2')).toMatchObject({ message: expect.stringContaining('has to name the columns') })
    expect(readText('Kind,Name\n')).toMatchObject({ message: expect.stringContaining('no rows') })
    expect(readText('Kind,Name\ngel,a\ngel,b', stored, 1)).toMatchObject({
      message: expect.stringContaining('has 2 rows; at most 1'),
    })
  })

  it('names the columns it does not know', () => {
    expect(readText('Kind,Name,Price\ngel,Full warm +167,9')).toMatchObject({
      leftOut: ['“Price”'],
      rows: [{ kind: 'same' }],
    })
  })

  it('reads a thousand rows of which every tenth is bad', () => {
    const lines = Array.from({ length: 1000 }, (_, index) => `gel,Gel ${index},${index % 10 === 0 ? 'x' : 10},0.5`)
    const rows = rowsOf(`Kind;Name;Shift (mired);Lets through (of 1)\r\n${lines.join('\r\n').replaceAll(',', ';')}`)
    expect([rows.length, rows.filter(({ kind }) => kind === 'bad').length]).toEqual([1000, 100])
    expect(rows.find(({ kind }) => kind === 'bad')).toMatchObject({ line: 2, name: 'Gel 0' })
  })

  it('has columns for every kind', () => {
    for (const kind of KIT_KINDS) expect(stored.some(({ body }) => body.kind === kind)).toBe(true)
  })
})
