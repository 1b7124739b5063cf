// @vitest-environment jsdom
import { QueryClient, QueryClientProvider } from '@tanstack/react-query'
import { cleanup, fireEvent, render, screen, waitFor } from '@testing-library/react'
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import { recipeIdSchema } from '#shared/ids.ts'
import type { KeptRecipe } from '#shared/api/recipes.ts'
import { recipeText, toRecipe } from '#shared/domain/recipes/recipe.ts'
import { RecipesScreen } from '#src/features/recipes/components/recipes-screen.tsx'
import { recipeQueries } from '#src/features/recipes/queries.ts'
import { OCTA, id, light, whole } from '#tests/support/lighting-sample.ts'

const recipe = toRecipe(
  whole({ lights: [light(1, { purpose: 'main', at: [-1, 2, 1], aim: [0, 1.5, 0], modifier: OCTA })] }),
)
const kept: KeptRecipe = {
  id: recipeIdSchema.parse(id(71)),
  name: 'Reading lamp',
  by: 'Mel Ward',
  atMs: Date.UTC(2026, 11, 1, 9),
  recipe: { ...recipe, name: 'Reading lamp' },
  problem: null,
}
const broken: KeptRecipe = {
  ...kept,
  id: recipeIdSchema.parse(id(72)),
  name: 'Old',
  recipe: null,
  problem: 'Cut short.',
}

const asked = vi.fn<typeof fetch>()
beforeEach(() => {
  vi.stubGlobal('matchMedia', () => ({ matches: false, addEventListener: vi.fn(), removeEventListener: vi.fn() }))
  vi.stubGlobal('fetch', asked)
  asked.mockReset()
})
afterEach(() => {
  cleanup()
  vi.unstubAllGlobals()
})

function show(recipes: KeptRecipe[], mayChange = true) {
  const client = new QueryClient({ defaultOptions: { queries: { staleTime: Infinity, retry: false } } })
  client.setQueryData(recipeQueries.ofStudio('s').queryKey, { recipes })
  render(
    <QueryClientProvider client={client}>
      <RecipesScreen studioId="s" name="Lantern Row" mayChange={mayChange} />
    </QueryClientProvider>,
  )
}
const choose = (text: string) =>
  fireEvent.change(screen.getByLabelText('Recipe to add'), { target: { files: [new File([text], 'r.json')] } })

describe('RecipesScreen', () => {
  it('says of each recipe its lights, its main, and who kept it; of one that cannot be read, why', () => {
    show([kept, broken])
    expect(screen.getByRole('heading', { name: 'Reading lamp' })).toBeTruthy()
    expect(screen.getByText('1 light: main')).toBeTruthy()
    expect(screen.getByText(/^Main: 90 cm octa · 85 mm at f\/8/)).toBeTruthy()
    expect(screen.getAllByText(/^Mel Ward, /)).toHaveLength(2)
    expect(screen.getByText('Cut short.')).toBeTruthy()
  })

  it('begins empty with the way to fill it', () => {
    show([])
    expect(screen.getByRole('heading', { name: 'No recipe yet' })).toBeTruthy()
    expect(screen.getByRole('button', { name: 'Add from a JSON file' })).toBeTruthy()
  })

  it('sends nothing of a file that is no recipe, and says why', async () => {
    show([kept])
    choose('{"format": "letter"}')
    expect((await screen.findByRole('alert')).textContent).toContain('its format is “letter”')
    expect(asked).not.toHaveBeenCalled()
  })

  it('keeps a recipe from a file', async () => {
    show([])
    asked.mockResolvedValue(new Response(JSON.stringify({ recipes: [kept] })))
    choose(recipeText(recipe))
    expect(await screen.findByRole('heading', { name: 'Reading lamp' })).toBeTruthy()
    expect(asked.mock.calls[0]?.[0]).toBe('/api/studios/s/recipes')
    expect(JSON.parse(String(asked.mock.calls[0]?.[1]?.body))).toEqual({ recipe })
  })

  it('shows the server’s refusal of a file', async () => {
    show([kept])
    const error = { code: 'CONFLICT', message: 'The studio keeps 200 recipes, as many as it can.' }
    asked.mockResolvedValue(new Response(JSON.stringify({ error }), { status: 409 }))
    choose(recipeText(recipe))
    await waitFor(() => expect(screen.getByRole('alert').textContent).toContain('as many as it can'))
  })

  it('offers no change to who may not make one', () => {
    show([broken], false)
    expect(screen.queryByRole('button')).toBeNull()
  })
})
