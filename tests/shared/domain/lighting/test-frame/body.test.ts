import { describe, expect, it } from 'vitest'
import { makeBody } from '#shared/domain/lighting/test-frame/body.ts'

const CUTS = ['jumper', 'shirt', 'coat', 'dress', 'cape'] as const
const POSES = ['standing', 'seated'] as const

describe('makeBody', () => {
  it('stands on the ground and not in it, in every cut and pose', () => {
    for (const cut of CUTS) {
      for (const [pose, eyes] of [
        ['standing', 1.55],
        ['standing', 1.1],
        ['seated', 1.22],
      ] as const) {
        const { cloth, under } = makeBody(3, cut, pose, eyes)
        let lowest = Infinity
        for (let x = -0.4; x <= 0.4; x += 0.04) {
          for (let z = -0.4; z <= 0.6; z += 0.04) {
            for (let y = -eyes - 0.1; y < -eyes + 0.12; y += 0.01) {
              if (Math.min(cloth(x, y, z), under(x, y, z)) < 0) lowest = Math.min(lowest, y)
            }
          }
        }
        expect(Math.abs(lowest + eyes), `${cut} ${pose}`).toBeLessThan(0.05)
      }
    }
  })

  it('clothes the breast and leaves the face free', () => {
    for (const cut of CUTS) {
      for (const pose of POSES) {
        const { cloth, linen, skin } = makeBody(3, cut, pose, pose === 'standing' ? 1.55 : 1.22)
        expect(Math.min(cloth(0, -0.42, 0), linen(0, -0.42, 0)), `${cut} ${pose}`).toBeLessThan(0)
        expect(cloth(0, -0.02, 0.05)).toBeGreaterThan(0)
        expect(skin(0, -0.02, 0.05)).toBeGreaterThan(0)
      }
    }
  })

  it('is never overrun by a stride along its distances: no field grows faster than the way, by much', () => {
    for (const cut of CUTS) {
      const { cloth } = makeBody(5, cut, 'standing', 1.55)
      let worst = 0
      for (let i = 0; i < 4000; i++) {
        const x = ((i * 0.7548) % 1) * 0.8 - 0.4
        const y = ((i * 0.5698) % 1) * -1.3 - 0.12
        const z = ((i * 0.3247) % 1) * 0.6 - 0.3
        const step = 0.004
        const d = cloth(x, y, z)
        if (d < 0 || d > 0.15) continue
        worst = Math.max(worst, Math.abs(cloth(x + step, y, z) - d) / step, Math.abs(cloth(x, y + step, z) - d) / step)
      }
      expect(worst, cut).toBeLessThan(2)
    }
  })
})
