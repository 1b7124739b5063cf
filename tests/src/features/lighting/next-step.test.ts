import { describe, expect, it } from 'vitest'
import type { LightPurpose } from '#shared/domain/lighting/schema.ts'
import { nextStep } from '#src/features/lighting/next-step.ts'
import { light, whole } from '#tests/support/lighting-sample.ts'

const having = (purposes: LightPurpose[], props: { kind?: 'panel' | 'flag' }[] = []) =>
  whole({ lights: purposes.map((purpose, n) => light(n + 1, { purpose, at: [n, 2, 1], aim: [0, 1.5, 0] })), props })

describe('nextStep', () => {
  it('goes from the main over the background and the fill to an edge, then has nothing more to say', () => {
    expect(nextStep(having([]))?.purpose).toBe('main')
    expect(nextStep(having(['fill']))?.purpose).toBe('main')
    expect(nextStep(having(['main']))?.purpose).toBe('background')
    expect(nextStep(having(['main', 'background']))).toMatchObject({ purpose: 'fill', orPanel: true })
    expect(nextStep(having(['main', 'background'], [{}]))?.purpose).toBe('rim')
    expect(nextStep(having(['main', 'background'], [{ kind: 'flag' }]))?.purpose).toBe('fill')
    expect(nextStep(having(['main', 'background', 'fill', 'accent']))).toBeNull()
  })
})
