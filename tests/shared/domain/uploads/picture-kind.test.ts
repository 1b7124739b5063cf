import { describe, expect, it } from 'vitest'
import { fileKind } from '#shared/domain/uploads/picture-kind.ts'

const bytes = (text: string) => Uint8Array.from(text, (letter) => letter.charCodeAt(0))

describe('fileKind', () => {
  // Signatures as in each format's specification; from memory.
  it.each([
    ['image/jpeg', '\xff\xd8\xff\xe0\x00\x10JFIF'],
    ['image/png', '\x89PNG\r\n\x1a\n\x00\x00\x00\rIHDR'],
    ['image/webp', 'RIFF\x24\x00\x00\x00WEBPVP8 '],
    ['image/avif', '\x00\x00\x00\x20ftypavif\x00\x00\x00\x00mif1avifmiaf'],
    ['image/avif', '\x00\x00\x00\x20ftypmif1\x00\x00\x00\x00mif1avifmiaf'],
  ])('knows %s by its first bytes', (mime, text) => {
    expect(fileKind(bytes(text))).toEqual({ kind: 'picture', mime })
  })

  it.each([
    ['HEIC', '\x00\x00\x00\x18ftypheic\x00\x00\x00\x00mif1heic'],
    ['HEIC', '\x00\x00\x00\x18ftypmif1\x00\x00\x00\x00mif1heic'],
    ['a film', '\x00\x00\x00\x18ftypisom\x00\x00\x00\x00isommp42'],
    ['a GIF', 'GIF89a'],
    ['an SVG drawing', '<?xml version="1.0"?>\n<!-- x --><svg xmlns="http://www.w3.org/2000/svg">'],
    ['a PDF', '%PDF-1.7'],
    ['a TIFF or a camera’s raw file', 'II*\x00\x08'],
    ['a ZIP archive', 'PK\x03\x04'],
    ['a BMP', 'BM\x36\x00'],
    ['a text file', 'Dear client,\n'],
    ['an empty file', ''],
    ['not a picture that can be read here', '\x00\x01\x02\x03'],
  ])('says %s in a sentence with a way out', (what, text) => {
    const kind = fileKind(bytes(text))
    expect(kind).toMatchObject({ kind: 'other', sentence: expect.stringContaining(what) })
    expect(kind).toMatchObject({ sentence: expect.stringContaining('JPEG') })
  })

  it('does not fall for a short file that begins like a container', () => {
    expect(fileKind(bytes('\x00\x00\x00\x18ftyp')).kind).toBe('other')
  })
})
