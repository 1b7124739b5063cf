import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { placeIdSchema } from '#shared/ids.ts'
import { readSetup } from '#shared/domain/lighting/readings.ts'
import { wholeSetups } from '#shared/domain/plan/read-plan.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { readRecipe } from '#shared/domain/recipes/read-recipe.ts'
import { fromRecipe, recipeFileName, recipeText, toRecipe } from '#shared/domain/recipes/recipe.ts'
import { anySetup } from '#tests/support/any-setup.ts'
import { OCTA, id, light, whole } from '#tests/support/lighting-sample.ts'

const newId = () => crypto.randomUUID()

/** A setup without what a recipe does not keep: ids, sitters and looks, and its place among the setups. */
function kept({ setup, lights, places, props }: WholeSetup) {
  const { id: _id, rank: _rank, ...rest } = setup
  const bare = <T extends { id: string; setupId: string }>({ id: _own, setupId: _of, ...part }: T) => part
  return {
    setup: rest,
    lights: lights.map(bare),
    places: places.map((place) => ({ ...bare(place), sitterId: null, lookId: null })),
    props: props.map(bare),
  }
}

function rebuilt(setup: WholeSetup): WholeSetup {
  const { recipe, problem } = readRecipe(recipeText(toRecipe(setup)))
  if (!recipe) throw new Error(problem)
  return fromRecipe(recipe, { newId })
}

describe('a recipe', () => {
  it('rebuilds an equal setup from its JSON, ids and who is in it aside', () => {
    fc.assert(
      fc.property(anySetup, (setup) => {
        expect(kept(rebuilt(setup))).toEqual(kept(setup))
      }),
      { numRuns: 60 },
    )
  })

  it('names no shoot, sitter, look or setup', () => {
    fc.assert(
      fc.property(anySetup, (setup) => {
        const text = recipeText(toRecipe(setup))
        const ids = [setup.setup.id, ...[...setup.lights, ...setup.places, ...setup.props].map((part) => part.id)]
        const people = setup.places.flatMap((place) => [place.sitterId ?? [], place.lookId ?? []].flat())
        for (const one of [...ids, ...people]) expect(text).not.toContain(one)
      }),
      { numRuns: 20 },
    )
  })

  it('gives every part an id of its own and the setup it is in', () => {
    const setup = whole({ lights: [light(1, { purpose: 'main', at: [1, 2, 1], aim: [0, 1.5, 0] })], props: [{}, {}] })
    const made = fromRecipe(toRecipe(setup), { newId, rank: 'b3', name: 'In the dome' })
    const parts = [...made.lights, ...made.places, ...made.props]
    expect(new Set([made.setup.id, ...parts.map((part) => part.id)]).size).toBe(5)
    expect(new Set(parts.map((part) => part.setupId))).toEqual(new Set([made.setup.id]))
    expect([made.setup.rank, made.setup.name]).toEqual(['b3', 'In the dome'])
  })

  it('reads the same numbers after the documents have sorted its parts by their new ids', () => {
    const two = whole({ lights: [light(1, { purpose: 'main', at: [-1, 2, 1], aim: [0, 1.5, 0], modifier: OCTA })] })
    const [first] = two.places
    if (!first) throw new Error('the sample has a sitter')
    // Both as far from the mark: whose eyes count is decided by the order of ids.
    const setup = {
      ...two,
      places: [
        { ...first, at: [-0.4, 0] as [number, number], eyeHeightM: 1.3 },
        { ...first, id: placeIdSchema.parse(id(802)), at: [0.4, 0] as [number, number], eyeHeightM: 1.7 },
      ],
    }
    for (let round = 0; round < 10; round++) {
      const made = rebuilt(setup)
      const byId = <T extends { id: string }>(parts: readonly T[]) => new Map(parts.map((part) => [part.id, part]))
      const read = wholeSetups({
        setups: byId([made.setup]),
        lights: byId(made.lights),
        sitterPlaces: byId(made.places),
        props: byId(made.props),
      }).get(made.setup.id)
      expect(read && readSetup(read).mainFNumber).toBe(readSetup(setup).mainFNumber)
    }
  })

  it('keeps what the kit it came from said, known here or not', () => {
    const setup = whole({ lights: [light(1, { purpose: 'main', at: [1, 2, 1], aim: [0, 1.5, 0], modifier: OCTA })] })
    const [made] = rebuilt(setup).lights
    expect(made?.modifier).toEqual(setup.lights[0]?.modifier)
    expect(made?.unit).toEqual(setup.lights[0]?.unit)
  })
})

describe('recipeFileName', () => {
  it('is the setup’s name, or a word', () => {
    expect(recipeFileName('Dome, warm')).toBe('Dome, warm.recipe.json')
    expect(recipeFileName('  ')).toBe('Setup.recipe.json')
  })
})
