import { sceneOf } from '#shared/domain/lighting/test-frame/scene-of.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { GRID, HALF_BLUE, OCTA, SOFTBOX, light, whole } from '#tests/support/lighting-sample.ts'

const FACE: [number, number, number] = [0, 1.5, 0]

/** Four lights about one sitter with a globe; `shift` moves the main, metres. */
export function frameSetup(shift = 0): WholeSetup {
  return whole({
    lights: [
      light(1, { purpose: 'main', at: [-1.2 + shift, 2, 1.1], aim: FACE, modifier: OCTA }),
      light(2, { purpose: 'fill', at: [1.4, 1.6, 2], aim: FACE, modifier: SOFTBOX, power: 1 / 16 }),
      light(3, { purpose: 'background', at: [-1.9, 0.8, -1.2], aim: [-0.4, 1.3, -2], gels: [HALF_BLUE] }),
      light(4, { purpose: 'rim', at: [1.7, 2.1, -1.1], aim: FACE, modifier: GRID }),
    ],
    props: [{ kind: 'prop', name: 'Globe', shape: 'globe', at: [0.45, 1.2, 0.2], widthM: 0.35, heightM: 0.5 }],
  })
}

export const frameScene = (shift = 0) => sceneOf(frameSetup(shift), 'upright', { garmentColour: () => '#2f4a6b' })
