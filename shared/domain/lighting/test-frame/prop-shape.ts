import { capsule, clamp, cylinder, ellipsoid, hash3, noise, ring, roundBox, smoothMin, sphere } from './field.ts'
import type { Field } from './field.ts'
import type { Prop } from '../schema.ts'

/** A part of the set within its width and height, origin in its middle, facing +z. Parts in the set's colour, and others. */
export type PropShape = { own: Field; wood: Field; leaf: Field }

const NONE: Field = () => 1

export function makeProp(shape: Prop['shape'], widthM: number, heightM: number, seed: number): PropShape {
  const w = widthM / 2
  const h = heightM / 2
  const none = { own: NONE, wood: NONE, leaf: NONE }
  switch (shape) {
    case 'block':
      return { ...none, own: (x, y, z) => roundBox(x, y, z, w, h, Math.min(w, 0.4), 0.008) }
    case 'ball':
      return { ...none, own: (x, y, z) => sphere(x, y, z, Math.min(w, h)) }
    case 'post':
      return {
        ...none,
        own: (x, y, z) =>
          Math.min(
            cylinder(x, y, z, w * 0.55, h, 0.01),
            roundBox(x, y + h - h * 0.08, z, w, h * 0.08, w, 0.008),
            roundBox(x, y - h + h * 0.06, z, w, h * 0.06, w, 0.008),
          ),
      }
    case 'table':
      return {
        ...none,
        own: (x, y, z) => {
          const d = Math.min(w, 0.4)
          const ax = Math.abs(x) - w + 0.05
          const az = Math.abs(z) - d + 0.05
          const top = roundBox(x, y - h + 0.018, z, w, 0.018, d, 0.006)
          const apron = roundBox(x, y - h + 0.075, z, w - 0.04, 0.04, d - 0.04, 0.004)
          const leg = capsule(ax, y, az, 0, h - 0.04, 0, 0, -h + 0.015, 0, 0.026, 0.016)
          return Math.min(top, apron, leg)
        },
      }
    case 'chair':
      return {
        ...none,
        own: (x, y, z) => {
          const ax = Math.abs(x)
          const seatY = -h + Math.min(0.45, heightM * 0.5)
          const seat = roundBox(x, y - seatY, z, w, 0.022, w, 0.015)
          const legs = capsule(
            ax,
            y,
            Math.abs(z),
            w - 0.03,
            seatY,
            w - 0.03,
            w - 0.015,
            -h + 0.01,
            w - 0.015,
            0.018,
            0.013,
          )
          const posts = capsule(ax, y, z, w - 0.03, seatY, -w + 0.03, w - 0.03, h - 0.02, -w - 0.03, 0.018, 0.014)
          const t = clamp((y - seatY) / (h - seatY), 0, 1)
          const rails = roundBox(
            x,
            Math.abs(y - (h + seatY) / 2 - 0.03) - (h - seatY) * 0.25,
            z + w - 0.03 + 0.06 * t,
            w - 0.03,
            0.03,
            0.009,
            0.006,
          )
          return Math.min(seat, legs, posts, rails)
        },
      }
    case 'globe': {
      // A ball within rings, on a turned foot.
      const r = Math.min(w, h * 0.62)
      const cy = h - r
      return {
        ...none,
        own: (x, y, z) => {
          const gy = y - cy
          const dent = 0.004 * noise(x * 26 + seed, gy * 26, z * 26)
          const ball = sphere(x, gy, z, r * 0.74) + dent
          // One ring stands upright across the view, one lies tilted.
          const upright = ring(x, z, gy, r * 0.93, 0.0115)
          const ty = gy * 0.92 - x * 0.39
          const tx = x * 0.92 + gy * 0.39
          const tilted = ring(tx, ty, z, r * 0.86, 0.007)
          const foot = smoothMin(
            capsule(x, y, z, 0, cy - r * 0.9, 0, 0, -h + 0.05, 0, 0.016, 0.034),
            cylinder(x, y + h - 0.022, z, w * 0.5, 0.022, 0.012),
            0.05,
          )
          const knob = ellipsoid(x, y - (cy - r * 1.12), z, 0.034, 0.026, 0.034)
          return Math.min(ball, upright, tilted, smoothMin(foot, knob, 0.02))
        },
      }
    }
    case 'books':
      return {
        ...none,
        own: (x, y, z) => {
          let d = 1
          const many = Math.max(2, Math.round(heightM / 0.045))
          for (let i = 0; i < many; i++) {
            const turn = (hash3(seed, i, 3) - 0.5) * 0.5
            const c = Math.cos(turn)
            const s = Math.sin(turn)
            const u = x * c - z * s
            const v = x * s + z * c
            const half = h / many
            const by = y + h - half * (2 * i + 1)
            const bw = w * (0.8 + 0.2 * hash3(seed, i, 4))
            const cover = roundBox(u, by, v, bw, half - 0.0015, w * 0.68, 0.003)
            const pages = roundBox(u - 0.012, by, v, bw, half - 0.006, w * 0.68 + 0.01, 0.001)
            d = Math.min(d, Math.max(cover, -pages))
          }
          return d
        },
        leaf: NONE,
        wood: (x, y, z) => {
          let d = 1
          const many = Math.max(2, Math.round(heightM / 0.045))
          for (let i = 0; i < many; i++) {
            const turn = (hash3(seed, i, 3) - 0.5) * 0.5
            const c = Math.cos(turn)
            const s = Math.sin(turn)
            const half = h / many
            const bw = w * (0.8 + 0.2 * hash3(seed, i, 4))
            d = Math.min(
              d,
              roundBox(
                x * c - z * s - 0.003,
                y + h - half * (2 * i + 1),
                x * s + z * c,
                bw - 0.008,
                half - 0.006,
                w * 0.65,
                0.001,
              ),
            )
          }
          return d
        },
      }
    case 'cup':
      return {
        ...none,
        own: (x, y, z) => {
          const r = Math.hypot(x, z)
          const t = clamp((y + h) / heightM, 0, 1)
          const wide = w * (0.52 + 0.42 * Math.sqrt(t))
          const wall = Math.abs(r - wide) - Math.max(0.0018, w * 0.045)
          const bowl = Math.max(wall * 0.85, y - h, -h - y)
          const bottom = cylinder(x, y + h - heightM * 0.05, z, w * 0.52, heightM * 0.05, 0.002)
          const u = x - w * 1.02
          const handle = Math.hypot(Math.hypot(u, y) - h * 0.5, z) - w * 0.07
          const saucer = ellipsoid(x, y + h, z, w * 1.75, heightM * 0.07, w * 1.75)
          return Math.min(bowl, bottom, x > w * 0.75 ? handle : 1, saucer)
        },
        wood: (x, y, z) => cylinder(x, y - h * 0.45, z, w * 0.82, h * 0.06, 0.001),
      }
    case 'plant':
      return {
        own: (x, y, z) => {
          const pot = heightM * 0.22
          const t = clamp((y + h) / (pot * 1.9), 0, 1)
          return cylinder(x, y + h - pot * 0.8, z, w * (0.34 + 0.14 * t), pot * 0.8, 0.012) * 0.9
        },
        wood: (x, y, z) => capsule(x, y, z, 0, -h + heightM * 0.2, 0, w * 0.1, h * 0.4, 0, 0.012, 0.006),
        leaf: (x, y, z) => {
          let d = 1
          for (let i = 0; i < 16; i++) {
            const turn = i * 2.399 + hash3(seed, i, 1)
            const up = -h + heightM * (0.36 + 0.56 * (i / 16))
            const reach = w * (0.98 - 0.45 * (i / 16))
            const c = Math.cos(turn)
            const s = Math.sin(turn)
            const u = x * c + z * s
            const v = -x * s + z * c
            const lift = up + 0.32 * u - (u * u) / (reach * 1.7)
            const leaf = ellipsoid(u - reach * 0.52, (y - lift) * 1.2, v, reach * 0.48, 0.006, reach * 0.19)
            if (leaf < d) d = leaf
          }
          return d * 0.7
        },
      }
  }
}
