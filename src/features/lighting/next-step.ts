import type { LightPurpose } from '#shared/domain/lighting/schema.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'

export type NextStep = { purpose: LightPurpose; words: string; orPanel: boolean }

/**
 * What is usually built next: the main, then the background, then what opens the shadows, then an edge. Null once there is
 * one of each. The order in which lighting is taught (common practice, no source); nobody has to follow it.
 */
export function nextStep({ lights, props }: Pick<WholeSetup, 'lights' | 'props'>): NextStep | null {
  const has = (...purposes: LightPurpose[]) => lights.some((light) => purposes.includes(light.purpose))
  if (!has('main'))
    return { purpose: 'main', words: 'The main first: everything else is measured against it.', orPanel: false }
  if (!has('background'))
    return {
      purpose: 'background',
      words: 'Next, if the wall should be lit: a light on the background.',
      orPanel: false,
    }
  if (!has('fill') && !props.some((prop) => prop.kind === 'panel'))
    return { purpose: 'fill', words: 'Next, if the shadows should open: a fill or a panel.', orPanel: true }
  if (!has('rim', 'accent'))
    return { purpose: 'rim', words: 'Next, if the sitter should part from the wall: a rim.', orPanel: false }
  return null
}
