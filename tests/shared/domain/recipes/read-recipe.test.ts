import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { checkRecipe, readRecipe, recipeTooLarge } from '#shared/domain/recipes/read-recipe.ts'
import { recipeText, toRecipe } from '#shared/domain/recipes/recipe.ts'
import { RECIPE_MAX_BYTES } from '#shared/domain/recipes/schema.ts'
import { FULL_WARM, light, whole } from '#tests/support/lighting-sample.ts'

const recipe = toRecipe(
  whole({ lights: [light(1, { purpose: 'main', at: [-1, 2, 1], aim: [0, 1.5, 0], gels: [FULL_WARM] })], props: [{}] }),
)
type Loose = Record<string, unknown>

/** A copy with one thing put somewhere else; undefined takes it away. */
function damaged(path: readonly (string | number)[], value: unknown): unknown {
  const copy: unknown = JSON.parse(JSON.stringify(recipe))
  const inner = path.slice(0, -1).reduce<unknown>((at, key) => (at as Loose)[key], copy)
  ;(inner as Loose)[path.at(-1) ?? ''] = value
  return JSON.parse(JSON.stringify(copy))
}
const problemOf = (path: readonly (string | number)[], value: unknown) => checkRecipe(damaged(path, value)).problem

describe('readRecipe', () => {
  it('reads what was written', () => {
    expect(readRecipe(recipeText(recipe))).toEqual({ recipe, problem: null })
    expect(readRecipe(`\uFEFF${recipeText(recipe)}`).recipe).toEqual(recipe)
  })

  it('leaves out what it does not know', () => {
    const text = JSON.stringify({ ...recipe, mood: 'calm', lights: [{ ...recipe.lights[0], shootId: 'x', lamp: 1 }] })
    expect(readRecipe(text).recipe).toEqual(recipe)
  })

  it('reads an older one, without what came later', () => {
    const [old] = recipe.lights
    const { isOn: _isOn, note: _note, ...rest } = old ?? { isOn: true, note: '' }
    expect(checkRecipe({ ...recipe, note: undefined, props: undefined, lights: [rest] }).recipe).toEqual({
      ...recipe,
      note: '',
      props: [],
    })
  })

  it('says what is no recipe at all', () => {
    expect(readRecipe('{"format": "sconce rec').problem).toMatch(/^This file is not JSON.*Nothing was changed\.$/)
    expect(readRecipe('').problem).toContain('not JSON')
    expect(readRecipe('[]').problem).toContain('not a recipe')
    expect(readRecipe('null').problem).toContain('not a recipe')
    expect(readRecipe('{}').problem).toContain('it names no format')
    expect(readRecipe('{"format": "board"}').problem).toContain('its format is “board”')
    expect(readRecipe(`[`.repeat(200_000)).problem).toContain('not JSON')
    expect(readRecipe(' '.repeat(RECIPE_MAX_BYTES + 1)).problem).toContain('too large')
  })

  it('says when a newer Sconce wrote it', () => {
    expect(problemOf(['version'], 2)).toContain('written by a newer Sconce (version 2')
    expect(problemOf(['version'], 0)).toContain('version is 0')
  })

  it('names what is wrong and where', () => {
    expect(problemOf(['lights', 0, 'power'], -0.5)).toBe(
      'This recipe cannot be read: light 1, power is −0.5 and has to be more than 0. Nothing was changed.',
    )
    expect(problemOf(['lights'], Array(500).fill(recipe.lights[0]))).toContain('lights are 500 and may be at most 60')
    expect(problemOf(['lights', 0, 'at', 1], 'high')).toContain('light 1, place, y is “high” and has to be a number')
    expect(problemOf(['lights', 0, 'unit', 'numbers', 'massKg'], undefined)).toContain('light 1, unit, mass is missing')
    expect(problemOf(['lights', 0, 'gels', 0, 'numbers', 'transmission', 'from'], 'heard')).toContain(
      'light 1, gel 1, transmission, from is “heard”',
    )
    expect(problemOf(['lights', 0, 'purpose'], 'key')).toContain('one of “main”, “fill”')
    expect(problemOf(['setup', 'camera'], undefined)).toContain('setup, camera is missing')
    expect(problemOf(['setup', 'camera', 'focalMm'], null)).toContain('setup, camera, focal is nothing')
    expect(problemOf(['places', 0, 'turnDeg'], 900)).toContain('sitter 1, turn is 900 and has to be at most 180')
    expect(problemOf(['name'], ' ')).toContain('name is empty')
    expect(problemOf(['note'], 'x'.repeat(3000))).toContain('note is longer than 2000 characters')
  })

  it('refuses numbers that nobody can have meant, and lets those through that only a kit room refuses', () => {
    const guide = ['lights', 0, 'unit', 'numbers', 'guideNumberM', 'value']
    expect(problemOf(guide, 1e300)).toBe(
      'This recipe cannot be read: light 1, unit, guide number is 1e+300, more than anything here can be. Nothing was changed.',
    )
    expect(problemOf(['lights', 0, 'gels', 0, 'numbers', 'miredShift', 'value'], -1e9)).toContain('−1000000000')
    // A setup may have such a light and says so; its recipe is the same setup.
    for (const value of [0, -40]) expect(problemOf(guide, value)).toBeNull()
  })

  it('is not held up by lists without end', () => {
    const endless = (key: string) =>
      JSON.stringify({ ...recipe, [key]: [] }).replace(`"${key}":[]`, `"${key}":[${'0,'.repeat(400_000)}0]`)
    for (const key of ['lights', 'places', 'props']) expect(readRecipe(endless(key)).problem).toContain('are 400001')
    expect(readRecipe('['.repeat(400_000) + ']'.repeat(400_000)).problem).toContain('not a recipe')
  })

  it('counts the places that do not fit beside the first', () => {
    const two = damaged(['lights', 0, 'power'], 7) as Loose
    expect(checkRecipe({ ...two, name: '' }).problem).toContain('One more place does not fit.')
    expect(checkRecipe({ ...two, name: '', note: 3 }).problem).toContain('2 more places do not fit.')
  })

  it('never throws, whatever the JSON', () => {
    fc.assert(
      fc.property(fc.json(), fc.jsonValue(), (text, value) => {
        expect(readRecipe(text).problem).toMatch(/\.$/)
        const keys = ['setup', 'lights', 'places', 'props', 'name', 'note'] as const
        for (const key of keys) {
          const { problem } = checkRecipe({ ...recipe, [key]: value })
          if (problem !== null) expect(problem).toMatch(/^This recipe cannot be read: .*\.$/s)
        }
      }),
    )
  })
})

describe('recipeTooLarge', () => {
  it('says how large a file is beside how large it may be', () => {
    expect(recipeTooLarge(RECIPE_MAX_BYTES)).toBeNull()
    expect(recipeTooLarge(3 * 1024 * 1024)).toContain('3.0 MB, where 1 MB')
  })
})
