import { ease, hash3, noise } from './field.ts'
import { blurred, face, plain, seen, type Spot, tilt } from './spot.ts'
import type { Stage } from './stage.ts'

/** The wall behind the sitter, and the room beyond its edges. */
export function wallSpot(stage: Stage, spot: Spot, blurM: number, isBeyond: boolean): void {
  const { background, seed } = stage.scene
  face(spot, 0, 0, 1)
  if (isBeyond) {
    plain(spot, [0.1, 0.097, 0.094], 1)
    return
  }
  const { x, y } = spot
  const { colour, surface } = background
  switch (surface) {
    case 'paper':
      plain(spot, colour, 1)
      return
    case 'cloth': {
      const drift = 0.6 * noise(x * 1.1, y * 0.6, seed) + 0.25 * noise(x * 3.1, y * 0.9, seed)
      const wave = Math.sin((x + drift * 0.22) * 17) + 0.4 * Math.sin((x + drift * 0.3) * 41)
      plain(spot, colour, 1 + 0.05 * wave + 0.04 * blurred(x, y, seed, 0.03, blurM, 2))
      tilt(spot, 1, 0, 0, 0.42 * Math.cos((x + drift * 0.22) * 17), 0, 1, 0, 0.05 * drift)
      spot.bloom = 0.05
      return
    }
    case 'brick': {
      const high = 0.075
      const long = 0.225
      const row = Math.floor(y / high)
      const shift = (row & 1) * 0.5
      const column = Math.floor(x / long + shift)
      const u = (x / long + shift - column) * long
      const v = y - row * high
      const gap = Math.min(Math.min(u, long - u), Math.min(v, high - v))
      const joint = ease(0.008, 0.004, gap) * seen(0.02, blurM)
      const shade = 0.82 + 0.36 * hash3(row, column, seed)
      const grain = 1 + 0.28 * blurred(x, y, seed, 0.05, blurM, 4)
      plain(spot, colour, (shade * (1 - joint) + 0.75 * joint) * grain)
      if (joint < 0.5)
        tilt(
          spot,
          1,
          0,
          0,
          0.12 * blurred(x + 5, y, seed, 0.02, blurM, 2),
          0,
          1,
          0,
          0.12 * blurred(x, y + 7, seed, 0.02, blurM, 2),
        )
      return
    }
    case 'panelling': {
      const wide = 0.72
      const rail = 0.92
      const column = Math.floor(x / wide + 0.5)
      const u = Math.abs(x - column * wide)
      const upper = y > rail
      const v = upper ? Math.abs(y - rail - 0.86) : Math.abs(y - rail / 2)
      const edge = Math.max(u - wide / 2 + 0.09, v - (upper ? 0.74 : rail / 2 - 0.1))
      const mould = ease(0.022, 0.004, Math.abs(edge)) * seen(0.05, blurM)
      const dado = ease(0.03, 0.01, Math.abs(y - rail)) * seen(0.05, blurM)
      plain(spot, colour, 1 - 0.16 * mould + 0.04 * blurred(x, y, seed, 0.4, blurM, 4))
      const slope = 0.75 * mould * Math.sign(edge)
      const isSide = u - wide / 2 + 0.09 > v - (upper ? 0.74 : rail / 2 - 0.1)
      if (isSide) tilt(spot, Math.sign(x - column * wide), 0, 0, slope, 0, 1, 0, 0)
      else tilt(spot, 1, 0, 0, 0, 0, 1, 0, slope * Math.sign(upper ? y - rail - 0.86 : y - rail / 2))
      if (dado > 0) tilt(spot, 1, 0, 0, 0, 0, 1, 0, 0.6 * dado * Math.sign(rail - y))
      return
    }
    case 'plaster': {
      const cloud = blurred(x, y, seed, 0.9, blurM, 5)
      const trowel = blurred(x * 1 + y * 0.3, y, seed + 9, 0.22, blurM, 4)
      plain(spot, colour, 1 + 0.22 * cloud + 0.1 * trowel)
      tilt(
        spot,
        1,
        0,
        0,
        0.06 * blurred(x + 3, y, seed, 0.12, blurM, 3),
        0,
        1,
        0,
        0.06 * blurred(x, y + 3, seed, 0.12, blurM, 3),
      )
      return
    }
  }
}

/** Boards; or the paper that is rolled out from the background. */
export function floorSpot(stage: Stage, spot: Spot, blurM: number): void {
  const { background, floor, seed } = stage.scene
  face(spot, 0, 1, 0)
  const { x, z } = spot
  // Paper is rolled out on the floor as well.
  if (background.surface === 'paper' && Math.abs(x) < background.widthM / 2 && z < background.zM + 1.6) {
    plain(spot, background.colour, 1)
    return
  }
  const board = Math.floor(x / 0.14)
  const shade = 0.85 + 0.3 * hash3(board, Math.floor(z / 1.7 + hash3(board, 2, 8)), seed)
  const grain = 1 + 0.3 * blurred(x * 7, z, seed + board, 0.2, blurM, 4)
  const joint = ease(0.006, 0.002, Math.abs(x / 0.14 - board) * 0.14) * seen(0.03, blurM)
  plain(spot, floor, shade * grain * (1 - 0.6 * joint))
  spot.mirror = 0.03
  spot.rough = 0.5
}
