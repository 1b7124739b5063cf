import { describe, expect, it } from 'vitest'
import { FINE, stageOf } from '#shared/domain/lighting/test-frame/stage.ts'
import {
  emptyHit,
  isShaded,
  openness,
  own,
  toOwn,
  trace,
  turnToOwn,
  turnToWorld,
} from '#shared/domain/lighting/test-frame/trace.ts'
import { figure, scene } from '#tests/support/frame-sample.ts'

const BALL = {
  shape: 'ball',
  at: [0.3, 1.4, 0.2],
  turn: 0.4,
  widthM: 0.6,
  heightM: 0.6,
  colour: [0.5, 0.5, 0.5],
  seed: 1,
} as const
const STAGE = stageOf(scene({ props: [BALL] }), FINE)

describe('trace', () => {
  it('meets a ball where the closed form says, from all sides', () => {
    const hit = emptyHit()
    for (let i = 0; i < 300; i++) {
      const turn = i * 2.4
      const origin = [0.3 + 2 * Math.cos(turn), 1.6 + Math.sin(i), 0.2 + 1.5 * Math.sin(turn)] as const
      const goal = [0.3 + 0.25 * Math.cos(i * 1.7), 1.4 + 0.25 * Math.sin(i * 0.9), 0.2] as const
      const way = goal.map((value, axis) => value - (origin[axis] ?? 0))
      const length = Math.hypot(...way)
      const [dx = 0, dy = 0, dz = 0] = way.map((value) => value / length)
      const to = [0.3 - origin[0], 1.4 - origin[1], 0.2 - origin[2]] as const
      const along = to[0] * dx + to[1] * dy + to[2] * dz
      const away2 = to[0] ** 2 + to[1] ** 2 + to[2] ** 2 - along ** 2
      trace(STAGE, ...origin, dx, dy, dz, hit)
      if (away2 > 0.28 ** 2) continue
      expect(hit.what).toBe('solid')
      expect(Math.abs(hit.t - (along - Math.sqrt(0.09 - away2)))).toBeLessThan(0.002)
    }
  })

  it('meets wall, floor, and the room beyond the edges of the background', () => {
    const hit = emptyHit()
    trace(STAGE, 0, 2.5, 3, 0, 0, -1, hit)
    expect([hit.what, hit.t]).toEqual(['wall', 5])
    trace(STAGE, 2, 1, 3, 0, -1, 0, hit)
    expect([hit.what, hit.t]).toEqual(['floor', 1])
    trace(STAGE, 20, 2.5, 3, 0, 0, -1, hit)
    expect(hit.what).toBe('beyond')
    trace(STAGE, 0, 2.5, 3, 0, 0, 1, hit)
    expect([hit.what, hit.t]).toEqual(['nothing', Infinity])
  })
})

describe('isShaded', () => {
  it('says whether the line between two points crosses a ball', () => {
    let mistakes = 0
    for (let i = 0; i < 2000; i++) {
      const p = [((i * 0.7548) % 1) * 3 - 1.5, 0.3 + ((i * 0.5698) % 1) * 2, -1.5] as const
      const q = [((i * 0.3247) % 1) * 3 - 1.5, 0.3 + ((i * 0.819) % 1) * 2, 2] as const
      const d = [q[0] - p[0], q[1] - p[1], q[2] - p[2]] as const
      const t = ((0.3 - p[0]) * d[0] + (1.4 - p[1]) * d[1] + (0.2 - p[2]) * d[2]) / (d[0] ** 2 + d[1] ** 2 + d[2] ** 2)
      const away = Math.hypot(p[0] + d[0] * t - 0.3, p[1] + d[1] * t - 1.4, p[2] + d[2] * t - 0.2)
      // Within half a cell of the edge the grid may say either.
      if (Math.abs(away - 0.3) < 0.006) continue
      if (isShaded(STAGE, ...p, ...q, -1) !== away < 0.3) mistakes++
    }
    expect(mistakes).toBe(0)
  })

  it('keeps the light of a lamp behind the wall there', () => {
    expect(isShaded(STAGE, 0, 2.5, -1, 0, 2.5, -3, -1)).toBe(true)
    expect(isShaded(STAGE, 9, 2.5, -1, 9, 2.5, -3, -1)).toBe(false)
  })
})

describe('openness', () => {
  it('is 1 in the open and less in a corner', () => {
    expect(openness(STAGE, 3, 1.5, 1, 0, 0, 1)).toBe(1)
    expect(openness(STAGE, 3, 0.01, -1.99, 0, 0, 1)).toBeLessThan(0.9)
  })
})

describe('toOwn, turnToOwn, turnToWorld', () => {
  it('undo each other', () => {
    const [solid] = stageOf(scene({ figures: [figure({ turn: 0.8, headNod: 0.3 })] }), FINE).solids
    if (!solid) throw new Error('no solid')
    turnToOwn(solid, 0.2, -0.5, 0.7)
    turnToWorld(solid, own.x, own.y, own.z)
    expect([own.x, own.y, own.z].map((value) => Math.round(value * 1e9) / 1e9)).toEqual([0.2, -0.5, 0.7])
    toOwn(solid, 0, 1.55, 0)
    expect([own.x, own.y, own.z]).toEqual([0, 0, 0])
  })
})
