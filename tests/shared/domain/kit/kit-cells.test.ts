import { describe, expect, it } from 'vitest'
import { kitItemIdSchema } from '#shared/ids.ts'
import {
  meteredCell,
  quoted,
  readMetered,
  readNumber,
  readOneOf,
  readPower,
  readYesOrNo,
  readZoom,
  zoomCell,
} from '#shared/domain/kit/kit-cells.ts'
import { id } from '#tests/support/lighting-sample.ts'

const valueOf = (read: { ok: true; value: unknown } | { ok: false; message: string }) =>
  read.ok ? read.value : read.message

describe('readNumber', () => {
  it.each([
    ['1.5', 1.5],
    ['1,5', 1.5],
    ['−131', -131],
    [' 12 000 ', 12000],
    ['12 000', 12000],
    ['5e-7', 5e-7],
    ['+8', 8],
  ])('reads %o', (cell, value) => expect(valueOf(readNumber(cell))).toBe(value))

  it.each(['', 'x', '1.2.3', '1,000.5', '0x10', 'Infinity', '1e999', '5 m'])('refuses %o', (cell) => {
    expect(valueOf(readNumber(cell))).toBe(`${quoted(cell)} is not a number`)
  })
})

describe('quoted', () => {
  it('is short, and one line', () => {
    expect(quoted(` two\nlines ${'x'.repeat(90)}`)).toBe(`“two lines ${'x'.repeat(30)}…”`)
  })
})

describe('readYesOrNo', () => {
  it('knows what spreadsheets write', () => {
    expect(['yes', 'TRUE', '1', 'no', 'False', '0'].map((cell) => valueOf(readYesOrNo(cell)))).toEqual([
      true,
      true,
      true,
      false,
      false,
      false,
    ])
    expect(valueOf(readYesOrNo('perhaps'))).toContain('neither yes nor no')
  })
})

describe('readPower', () => {
  it('takes the fraction and its denominator', () => {
    expect(['1/128', ' 1 / 64 ', '256'].map((cell) => valueOf(readPower(cell)))).toEqual([128, 64, 256])
    expect(valueOf(readPower('2/3'))).toContain('such as 1/128')
  })
})

describe('readOneOf', () => {
  it('is one of the words, whatever its case', () => {
    expect(valueOf(readOneOf(' Octa ', ['octa', 'strip']))).toBe('octa')
    expect(valueOf(readOneOf('dish', ['octa', 'strip']))).toBe('“dish” is none of: octa, strip')
  })
})

describe('zoomCell', () => {
  it('is read back by readZoom, which also does without units', () => {
    const zoom = [
      { focalMm: 24, guideNumberM: 28 },
      { focalMm: 105, guideNumberM: 58.5 },
    ]
    expect(zoomCell(zoom)).toBe('24 mm: 28 m; 105 mm: 58.5 m')
    expect(valueOf(readZoom(zoomCell(zoom)))).toEqual(zoom)
    expect(valueOf(readZoom('24:28\n105: 58,5;'))).toEqual(zoom)
    expect(valueOf(readZoom(''))).toEqual([])
    expect(valueOf(readZoom('24 mm'))).toContain('is not a zoom setting')
  })
})

describe('meteredCell', () => {
  const octa = kitItemIdSchema.parse(id(7))
  const gone = kitItemIdSchema.parse(id(8))
  const entries = [
    { modifierKitId: null, zoomMm: 50, guideNumberM: 41.2, source: 'f/8 at 2 m' },
    { modifierKitId: octa, zoomMm: null, guideNumberM: 20, source: 'a | b\\\nc ' },
    { modifierKitId: gone, zoomMm: null, guideNumberM: 20, source: '' },
  ]

  it.each(['90 cm octa', 'bare', '#7', 'a | b'])('is read back by readMetered with a modifier called %o', (name) => {
    const cell = meteredCell(entries, (key) => (key === octa ? name : undefined))
    expect(cell.split('\n')[0]).toBe('bare | 50 mm | 41.2 m | f/8 at 2 m')
    const read = readMetered(
      cell,
      (asked) => (asked === name ? octa : undefined),
      (key) => kitItemIdSchema.safeParse(key).data,
    )
    expect(valueOf(read)).toEqual(entries)
  })

  it('says which modifier is not there, and which line is no reading', () => {
    const read = (cell: string) =>
      valueOf(
        readMetered(
          cell,
          () => undefined,
          () => undefined,
        ),
      )
    expect(read('Moon | 50 mm | 1 m | x')).toBe('there is no modifier “Moon” in the kit or in this file')
    expect(read('#x | 50 mm | 1 m | x')).toContain('no modifier')
    expect(read('bare | 50 mm')).toContain('is not a reading')
  })
})
