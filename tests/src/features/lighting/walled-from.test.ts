import { describe, expect, it } from 'vitest'
import { walledSchema } from '#shared/domain/lighting/schema.ts'
import { walledFrom } from '#src/features/lighting/walled-from.ts'
import { whole } from '#tests/support/lighting-sample.ts'

const { background } = whole({}).setup

describe('walledFrom', () => {
  it('puts the sitter midway between the side walls, the background at the back', () => {
    const walled = walledFrom({ widthM: 6, depthM: 9, ceilingM: 3.2 }, background)
    expect(walled).toEqual({ leftM: 3, rightM: 3, frontM: 7, ceilingM: 3.2 })
    expect(walledSchema.parse(walled)).toEqual(walled)
  })
  it('is null while a size is missing, and never in front of the camera’s own wall', () => {
    expect(walledFrom({ widthM: 6, depthM: null, ceilingM: 3.2 }, background)).toBeNull()
    expect(walledFrom({ widthM: 6, depthM: 9, ceilingM: 0 }, background)).toBeNull()
    expect(walledFrom({ widthM: 6, depthM: 1, ceilingM: 3 }, background)?.frontM).toBe(0)
  })
})
