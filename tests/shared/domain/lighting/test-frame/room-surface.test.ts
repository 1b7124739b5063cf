import { describe, expect, it } from 'vitest'
import { floorSpot, wallSpot } from '#shared/domain/lighting/test-frame/room-surface.ts'
import { emptySpot } from '#shared/domain/lighting/test-frame/spot.ts'
import { ROUGH, stageOf } from '#shared/domain/lighting/test-frame/stage.ts'
import { scene } from '#tests/support/frame-sample.ts'

const STAGE = stageOf(scene(), ROUGH)

describe('wallSpot', () => {
  it('is the plain colour on paper and dark beyond it', () => {
    const spot = { ...emptySpot(), x: 0.4, y: 1, z: -2 }
    wallSpot(STAGE, spot, 0.001, false)
    expect([spot.r, spot.g, spot.b, spot.nz]).toEqual([0.5, 0.5, 0.5, 1])
    wallSpot(STAGE, spot, 0.001, true)
    expect(spot.r).toBeLessThan(0.2)
  })
})

describe('floorSpot', () => {
  it('is the paper rolled out below the background, and boards before it', () => {
    const spot = { ...emptySpot(), x: 0, y: 0, z: -1.5 }
    floorSpot(STAGE, spot, 0.001)
    expect([spot.r, spot.ny, spot.mirror]).toEqual([0.5, 1, 0])
    floorSpot(STAGE, { ...spot, z: 1 }, 0.001)
    const board = { ...spot, z: 1 }
    floorSpot(STAGE, board, 0.001)
    expect(board.r).toBeLessThan(0.4)
  })
})
