import Papa from 'papaparse'

/** A row of a file with the number of the line it begins on, counted from 1. */
export type CsvRow = { line: number; cells: string[] }

export type CsvFile =
  | { kind: 'refused'; message: string }
  /** `remarks` say what was unusual about the file. */
  | { kind: 'read'; rows: CsvRow[]; remarks: string[] }

const BOM = '\uFEFF'
/**
 * Cells that spreadsheets would run as a formula get an apostrophe before them, and those that only look as if they
 * had got one get another: reading takes exactly one away again.
 */
const FORMULA = /^'*[=+\-@\t\r\n]/
const ESCAPED = /^'+[=+\-@\t\r\n]/

/** Rows as RFC 4180, safe to open in a spreadsheet, with a mark that tells spreadsheets it is UTF-8. */
export function toCsv(rows: readonly (readonly (string | number)[])[]): string {
  const plain = rows.map((row) => [...row])
  return `${BOM}${Papa.unparse(plain, { newline: '\r\n', escapeFormulae: FORMULA })}\r\n`
}

const MAX_BYTES = 8_000_000
const DELIMITERS = [
  { sign: ',', words: null },
  { sign: ';', words: 'Read with semicolons between the cells.' },
  { sign: '\t', words: 'Read with tabs between the cells.' },
  { sign: '|', words: 'Read with bars between the cells.' },
] as const

/** Reads a file somebody chose, without loading one that is too large. */
export async function readCsvFile(file: Blob, isHead: (cell: string) => boolean): Promise<CsvFile> {
  if (file.size > MAX_BYTES) return tooLarge
  try {
    return readCsv(new Uint8Array(await file.arrayBuffer()), isHead)
  } catch {
    return refused(
      'The file cannot be read: it may have been moved or taken away. Nothing was changed; choose it again.',
    )
  }
}

/**
 * Reads the bytes of a file. The delimiter is the one under which most cells of the first line are heads; lines
 * without anything are left out.
 */
export function readCsv(bytes: Uint8Array, isHead: (cell: string) => boolean): CsvFile {
  if (bytes.length > MAX_BYTES) return tooLarge
  const decoded = decode(bytes)
  if (decoded === null)
    return refused(
      'This is not a table but something else, such as a picture or a spreadsheet’s own file. Save it as CSV and choose that. Nothing was changed.',
    )
  const { text, remark } = decoded
  if (text.trim() === '') return refused('The file is empty. Nothing was changed.')
  const best = DELIMITERS.map((delimiter) => {
    const [first] = Papa.parse<string[]>(text, { delimiter: delimiter.sign, preview: 1 }).data
    return { ...delimiter, heads: (first ?? []).filter((cell) => isHead(unescape(cell))).length }
  }).reduce((most, next) => (next.heads > most.heads ? next : most))
  const parsed = Papa.parse<string[]>(text, { delimiter: best.sign })
  const openQuote = parsed.errors.find((error) => error.type === 'Quotes')
  const rows: CsvRow[] = []
  let line = 1
  for (const cells of parsed.data) {
    if (cells.some((cell) => cell.trim() !== '')) rows.push({ line, cells: cells.map(unescape) })
    line += 1 + cells.reduce((sum, cell) => sum + (cell.match(/\r\n|\n|\r/g)?.length ?? 0), 0)
  }
  if (openQuote)
    return refused(
      `A quotation mark is opened and not closed, or closed in the middle of a cell, near row ${(openQuote.row ?? 0) + 1}. Nothing was changed.`,
    )
  return {
    kind: 'read',
    rows,
    remarks: [...(best.words === null ? [] : [best.words]), ...(remark === null ? [] : [remark])],
  }
}

const refused = (message: string): CsvFile => ({ kind: 'refused', message })
const tooLarge = refused(`The file is larger than ${MAX_BYTES / 1e6} MB, which no such table is. Nothing was changed.`)

function unescape(cell: string): string {
  return ESCAPED.test(cell) ? cell.slice(1) : cell
}

/** Text of a file; null when it is none. */
function decode(bytes: Uint8Array): { text: string; remark: string | null } | null {
  const [first, second] = bytes
  if (first === 0xff && second === 0xfe) return { text: new TextDecoder('utf-16le').decode(bytes), remark: null }
  if (first === 0xfe && second === 0xff) return { text: new TextDecoder('utf-16be').decode(bytes), remark: null }
  if (bytes.includes(0)) return null
  try {
    return { text: new TextDecoder('utf-8', { fatal: true }).decode(bytes), remark: null }
  } catch {
    const odd = bytes.reduce((sum, byte) => sum + (byte < 9 || (byte > 13 && byte < 32) ? 1 : 0), 0)
    if (odd > bytes.length / 100) return null
    return {
      text: new TextDecoder('windows-1252').decode(bytes),
      remark: 'The file is not UTF-8 and was read as Windows text: look at accents and signs.',
    }
  }
}
