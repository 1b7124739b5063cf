/** What a file is by its first bytes; its name and what the browser calls it are not asked. */
export type FileKind =
  | { kind: 'picture'; mime: 'image/jpeg' | 'image/png' | 'image/webp' | 'image/avif' }
  | { kind: 'other'; sentence: string }

const KEEP = 'Nothing was kept.'
const FORMATS = 'Save it as JPEG, PNG, WebP or AVIF and add that.'

/**
 * Names a file's type by content. Only the four picture types ever reach the server's decoder; for all others there is
 * a sentence that says what the file is and what to do.
 *
 * @param bytes the file, or at least its first 1024 bytes.
 */
export function fileKind(bytes: Uint8Array): FileKind {
  const text = latin1(bytes.subarray(0, 1024))
  if (text.startsWith('\xff\xd8\xff')) return { kind: 'picture', mime: 'image/jpeg' }
  if (text.startsWith('\x89PNG\r\n\x1a\n')) return { kind: 'picture', mime: 'image/png' }
  if (text.startsWith('RIFF') && text.slice(8, 12) === 'WEBP') return { kind: 'picture', mime: 'image/webp' }
  if (text.slice(4, 8) === 'ftyp') return boxedKind(bytes, text)
  return other(whatItIs(bytes, text))
}

/** AVIF, HEIC and films share a container; its brands say which. */
function boxedKind(bytes: Uint8Array, text: string): FileKind {
  const sizeBytes = new DataView(bytes.buffer, bytes.byteOffset, 4).getUint32(0)
  const brands = text.slice(8, Math.min(Math.max(sizeBytes, 16), 256))
  if (/avi[fs]/.test(brands)) return { kind: 'picture', mime: 'image/avif' }
  if (/hei[cxms]|hev[cxms]|mif1|msf1/.test(brands)) {
    return {
      kind: 'other',
      sentence: `This is a HEIC picture, which cannot be read here. ${KEEP} Choose “most compatible” in the phone’s camera settings, or save the picture as JPEG and add that.`,
    }
  }
  return other('a film')
}

function whatItIs(bytes: Uint8Array, text: string): string {
  if (bytes.length === 0) return 'an empty file'
  if (/^GIF8[79]a/.test(text)) return 'a GIF'
  if (/<svg[\s>]/i.test(text)) return 'an SVG drawing'
  if (text.startsWith('%PDF')) return 'a PDF'
  if (text.startsWith('II*\0') || text.startsWith('MM\0*')) return 'a TIFF or a camera’s raw file'
  if (text.startsWith('PK\x03\x04')) return 'a ZIP archive'
  if (text.startsWith('BM')) return 'a BMP'
  return isText(bytes.subarray(0, 1024)) ? 'a text file' : 'not a picture that can be read here'
}

function other(what: string): FileKind {
  return { kind: 'other', sentence: `This is ${what}. ${KEEP} ${FORMATS}` }
}

function latin1(bytes: Uint8Array): string {
  return String.fromCharCode(...bytes)
}

function isText(bytes: Uint8Array): boolean {
  return bytes.every((byte) => byte >= 0x20 || byte === 0x09 || byte === 0x0a || byte === 0x0d)
}
