import { describe, expect, it } from 'vitest'
import { roundBox, sphere } from '#shared/domain/lighting/test-frame/field.ts'
import { bake, makeSolid, partAt, sampleGrid } from '#shared/domain/lighting/test-frame/solid.ts'

const BALL = (x: number, y: number, z: number) => sphere(x, y, z, 0.3)

describe('bake and sampleGrid', () => {
  const grid = bake(BALL, [-0.5, -0.5, -0.5], [0.5, 0.5, 0.5], 0.02)
  it('keeps distances near the surface, and never promises more room than there is', () => {
    for (let i = 0; i < 3000; i++) {
      const x = ((i * 0.7548) % 1) * 0.9 - 0.45
      const y = ((i * 0.5698) % 1) * 0.9 - 0.45
      const z = ((i * 0.3247) % 1) * 0.9 - 0.45
      const exact = BALL(x, y, z)
      const kept = sampleGrid(grid, x, y, z)
      if (Math.abs(exact) < 0.03) expect(Math.abs(kept - exact)).toBeLessThan(0.002)
      if (exact > 0) expect(kept).toBeLessThan(exact + 0.021)
    }
  })
})

describe('makeSolid', () => {
  it('is the nearest of its parts', () => {
    const other = (x: number, y: number, z: number) => sphere(x - 0.6, y, z, 0.1)
    const solid = makeSolid({
      parts: [
        { field: BALL, stuff: 'skin' },
        { field: other, stuff: 'hair' },
      ],
      rows: [1, 0, 0, 0, 1, 0, 0, 0, 1],
      at: [0, 0, 0],
      low: [-0.5, -0.5, -0.5],
      high: [0.8, 0.5, 0.5],
      cellM: 0.05,
      of: { kind: 'prop', index: 0 },
    })
    expect(solid.distance(0.6, 0, 0)).toBeCloseTo(-0.1, 12)
    expect(partAt(solid, 0.6, 0, 0).stuff).toBe('hair')
    expect(partAt(solid, 0, 0.29, 0).stuff).toBe('skin')
  })

  it('grows its cells for what is very large and thin, so that a picture comes to an end', () => {
    const solid = makeSolid({
      parts: [{ field: (x, y, z) => roundBox(x, y, z, 5, 5, 0.4, 0.001), stuff: 'wood' }],
      rows: [1, 0, 0, 0, 1, 0, 0, 0, 1],
      at: [0, 0, 0],
      low: [-5.5, -5.5, -5.5],
      high: [5.5, 5.5, 5.5],
      cellM: 0.002,
      of: { kind: 'prop', index: 0 },
    })
    expect(solid.grid.values.length).toBeLessThanOrEqual(1_200_000)
    expect(solid.cellM).toBe(solid.grid.cellM)
  })
})
