import { randomUUID } from 'node:crypto'
import { eq } from 'drizzle-orm'
import type pg from 'pg'
import sharp from 'sharp'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { type ShootId, type UploadId, uploadIdSchema } from '#shared/ids.ts'
import type { Actor } from '#server/context.ts'
import { type Db, connectDatabase } from '#server/db/client.ts'
import { blob, rendition, upload } from '#server/db/schema/uploads.ts'
import { AppError } from '#server/errors.ts'
import { storeUpload } from '#server/features/uploads/store-upload.ts'
import { createTestDatabase } from '#tests/support/database.ts'
import { makeCtx, makePerson, makeShoot, memoryDocuments } from '#tests/support/media-world.ts'
import { cameraJpeg, claimingPng, twoTone } from '#tests/support/pictures.ts'
import type { TestDatabase } from '#tests/support/template.ts'

let database: TestDatabase
let db: Db
let pool: pg.Pool
let stylist: Actor
let crew: Actor
let stranger: Actor
let shootId: ShootId
const documents = memoryDocuments()

beforeAll(async () => {
  database = await createTestDatabase()
  ;({ db, pool } = connectDatabase(database.url, () => undefined))
  stylist = await makePerson(db, 'Sten Okoro')
  crew = await makePerson(db, 'Cato Wren')
  stranger = await makePerson(db, 'Nobody Here')
  shootId = await makeShoot(db, [
    [stylist, 'stylist'],
    [crew, 'crew'],
  ])
})

afterAll(async () => {
  await pool.end()
  await database.drop()
})

const newUploadId = (): UploadId => uploadIdSchema.parse(randomUUID())
const store = (bytes: Uint8Array, uploadId = newUploadId(), actor: Actor | null = stylist, shoot = shootId) =>
  storeUpload(makeCtx(db, documents, actor), { shootId: shoot, uploadId, bytes })

async function refusal(promise: Promise<unknown>): Promise<AppError> {
  const error: unknown = await promise.then(
    () => undefined,
    (caught: unknown) => caught,
  )
  if (!(error instanceof AppError)) throw new Error(`expected a refusal, got ${String(error)}`)
  return error
}

describe('storeUpload', () => {
  it('keeps size, palette, exposure and three renditions of a picture', async () => {
    const kept = await store(await cameraJpeg())
    expect(kept).toMatchObject({ widthPx: 1200, heightPx: 800, exposure: 'f/5.6 · 1/200 · 85 mm · ISO 100' })
    expect(kept.palette).toHaveLength(2)
    const rows = await db
      .select()
      .from(rendition)
      .where(eq(rendition.sha256, kept.sha256))
      .orderBy(rendition.longEdgePx)
    expect(rows.map((row) => row.longEdgePx)).toEqual([320, 960, 2048])
    const sizes = await Promise.all(rows.map((row) => sharp(Buffer.from(row.bytes)).metadata()))
    // Never enlarged: the largest is the picture itself.
    expect(sizes.map(({ format, width, height }) => [format, width, height])).toEqual([
      ['webp', 320, 213],
      ['webp', 960, 640],
      ['webp', 1200, 800],
    ])
  })

  it('keeps no position, owner or serial number, in the row and in what is shown', async () => {
    const kept = await store(await cameraJpeg())
    const [row] = await db.select().from(upload).where(eq(upload.id, kept.id))
    expect(row?.exif).toEqual({
      make: 'Maker',
      model: 'Model One',
      takenAt: '2026:05:04 10:11:12',
      fNumber: 5.6,
      exposureTimeS: 0.005,
      focalLengthMm: 85,
      iso: 100,
    })
    const shown = await db.select().from(rendition).where(eq(rendition.sha256, kept.sha256))
    for (const { bytes } of shown) {
      const metadata = await sharp(Buffer.from(bytes)).metadata()
      expect(metadata.exif).toBeUndefined()
      expect(Buffer.from(bytes).includes('PLANTED')).toBe(false)
    }
  })

  it('turns a picture upright', async () => {
    const kept = await store(await cameraJpeg(6))
    expect([kept.widthPx, kept.heightPx]).toEqual([800, 1200])
    const [small] = await db
      .select()
      .from(rendition)
      .where(eq(rendition.sha256, kept.sha256))
      .orderBy(rendition.longEdgePx)
    const { width, height } = await sharp(Buffer.from(small?.bytes ?? [])).metadata()
    expect([width, height]).toEqual([213, 320])
  })

  it.each(['png', 'webp', 'avif'] as const)('takes %s', async (format) => {
    const bytes = await sharp(await twoTone('#8e6a22', '#23304a', 200, 100))
      .toFormat(format)
      .toBuffer()
    const kept = await store(bytes)
    expect([kept.widthPx, kept.heightPx]).toEqual([200, 100])
  })

  it('answers the same when the same file comes again under its id', async () => {
    const bytes = await twoTone('#101010', '#f0f0f0')
    const uploadId = newUploadId()
    const [first, again] = await Promise.all([store(bytes, uploadId), store(bytes, uploadId)])
    expect(again).toEqual(first)
    expect(await store(bytes, uploadId)).toEqual(first)
  })

  it('keeps the same file once for two shoots', async () => {
    const bytes = await twoTone('#305040', '#c0b090')
    const other = await makeShoot(db, [[stylist, 'photographer']])
    const [first, second] = [await store(bytes), await store(bytes, newUploadId(), stylist, other)]
    expect(second.sha256).toBe(first.sha256)
    expect(second.palette).toEqual(first.palette)
    expect(await db.select({ sha256: blob.sha256 }).from(blob).where(eq(blob.sha256, first.sha256))).toHaveLength(1)
  })

  it('refuses another picture, or another shoot, under a taken id', async () => {
    const uploadId = newUploadId()
    const bytes = await twoTone('#402010', '#e0e0d0')
    await store(bytes, uploadId)
    const other = await makeShoot(db, [[stylist, 'photographer']])
    expect((await refusal(store(await twoTone('#000000', '#ffffff'), uploadId))).code).toBe('CONFLICT')
    expect((await refusal(store(bytes, uploadId, stylist, other))).code).toBe('CONFLICT')
  })

  it('hides the shoot from a stranger and refuses crew and who is signed out', async () => {
    const bytes = await twoTone('#402010', '#e0e0d0')
    expect((await refusal(store(bytes, newUploadId(), stranger))).code).toBe('NOT_FOUND')
    expect((await refusal(store(bytes, newUploadId(), crew))).code).toBe('FORBIDDEN')
    expect((await refusal(store(bytes, newUploadId(), null))).code).toBe('SIGNED_OUT')
  })

  it.each([
    [
      'an SVG',
      Buffer.from('<?xml version="1.0"?><svg xmlns="http://www.w3.org/2000/svg"><script/></svg>'),
      /SVG drawing.*JPEG, PNG, WebP or AVIF/,
    ],
    ['a GIF', Buffer.from('GIF89a\x01\x00\x01\x00\x00\x00\x00;', 'latin1'), /a GIF/],
    ['text named .jpg', Buffer.from('Not a picture at all, only words.\n'), /a text file/],
    ['a ZIP archive renamed', Buffer.from('PK\x03\x04\x14\x00\x00\x00', 'latin1'), /ZIP archive/],
    [
      'a HEIC picture',
      Buffer.from('\x00\x00\x00\x18ftypheic\x00\x00\x00\x00mif1heic', 'latin1'),
      /HEIC.*most compatible/,
    ],
    ['a film', Buffer.from('\x00\x00\x00\x18ftypisom\x00\x00\x00\x00isommp42', 'latin1'), /a film/],
    ['an empty file', Buffer.alloc(0), /an empty file/],
    ['a JPEG of a header only', Buffer.from('\xff\xd8\xff\xe0', 'latin1'), /broken or not complete/],
  ])('refuses %s with a sentence', async (_what, bytes, sentence) => {
    const error = await refusal(store(bytes))
    expect(error.code).toBe('UNSUPPORTED')
    expect(error.message).toMatch(sentence)
  })

  it('refuses a truncated JPEG', async () => {
    const whole = await cameraJpeg()
    const error = await refusal(store(whole.subarray(0, Math.round(whole.length * 0.6))))
    expect([error.code, error.message]).toEqual(['UNSUPPORTED', expect.stringContaining('broken or not complete')])
  })

  it('refuses a header of 40,000 × 40,000 pixels before decoding, naming the size', async () => {
    const error = await refusal(store(claimingPng(40_000, 40_000)))
    expect(error.code).toBe('TOO_LARGE')
    expect(error.message).toContain('40,000 × 40,000 pixels')
    expect(error.message).toContain('100 million')
  })
})
