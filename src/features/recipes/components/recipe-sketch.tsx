import { useMemo } from 'react'
import { type Mark, type Tone, fitPlanSketch, planMarks } from '#shared/domain/lighting/sketch.ts'
import { fromRecipe } from '#shared/domain/recipes/recipe.ts'
import type { Recipe } from '#shared/domain/recipes/schema.ts'
import { newId } from '#src/lib/new-id.ts'

const BOX = { width: 300, height: 190, left: 26, right: 26, top: 18, bottom: 24 }

const INK: Readonly<Record<Tone, { colour: string; opacity: number }>> = {
  wall: { colour: 'var(--color-rail)', opacity: 1 },
  ink: { colour: 'var(--color-ink)', opacity: 1 },
  light: { colour: 'var(--color-draft)', opacity: 1 },
  panel: { colour: 'var(--color-draft)', opacity: 1 },
  flag: { colour: 'var(--color-ink)', opacity: 1 },
  prop: { colour: 'var(--color-ink-faint)', opacity: 1 },
  'neutral beam': { colour: 'var(--color-draft)', opacity: 0.11 },
  'warm beam': { colour: 'var(--color-glow)', opacity: 0.18 },
  'cool beam': { colour: '#3f78bc', opacity: 0.2 },
}

function paintOf({ tone, as, weight, colour }: Mark) {
  const ink = INK[tone]
  const stroke = colour ?? ink.colour
  if (as === 'area') return { fill: ink.colour, opacity: ink.opacity }
  return { fill: as === 'shape' ? '#fff' : 'none', stroke, strokeWidth: weight }
}

/** A recipe from above, small. */
export function RecipeSketch({ recipe }: { recipe: Recipe }) {
  const marks = useMemo(() => {
    const whole = fromRecipe(recipe, { newId })
    return planMarks(whole, fitPlanSketch(whole, BOX))
  }, [recipe])
  return (
    <svg viewBox={`0 0 ${BOX.width} ${BOX.height}`} className="block w-full border-b border-hair bg-white" aria-hidden>
      {marks.map((mark) => (
        <path key={mark.key} d={mark.d} strokeLinejoin="round" {...paintOf(mark)} />
      ))}
    </svg>
  )
}
