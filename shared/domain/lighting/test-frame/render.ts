import type { Scene } from './scene.ts'
import { addEmitter, addMirroredRoom, roomExposure, sent } from './shade.ts'
import { sheetExposures, sheetFactor, sheetVisible } from './sheet.ts'
import { FINE, ROUGH, stageOf, type Stage } from './stage.ts'
import { emptySpot, type Spot } from './spot.ts'
import { surfaceAt } from './surface.ts'
import { emptyHit, openness, trace } from './trace.ts'
import { visibleShare } from './visibility.ts'

/** Name of the layer of the light that is there anyway, for one lx·s of it. */
export const AMBIENT = 'ambient'

/**
 * A picture as layers: for each light what it alone would give at full power without gels, and one for ambient light.
 * Linear, reflectance × exposure in lx·s (cd for lamps: per second), red, green and blue by rows from the top left.
 * Any picture of the setup is a weighed sum of them.
 */
export type Layers = {
  width: number
  height: number
  ids: readonly string[]
  layers: readonly Float32Array[]
}

export type Quality = 'rough' | 'fine' | 'finest'

type Settings = {
  /** Rays from a spot to each light; neighbouring pixels take different ones and share. */
  rays: number
  /** More looks into a pixel where something ends. */
  looks: number
  fineness: typeof FINE
}

const SETTINGS: Readonly<Record<Quality, Settings>> = {
  rough: { rays: 2, looks: 0, fineness: ROUGH },
  fine: { rays: 5, looks: 3, fineness: FINE },
  finest: { rays: 8, looks: 7, fineness: { headM: 0.003, bodyM: 0.009, propM: 0.006 } },
}

/** Pixels beyond which neighbours no longer share what they see of a light. */
const SHARE_PX = 2
/** Rows worked on at a time. */
const BAND_ROWS = 24
/** Rays of neighbours in a square of this side are different. */
const TILE = 4

export function emptyLayers(scene: Scene, width: number, height: number): Layers {
  const ids = [...scene.emitters.map((emitter) => emitter.id), AMBIENT]
  return { width, height, ids, layers: ids.map(() => new Float32Array(width * height * 3)) }
}

type Band = { spots: Spot[]; seen: Uint8Array; depth: Float32Array; mark: Int32Array; open: Float32Array }

/**
 * Computes the rows `fromRow` … `toRow` − 1 of a picture into `into`, band by band; yields the number of the next row
 * after each, so that whoever asked can show it, go on or stop. The same scene gives the same picture.
 */
export function* renderRows(
  scene: Scene,
  quality: Quality,
  into: Layers,
  fromRow = 0,
  toRow = into.height,
  stage: Stage = stageOf(scene, SETTINGS[quality].fineness),
): Generator<number, void, void> {
  const settings = SETTINGS[quality]
  const sheets = sheetExposures(stage)
  const rooms = stage.emitters.map((emitter) => roomExposure(stage, emitter))
  for (let row = fromRow; row < toRow; row += BAND_ROWS) {
    renderBand(stage, settings, sheets, rooms, into, row, Math.min(toRow, row + BAND_ROWS))
    yield Math.min(toRow, row + BAND_ROWS)
  }
}

/** A whole picture at once. */
export function renderFrame(scene: Scene, quality: Quality, width: number, height: number): Layers {
  const layers = emptyLayers(scene, width, height)
  const rows = renderRows(scene, quality, layers)
  while (rows.next().done !== true);
  return layers
}

const hit = emptyHit()
/** Spots of the band at work, filled anew for every one: making them anew would keep the collector busy. */
const spots: Spot[] = []

function look(stage: Stage, into: Layers, column: number, row: number, spot: Spot): { depth: number; mark: number } {
  const { view, lens } = stage.scene
  const across = ((column / into.width) * 2 - 1) * view.tanAcross
  const up = (1 - (row / into.height) * 2) * view.tanUp
  let dx = view.forward[0] + view.right[0] * across + view.up[0] * up
  let dy = view.forward[1] + view.right[1] * across + view.up[1] * up
  let dz = view.forward[2] + view.right[2] * across + view.up[2] * up
  const length = Math.sqrt(dx * dx + dy * dy + dz * dz)
  dx /= length
  dy /= length
  dz /= length
  const [ox, oy, oz] = view.at
  trace(stage, ox, oy, oz, dx, dy, dz, hit)
  if (hit.what === 'nothing') return { depth: Infinity, mark: 0 }
  const { t } = hit
  spot.x = ox + dx * t
  spot.y = oy + dy * t
  spot.z = oz + dz * t
  const depth = t / length
  const pixel = (depth * 2 * view.tanUp) / into.height
  const blur = lens.openingM * Math.abs(depth / lens.focusM - 1)
  surfaceAt(stage, hit, spot, Math.max(pixel, blur))
  const kinds = { solid: 100 + hit.index * 7, wall: 1, beyond: 2, floor: 3, sheet: 10 + hit.index, nothing: 0 }
  return {
    depth,
    mark: kinds[hit.what] + (spot.hair > 0 ? 1 : spot.mirror > 0.03 && spot.rough < 0.1 ? 2 : spot.wrapR > 0.2 ? 3 : 0),
  }
}

/** Light of every layer from one spot to the lens, added to a pixel with a weight. */
function addSpot(
  stage: Stage,
  spot: Spot,
  open: number,
  visible: (emitter: number) => number,
  visibleSheet: (sheet: number) => number,
  sheets: ReturnType<typeof sheetExposures>,
  rooms: readonly number[],
  into: Layers,
  pixel: number,
  weight: number,
): void {
  const { view } = stage.scene
  let vx = view.at[0] - spot.x
  let vy = view.at[1] - spot.y
  let vz = view.at[2] - spot.z
  const length = Math.sqrt(vx * vx + vy * vy + vz * vz)
  vx /= length
  vy /= length
  vz /= length
  const upward = open * (0.78 + 0.22 * spot.ny)
  const factors = stage.sheets.map((_, index) => {
    const factor = sheetFactor(stage, index, spot)
    return factor === 0 ? 0 : factor * visibleSheet(index)
  })
  for (let index = 0; index < stage.emitters.length; index++) {
    const emitter = stage.emitters[index]
    const layer = into.layers[index]
    if (!emitter || !layer) continue
    let all = (rooms[index] ?? 0) * upward
    sent.r = sent.g = sent.b = 0
    addEmitter(emitter, spot, vx, vy, vz, visible(index))
    if (spot.isTinted) addMirroredRoom(stage, emitter, spot, vx, vy, vz)
    let r = sent.r
    let g = sent.g
    let b = sent.b
    for (let s = 0; s < factors.length; s++) {
      const factor = factors[s] ?? 0
      const sheet = stage.sheets[s]
      if (factor === 0 || !sheet) continue
      const given = sheets[s]?.[index]?.[factor > 0 ? 0 : 1] ?? 0
      const amount = Math.abs(factor) * given
      r += spot.r * amount * sheet.colour[0]
      g += spot.g * amount * sheet.colour[1]
      b += spot.b * amount * sheet.colour[2]
    }
    if (spot.isTinted) all *= 0.3
    layer[pixel] = (layer[pixel] ?? 0) + (r + spot.r * all) * weight
    layer[pixel + 1] = (layer[pixel + 1] ?? 0) + (g + spot.g * all) * weight
    layer[pixel + 2] = (layer[pixel + 2] ?? 0) + (b + spot.b * all) * weight
  }
  const ambient = into.layers[stage.emitters.length]
  if (!ambient) return
  const share = (spot.isTinted ? 2.4 : 1) * upward * weight
  ambient[pixel] = (ambient[pixel] ?? 0) + spot.r * share
  ambient[pixel + 1] = (ambient[pixel + 1] ?? 0) + spot.g * share
  ambient[pixel + 2] = (ambient[pixel + 2] ?? 0) + spot.b * share
}

function renderBand(
  stage: Stage,
  settings: Settings,
  sheets: ReturnType<typeof sheetExposures>,
  rooms: readonly number[],
  into: Layers,
  fromRow: number,
  toRow: number,
): void {
  const { width, height } = into
  const top = Math.max(0, fromRow - SHARE_PX)
  const bottom = Math.min(height, toRow + SHARE_PX)
  const count = width * (bottom - top)
  while (spots.length < count) spots.push(emptySpot())
  const band: Band = {
    spots,
    seen: new Uint8Array(count),
    depth: new Float32Array(count),
    mark: new Int32Array(count),
    open: new Float32Array(count),
  }
  for (let row = top; row < bottom; row++) {
    for (let column = 0; column < width; column++) {
      const at = (row - top) * width + column
      const spot = band.spots[at]
      if (!spot) continue
      const { depth, mark } = look(stage, into, column + 0.5, row + 0.5, spot)
      band.seen[at] = mark === 0 ? 0 : 1
      band.depth[at] = depth
      band.mark[at] = mark
    }
  }
  const shares = stage.emitters.map((emitter) =>
    sharedVisibility(band, width, top, bottom, fromRow, toRow, (spot, first) =>
      visibleShare(stage, emitter, spot, settings.rays, first, TILE * TILE),
    ),
  )
  const sheetShares = stage.sheets.map((_, index) =>
    sharedVisibility(band, width, top, bottom, fromRow, toRow, (spot, first) =>
      sheetVisible(stage, index, spot, settings.rays, first, TILE * TILE),
    ),
  )
  const extra = emptySpot()
  for (let row = fromRow; row < toRow; row++) {
    for (let column = 0; column < width; column++) {
      const at = (row - top) * width + column
      const spot = band.spots[at]
      const pixel = (row * width + column) * 3
      for (const layer of into.layers) layer[pixel] = layer[pixel + 1] = layer[pixel + 2] = 0
      const looks = settings.looks > 0 && isEdge(band, width, top, bottom, column, row) ? settings.looks : 0
      const weight = 1 / (1 + looks)
      if (spot && band.seen[at] === 1) {
        const open = openness(stage, spot.x, spot.y, spot.z, spot.gx, spot.gy, spot.gz)
        band.open[at] = open
        addSpot(
          stage,
          spot,
          open,
          (emitter) => shares[emitter]?.[at] ?? 0,
          (sheet) => sheetShares[sheet]?.[at] ?? 0,
          sheets,
          rooms,
          into,
          pixel,
          weight,
        )
      }
      for (let i = 0; i < looks; i++) {
        const dx = ((i + 1) * 0.7548776662466927 + 0.5) % 1
        const dy = ((i + 1) * 0.5698402909980532 + 0.5) % 1
        const { mark } = look(stage, into, column + dx, row + dy, extra)
        if (mark === 0) continue
        const first = (column * 7 + row * 13 + i * 5) % (TILE * TILE)
        addSpot(
          stage,
          extra,
          band.open[at] || 1,
          (index) => {
            const emitter = stage.emitters[index]
            return emitter ? visibleShare(stage, emitter, extra, Math.max(2, settings.rays >> 1), first, 5) : 0
          },
          (index) => sheetVisible(stage, index, extra, 2, first, 5),
          sheets,
          rooms,
          into,
          pixel,
          weight,
        )
      }
    }
  }
}

/**
 * What each spot of a band sees of a light: a few rays each, then shared among neighbours on the same surface. What is
 * shared depends on where the spots lie, never on how bright they are, so layers stay linear.
 */
function sharedVisibility(
  band: Band,
  width: number,
  top: number,
  bottom: number,
  fromRow: number,
  toRow: number,
  see: (spot: Spot, first: number) => number,
): Float32Array {
  const raw = new Float32Array(band.seen.length)
  for (let row = top; row < bottom; row++) {
    for (let column = 0; column < width; column++) {
      const at = (row - top) * width + column
      const spot = band.spots[at]
      if (!spot || band.seen[at] === 0) continue
      raw[at] = see(spot, (column % TILE) * TILE + ((row + column * 2) % TILE))
    }
  }
  const shared = new Float32Array(raw.length)
  for (let row = fromRow; row < toRow; row++) {
    for (let column = 0; column < width; column++) {
      const at = (row - top) * width + column
      const spot = band.spots[at]
      if (!spot || band.seen[at] === 0) continue
      const mark = band.mark[at]
      const depth = band.depth[at] ?? 0
      let sum = 0
      let weight = 0
      for (let j = Math.max(top, row - SHARE_PX); j <= Math.min(bottom - 1, row + SHARE_PX); j++) {
        for (let i = Math.max(0, column - SHARE_PX); i <= Math.min(width - 1, column + SHARE_PX); i++) {
          const other = (j - top) * width + i
          const neighbour = band.spots[other]
          if (!neighbour || band.mark[other] !== mark) continue
          if (Math.abs((band.depth[other] ?? 0) - depth) > depth * 0.012) continue
          const alike = spot.gx * neighbour.gx + spot.gy * neighbour.gy + spot.gz * neighbour.gz
          if (alike < 0.82) continue
          const own = alike * alike
          sum += (raw[other] ?? 0) * own
          weight += own
        }
      }
      shared[at] = weight > 0 ? sum / weight : (raw[at] ?? 0)
    }
  }
  return shared
}

/** Whether something ends in or beside a pixel. */
function isEdge(band: Band, width: number, top: number, bottom: number, column: number, row: number): boolean {
  const at = (row - top) * width + column
  return (
    (column > 0 && differs(band, at, at - 1)) ||
    (column < width - 1 && differs(band, at, at + 1)) ||
    (row > top && differs(band, at, at - width)) ||
    (row < bottom - 1 && differs(band, at, at + width))
  )
}

function differs(band: Band, at: number, other: number): boolean {
  if (band.mark[other] !== band.mark[at]) return true
  const spot = band.spots[at]
  const neighbour = band.spots[other]
  if (!spot || !neighbour) return false
  const depth = band.depth[at] ?? 0
  if (Math.abs((band.depth[other] ?? 0) - depth) > depth * 0.015) return true
  if (spot.gx * neighbour.gx + spot.gy * neighbour.gy + spot.gz * neighbour.gz < 0.78) return true
  return Math.abs(spot.g - neighbour.g) > 0.1 * (spot.g + neighbour.g) + 0.03 && (band.mark[at] ?? 0) >= 100
}
