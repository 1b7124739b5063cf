import { deflateSync } from 'node:zlib'
import { crc32 } from 'node:zlib'
import sharp from 'sharp'

/** A picture in two colours, the left part in the first. */
export async function twoTone(left: string, right: string, widthPx = 800, heightPx = 600): Promise<Buffer> {
  const half = await sharp({
    create: { width: Math.round(widthPx * 0.7), height: heightPx, channels: 3, background: left },
  })
    .png()
    .toBuffer()
  return sharp({ create: { width: widthPx, height: heightPx, channels: 3, background: right } })
    .composite([{ input: half, left: 0, top: 0 }])
    .png()
    .toBuffer()
}

/** A JPEG as a camera writes it: exposure, position, owner and serial numbers in its EXIF. */
export async function cameraJpeg(orientation = 1): Promise<Buffer> {
  return sharp(await twoTone('#8e6a22', '#23304a', 1200, 800))
    .withExif({
      IFD0: { Make: 'Maker', Model: 'Model One', Artist: 'Planted Owner', Copyright: 'Planted Owner' },
      IFD2: {
        FNumber: '56/10',
        ExposureTime: '1/200',
        FocalLength: '85/1',
        ISOSpeedRatings: '100',
        BodySerialNumber: 'PLANTED-SERIAL',
        DateTimeOriginal: '2026:05:04 10:11:12',
      },
      IFD3: { GPSLatitudeRef: 'N', GPSLatitude: '51/1 30/1 0/1', GPSLongitudeRef: 'W', GPSLongitude: '1/1 15/1 0/1' },
    })
    .withMetadata({ orientation })
    .jpeg({ quality: 90 })
    .toBuffer()
}

/** A valid PNG of a few bytes whose header claims this size. */
export function claimingPng(widthPx: number, heightPx: number): Buffer {
  const chunk = (type: string, data: Buffer) => {
    const body = Buffer.concat([Buffer.from(type, 'latin1'), data])
    const framed = Buffer.alloc(body.length + 8)
    framed.writeUInt32BE(data.length, 0)
    body.copy(framed, 4)
    framed.writeUInt32BE(crc32(body), body.length + 4)
    return framed
  }
  const header = Buffer.alloc(13)
  header.writeUInt32BE(widthPx, 0)
  header.writeUInt32BE(heightPx, 4)
  header.set([8, 2, 0, 0, 0], 8)
  return Buffer.concat([
    Buffer.from('\x89PNG\r\n\x1a\n', 'latin1'),
    chunk('IHDR', header),
    chunk('IDAT', deflateSync(Buffer.alloc(1024))),
    chunk('IEND', Buffer.alloc(0)),
  ])
}
