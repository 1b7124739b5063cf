import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { readCsv, toCsv } from '#src/lib/csv.ts'

const bytes = (text: string) => new TextEncoder().encode(text)
const isHead = (cell: string) => ['Kind', 'Name', 'Note'].includes(cell)
const read = (text: string) => readCsv(bytes(text), isHead)

describe('toCsv', () => {
  it('is RFC 4180: CRLF, quotes doubled, cells with commas and breaks quoted', () => {
    // RFC 4180, section 2, rules 1, 6 and 7.
    expect(toCsv([['a', 'b,c', 'd"e', 'f\ng']])).toBe('\uFEFFa,"b,c","d""e","f\ng"\r\n')
  })

  it('lets no cell be a formula, and leaves numbers numbers', () => {
    expect(toCsv([['=1+1', '@x', '+x', '-2 gel', '\t=x', -2, "'=x", '=a\nb']])).toBe(
      `\uFEFF"'=1+1","'@x","'+x","'-2 gel","'\t=x",-2,"''=x","'=a\nb"\r\n`,
    )
  })
})

describe('readCsv', () => {
  it('undoes what toCsv did to any text', () => {
    const cell = fc.oneof(
      fc.string({ unit: 'grapheme' }),
      fc.constantFrom('-2 gel', "'-x", "''=x", '=1', '\t', '\r\n', '"', '', ',;|', ' a '),
    )
    fc.assert(
      fc.property(fc.array(fc.array(cell, { minLength: 3, maxLength: 3 }), { maxLength: 6 }), (body) => {
        const rows = [['Kind', 'Name', 'Note', ''], ...body.map((cells) => [...cells, 'end'])]
        const file = read(toCsv(rows))
        expect(file.kind === 'read' && file.rows.map(({ cells }) => cells)).toEqual(rows)
      }),
    )
  })

  it('counts lines through breaks in cells and empty lines', () => {
    const file = read('Kind,Name\r\nunit,"two\r\nlines"\r\n\r\ngel,x\r\n')
    expect(file.kind === 'read' && file.rows.map(({ line }) => line)).toEqual([1, 2, 5])
  })

  it.each([
    [';', 'Read with semicolons between the cells.'],
    ['\t', 'Read with tabs between the cells.'],
    ['|', 'Read with bars between the cells.'],
  ])('takes %o for the comma and says so', (sign, words) => {
    expect(read(`Kind${sign}Name\nunit${sign}1,5`)).toMatchObject({
      kind: 'read',
      remarks: [words],
      rows: [{ cells: ['Kind', 'Name'] }, { cells: ['unit', '1,5'] }],
    })
  })

  it('reads a byte order mark, line feeds alone, and UTF-16 of spreadsheets', () => {
    expect(read('\uFEFFKind,Name\nunit,x')).toMatchObject({ rows: [{ cells: ['Kind', 'Name'] }, { line: 2 }] })
    const wide = new Uint8Array([0xff, 0xfe, ...[...'Kind\tName'].flatMap((char) => [char.charCodeAt(0), 0])])
    expect(readCsv(wide, isHead)).toMatchObject({ rows: [{ cells: ['Kind', 'Name'] }] })
  })

  it('reads old Windows text and says that it guessed', () => {
    const file = readCsv(new Uint8Array([...bytes('Kind,Name\nunit,Caf'), 0xe9]), isHead)
    expect(file).toMatchObject({
      rows: [{}, { cells: ['unit', 'Café'] }],
      remarks: [expect.stringContaining('Windows text')],
    })
  })

  it('refuses what is empty, a picture, or a sheet’s own file, with a sentence', () => {
    expect(read('')).toMatchObject({ kind: 'refused', message: expect.stringContaining('is empty') })
    expect(read('\r\n\r\n')).toMatchObject({ kind: 'refused', message: expect.stringContaining('is empty') })
    const png = new Uint8Array([0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a, 0, 0, 0, 0x0d])
    const jpeg = new Uint8Array(200).map((_, index) => ((index * 37) % 255) + 1)
    for (const file of [png, jpeg])
      expect(readCsv(file, isHead)).toMatchObject({ kind: 'refused', message: expect.stringContaining('a picture') })
  })

  it('refuses what is too large, and a quotation mark that is never closed', () => {
    expect(readCsv(new Uint8Array(8_000_001), isHead)).toMatchObject({ message: expect.stringContaining('larger') })
    expect(read('Kind,Name\nunit,"x\nunit,y')).toMatchObject({ message: expect.stringContaining('quotation mark') })
  })

  it('reads a cell of a million characters', () => {
    const file = read(`Kind,Name\nunit,${'x'.repeat(1_000_000)}\ngel,y`)
    expect(file.kind === 'read' && file.rows.map(({ cells }) => cells[1]?.length)).toEqual([4, 1_000_000, 1])
  })
})
