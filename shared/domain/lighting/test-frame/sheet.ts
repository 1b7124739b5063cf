import { plainExposure } from './shade.ts'
import type { Spot } from './spot.ts'
import type { Stage } from './stage.ts'
import { isShaded } from './trace.ts'
import { facePoint, onFace } from './visibility.ts'

/** What each sheet gives back of each light on its two sides, for every sheet: [front, back] exposures, lx·s. */
export function sheetExposures(stage: Stage): (readonly [number, number])[][] {
  return stage.sheets.map((sheet, index) =>
    stage.emitters.map((emitter): readonly [number, number] => {
      const [nx, , nz] = sheet.normal
      const side = (emitter.at[0] - sheet.at[0]) * nx + (emitter.at[2] - sheet.at[2]) * nz > 0 ? 1 : -1
      let sum = 0
      for (let i = 0; i < 9; i++) {
        const u = (((i % 3) - 1) / 3) * sheet.widthM
        const x = sheet.at[0] + sheet.along[0] * u
        const y = sheet.at[1] + ((Math.floor(i / 3) - 1) / 3) * sheet.heightM
        const z = sheet.at[2] + sheet.along[2] * u
        if (isShaded(stage, x, y, z, emitter.at[0], emitter.at[1], emitter.at[2], index)) continue
        sum += plainExposure(emitter, x, y, z, nx * side, 0, nz * side) / 9
      }
      return side > 0 ? [sum, 0] : [0, sum]
    }),
  )
}

/** How much of a matt sheet's light a spot gets: Σ cos·cos·dA/(π·s²) over its face; the sign tells the side. */
export function sheetFactor(stage: Stage, index: number, spot: Spot): number {
  const sheet = stage.sheets[index]
  if (!sheet) return 0
  const [nx, , nz] = sheet.normal
  const cells = 4
  const area = (sheet.widthM * sheet.heightM) / (cells * cells)
  let sum = 0
  for (let i = 0; i < cells * cells; i++) {
    const u = (((i % cells) + 0.5) / cells - 0.5) * sheet.widthM
    const v = ((Math.floor(i / cells) + 0.5) / cells - 0.5) * sheet.heightM
    const lx = sheet.at[0] + sheet.along[0] * u - spot.x
    const ly = sheet.at[1] + v - spot.y
    const lz = sheet.at[2] + sheet.along[2] * u - spot.z
    const s2 = lx * lx + ly * ly + lz * lz
    const facingSheet = spot.nx * lx + spot.ny * ly + spot.nz * lz
    if (facingSheet <= 0) continue
    const leaving = -(nx * lx + nz * lz)
    sum += (facingSheet * leaving * area) / (Math.PI * s2 * s2 + area * s2)
  }
  return sum
}

/** Share of a sheet that a spot sees. */
export function sheetVisible(
  stage: Stage,
  index: number,
  spot: Spot,
  rays: number,
  first: number,
  stride: number,
): number {
  const sheet = stage.sheets[index]
  if (!sheet) return 0
  const px = spot.x + spot.gx * spot.liftM
  const py = spot.y + spot.gy * spot.liftM
  const pz = spot.z + spot.gz * spot.liftM
  let open = 0
  for (let ray = 0; ray < rays; ray++) {
    facePoint(first + ray * stride, false)
    const u = (onFace.u * sheet.widthM) / 2
    const qx = sheet.at[0] + sheet.along[0] * u
    const qy = sheet.at[1] + (onFace.v * sheet.heightM) / 2
    const qz = sheet.at[2] + sheet.along[2] * u
    if (!isShaded(stage, px, py, pz, qx, qy, qz, index)) open++
  }
  return open / rays
}
