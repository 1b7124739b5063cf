import { useQuery } from '@tanstack/react-query'
import { type ChangeEvent, useMemo, useRef, useState } from 'react'
import type { KeptRecipe } from '#shared/api/recipes.ts'
import { fromRecipe } from '#shared/domain/recipes/recipe.ts'
import type { Recipe } from '#shared/domain/recipes/schema.ts'
import { shortInstant } from '#src/lib/format.ts'
import { newId } from '#src/lib/new-id.ts'
import { readRecipeFile, recipeLights } from '#src/lib/recipe-file.ts'
import { useShoot } from '#src/realtime/shoot-realtime.tsx'
import { Button } from '#src/ui/button.tsx'
import { Dialog } from '#src/ui/dialog.tsx'
import { FormError } from '#src/ui/form-error.tsx'
import { Waiting } from '#src/ui/waiting.tsx'
import { lightingQueries } from '../../queries.ts'
import { PlanSketch } from '../plan/plan-sketch.tsx'

export type UseRecipeProps = {
  open: boolean
  onOpenChange: (open: boolean) => void
  onUse: (recipe: Recipe) => void
}

/** Chooses a recipe of the studio, or one from a file, to light a setup by. */
export function UseRecipe({ open, onOpenChange, onUse }: UseRecipeProps) {
  const file = useRef<HTMLInputElement>(null)
  const [problem, setProblem] = useState<string | null>(null)
  function handleOpenChange(next: boolean) {
    setProblem(null)
    onOpenChange(next)
  }
  function choose(recipe: Recipe) {
    handleOpenChange(false)
    onUse(recipe)
  }
  async function handleFile(event: ChangeEvent<HTMLInputElement>) {
    const [chosen] = event.target.files ?? []
    if (!chosen) return
    const read = await readRecipeFile(chosen)
    // The same file may be chosen again.
    event.target.value = ''
    if (read.recipe) choose(read.recipe)
    else setProblem(read.problem)
  }
  return (
    <Dialog
      open={open}
      onOpenChange={handleOpenChange}
      wide
      title="Use a recipe"
      description="It becomes a setup of this shoot, with everything in it. The recipe stays as it is."
      footer={
        <>
          <input
            ref={file}
            type="file"
            accept=".json,application/json"
            hidden
            aria-label="Recipe to use"
            onChange={(event) => void handleFile(event)}
          />
          <Button onClick={() => file.current?.click()}>From a JSON file</Button>
        </>
      }
    >
      <FormError>{problem}</FormError>
      <RecipeChoice onUse={choose} />
    </Dialog>
  )
}

function RecipeChoice({ onUse }: { onUse: (recipe: Recipe) => void }) {
  const { id } = useShoot()
  const { data, error, refetch } = useQuery(lightingQueries.recipes(id))
  if (error && !data) {
    return (
      <div className="py-4 text-sm text-ink-soft">
        The studio’s recipes cannot be fetched: {error.message}{' '}
        <Button size="small" onClick={() => void refetch()}>
          Try again
        </Button>
      </div>
    )
  }
  if (!data) return <Waiting />
  if (data.recipes.length === 0) {
    return (
      <p className="py-4 text-base text-ink-soft">
        The studio keeps no recipe yet. In the menu of a setup, <b className="text-ink">Keep as a recipe</b> keeps it
        for the next shoot.
      </p>
    )
  }
  return (
    <ul className="grid grid-cols-[repeat(auto-fill,minmax(min(100%,13.5rem),1fr))] gap-3 pt-2">
      {data.recipes.map((kept) => (
        <li key={kept.id}>
          <RecipeButton kept={kept} onUse={onUse} />
        </li>
      ))}
    </ul>
  )
}

function RecipeButton({ kept, onUse }: { kept: KeptRecipe; onUse: (recipe: Recipe) => void }) {
  const { recipe, name, problem, by, atMs } = kept
  const whole = useMemo(() => recipe && fromRecipe(recipe, { newId }), [recipe])
  if (!recipe || !whole) {
    return (
      <div className="h-full rounded-r border border-dashed border-edge px-3.5 py-3 text-sm text-ink-soft">
        <b className="text-ink">{name}</b>
        <p>{problem}</p>
      </div>
    )
  }
  return (
    <button
      type="button"
      onClick={() => onUse(recipe)}
      className="block h-full w-full rounded-r border border-hair bg-paper text-left hover:border-ink-soft"
    >
      <PlanSketch whole={whole} />
      <span className="block px-3 py-2.5">
        <b className="block leading-snug font-semibold break-words">{name}</b>
        <span className="block text-sm text-ink-soft">{recipeLights(recipe)}</span>
        <span className="block text-xs text-ink-soft">
          {by === null ? '' : `${by}, `}
          {shortInstant(atMs)}
        </span>
      </span>
    </button>
  )
}
