import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { type LengthUnit, lengthLabel } from '#shared/units/length.ts'
import { isBehindBackground } from './at-sitter.ts'
import { shifted, stackGels } from './gel.ts'
import { distanceBetween, facePoint } from './geometry.ts'
import { NEAREST_M, isAmount, isLoss, outputOf } from './light-output.ts'
import { ASSUMED_COLOUR_K, hasColour, ownColourK } from './light-source.ts'
import { type Light, isLamp } from './schema.ts'
import { inSentence, purposeWord } from './words.ts'

export type ProblemKey =
  | 'guide-number'
  | 'lux'
  | 'power'
  | 'modifier-loss'
  | 'colour'
  | 'gel-transmission'
  | 'gel-colour'
  | 'distance'
  | 'aim'
  | 'behind-wall'

/** Something about a light that nothing can be worked out from; everything else is. */
export type Problem = { lightId: string; key: ProblemKey; words: string }

function numberProblems(light: Light, name: string): Problem[] {
  const { numbers } = light.unit
  const problems: Problem[] = []
  const add = (key: ProblemKey, words: string) => problems.push({ lightId: light.id, key, words })
  const unit = inSentence(light.unit.name)
  if (outputOf(light).fullGuideNumberM === 0) {
    if (isLamp(numbers))
      add(
        'lux',
        `The ${name}’s lamp, ${unit}, has no lux at a metre: put in the maker’s figure. Until then it reads nothing.`,
      )
    else
      add(
        'guide-number',
        `The ${name}’s unit, ${unit}, has no guide number: put in the maker’s figure or a meter reading. Until then it reads nothing.`,
      )
  }
  if (!isAmount(light.power) || light.power > 1) {
    const set = Number.isFinite(light.power) ? `is set to ${String(light.power).replace('-', '−')}` : 'has no power'
    const what =
      light.power > 1 ? 'Nothing gives more than full power, 1.' : 'Power is above 0: until then it reads nothing.'
    add('power', `The ${name} ${set}. ${what}`)
  }
  if (!hasColour(numbers))
    add(
      'colour',
      `The ${name}’s unit, ${unit}, has no colour temperature: put in the maker’s figure. Until then ${ASSUMED_COLOUR_K} K is taken.`,
    )
  const loss = light.modifier?.numbers.lossStops.value ?? 0
  if (light.modifier && !isLoss(loss))
    add(
      'modifier-loss',
      `The loss of the ${inSentence(light.modifier.name)} is no number of stops to work with: it is taken as 0 stops.`,
    )
  return problems
}

function gelProblems(light: Light, name: string): Problem[] {
  const problems: Problem[] = []
  for (const gel of light.gels) {
    if (isAmount(gel.numbers.transmission.value)) continue
    const words = `The gel ${inSentence(gel.name)} lets no light through: put in its transmission. Until then the ${name} reads nothing.`
    problems.push({ lightId: light.id, key: 'gel-transmission', words })
  }
  const { miredShift } = stackGels(light.gels.map((gel) => gel.numbers))
  if (light.gels.length > 0 && shifted(ownColourK(light.unit.numbers), miredShift) === null) {
    const words = `The gels of the ${name} leave no colour temperature: its light is bluer than any. It is drawn deep blue; take one off if that is not meant.`
    problems.push({ lightId: light.id, key: 'gel-colour', words })
  }
  return problems
}

function placeProblems(light: Light, whole: WholeSetup, name: string, unit: LengthUnit): Problem[] {
  const face = facePoint(whole)
  const problems: Problem[] = []
  const add = (key: ProblemKey, words: string) => problems.push({ lightId: light.id, key, words })
  if (distanceBetween(light.at, face) < NEAREST_M)
    add(
      'distance',
      `The ${name} stands on the sitter’s eyes: move one of them. It is read as from ${unit === 'm' ? `${NEAREST_M * 100} cm` : lengthLabel(NEAREST_M, unit, true)}.`,
    )
  if (distanceBetween(light.at, light.aim) < 1e-6)
    add(
      'aim',
      `The ${name} looks at the point it stands on, so it has no direction: turn it. It is read as on its axis.`,
    )
  if (isBehindBackground(light, face, whole.setup.background))
    add('behind-wall', `The ${name} stands behind the wall, which keeps its light off: move it to this side.`)
  return problems
}

/**
 * What cannot be worked out about a setup, each with a sentence for its light: no guide number, power or transmission,
 * no distance or direction, behind the wall, no colour temperature of its own or behind its gels. Such a light reads 0 or is taken as its sentence
 * says; all others are read as ever.
 */
export function problemsOf(whole: WholeSetup, unit: LengthUnit = 'm'): Problem[] {
  return whole.lights.flatMap((light) => {
    const name = purposeWord(light.purpose).toLowerCase()
    return [...numberProblems(light, name), ...gelProblems(light, name), ...placeProblems(light, whole, name, unit)]
  })
}
