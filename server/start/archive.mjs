import { createHash } from 'node:crypto'
import { createReadStream } from 'node:fs'
import { open } from 'node:fs/promises'
import { Plain } from './say.mjs'

// A backup file is a pg_dump archive (pg_restore reads it as it is), then a manifest as JSON, then 32 bytes:
// the manifest's length as 15 decimal digits, a blank, and a mark. The manifest says what a restored database has
// to come out as.

const MARK = 'SCONCE-BACKUP-1\n'
const END_BYTES = 16 + MARK.length

/**
 * @typedef {{ rows: string, content: string }} TableSum
 * @typedef {{
 *   madeAt: string,
 *   postgres: string,
 *   lastMigrationMs: number,
 *   dumpBytes: number,
 *   dumpSha256: string,
 *   tables: Record<string, TableSum>,
 *   sequences: Record<string, string>,
 * }} Manifest
 */

/**
 * Adds the manifest to a finished dump and sees it onto the disk.
 *
 * @param {string} file
 * @param {Omit<Manifest, 'dumpBytes' | 'dumpSha256'>} facts
 * @returns {Promise<Manifest>}
 */
export async function sealArchive(file, facts) {
  const { bytes, sha256 } = await sumOf(file)
  const manifest = { ...facts, dumpBytes: bytes, dumpSha256: sha256 }
  const json = Buffer.from(JSON.stringify(manifest))
  const handle = await open(file, 'a')
  try {
    await handle.writeFile(Buffer.concat([json, Buffer.from(`${String(json.length).padStart(15, '0')} ${MARK}`)]))
    await handle.sync()
  } finally {
    await handle.close()
  }
  return manifest
}

/**
 * Reads and checks a whole backup file: throws for anything that is not one, or not all of one.
 *
 * @param {string} file
 * @returns {Promise<Manifest>}
 */
export async function readArchive(file) {
  const manifest = await readManifest(file)
  const { bytes, sha256 } = await sumOf(file, manifest.dumpBytes)
  if (bytes !== manifest.dumpBytes || sha256 !== manifest.dumpSha256) {
    throw new Plain(`${file} is damaged: its content does not match its own checksum. Nothing was changed.`)
  }
  return manifest
}

/** @param {string} file @returns {Promise<Manifest>} */
async function readManifest(file) {
  const handle = await open(file, 'r').catch((error) => {
    throw new Plain(`${file} cannot be read: ${String(error.message)}. Nothing was changed.`)
  })
  try {
    const { size } = await handle.stat()
    const end = await readAt(handle, Math.max(0, size - END_BYTES), Math.min(size, END_BYTES))
    const length = Number(end.subarray(0, 15).toString('latin1'))
    if (end.subarray(16).toString('latin1') !== MARK || !Number.isInteger(length) || length > size - END_BYTES) {
      throw new Plain(`${file} is not a backup of Sconce, or its end is missing. Nothing was changed.`)
    }
    const json = await readAt(handle, size - END_BYTES - length, length)
    const manifest = JSON.parse(json.toString('utf8'))
    if (manifest.dumpBytes !== size - END_BYTES - length) throw new SyntaxError('wrong length')
    return manifest
  } catch (error) {
    if (error instanceof SyntaxError)
      throw new Plain(`${file} is damaged: its manifest cannot be read. Nothing was changed.`)
    throw error
  } finally {
    await handle.close()
  }
}

/**
 * @param {import('node:fs/promises').FileHandle} handle
 * @param {number} position
 * @param {number} length
 */
async function readAt(handle, position, length) {
  const buffer = Buffer.alloc(length)
  await handle.read(buffer, 0, length, position)
  return buffer
}

/**
 * @param {string} file
 * @param {number} [bytesWanted] how many from the start; all when left out
 */
async function sumOf(file, bytesWanted) {
  const hash = createHash('sha256')
  let bytes = 0
  if (bytesWanted !== 0) {
    for await (const part of createReadStream(file, bytesWanted === undefined ? {} : { end: bytesWanted - 1 })) {
      hash.update(part)
      bytes += part.length
    }
  }
  return { bytes, sha256: hash.digest('hex') }
}

/**
 * The dump inside a backup file, as a stream for pg_restore.
 *
 * @param {string} file
 * @param {Manifest} manifest
 */
export function dumpStream(file, manifest) {
  return createReadStream(file, { end: manifest.dumpBytes - 1 })
}
