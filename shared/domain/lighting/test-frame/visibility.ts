import { across, facing } from './shade.ts'
import type { Spot } from './spot.ts'
import type { Stage, StagedEmitter } from './stage.ts'
import { isShaded } from './trace.ts'

/** Emitters that look smaller than this are sampled once. */
const POINT_SIZE = 0.02

/** Point `index` of an even sequence on a face, half sides (Roberts' R2). */
export const onFace = { u: 0, v: 0 }
export function facePoint(index: number, isRound: boolean): void {
  const a = (index * 0.7548776662466927 + 0.5) % 1
  const b = (index * 0.5698402909980532 + 0.5) % 1
  if (!isRound) {
    onFace.u = a * 2 - 1
    onFace.v = b * 2 - 1
    return
  }
  const r = Math.sqrt(a)
  const turn = b * 2 * Math.PI
  onFace.u = r * Math.cos(turn)
  onFace.v = r * Math.sin(turn)
}

/**
 * Share of an emitter's face that a spot sees, by `rays` rays beginning with number `first` of the sequence, every
 * `stride`th: neighbours take different ones, which are put together afterwards.
 */
export function visibleShare(
  stage: Stage,
  emitter: StagedEmitter,
  spot: Spot,
  rays: number,
  first: number,
  stride: number,
): number {
  const cx = emitter.at[0] - spot.x
  const cy = emitter.at[1] - spot.y
  const cz = emitter.at[2] - spot.z
  const distance = Math.sqrt(cx * cx + cy * cy + cz * cz)
  if (distance < 1e-4) return 0
  const size = Math.max(emitter.widthM, emitter.heightM)
  const slack = size / distance + Math.max(0.05, spot.wrapR)
  if ((spot.gx * cx + spot.gy * cy + spot.gz * cz) / distance < -slack) return 0
  if (emitter.shape !== 'ball' && emitter.axis[0] * cx + emitter.axis[1] * cy + emitter.axis[2] * cz >= 0) return 0
  const px = spot.x + spot.gx * spot.liftM
  const py = spot.y + spot.gy * spot.liftM
  const pz = spot.z + spot.gz * spot.liftM
  facing(emitter, cx / distance, cy / distance, cz / distance)
  const { ux, uy, uz, vx, vy, vz } = across
  const halfW = emitter.widthM / 2
  const halfH = emitter.heightM / 2
  const many = size / distance < POINT_SIZE ? 1 : rays
  let open = 0
  for (let ray = 0; ray < many; ray++) {
    facePoint(many === 1 ? 0 : first + ray * stride, emitter.shape !== 'rectangle')
    const u = many === 1 ? 0 : onFace.u * halfW
    const v = many === 1 ? 0 : onFace.v * halfH
    const qx = emitter.at[0] + ux * u + vx * v
    const qy = emitter.at[1] + uy * u + vy * v
    const qz = emitter.at[2] + uz * u + vz * v
    if (!isShaded(stage, px, py, pz, qx, qy, qz, -1)) open++
  }
  return open / many
}
