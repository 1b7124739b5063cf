import { MoreHorizontal } from 'lucide-react'
import type { KeptRecipe } from '#shared/api/recipes.ts'
import { fNumberLabel } from '#shared/domain/lighting/words.ts'
import type { Recipe } from '#shared/domain/recipes/schema.ts'
import { shortInstant } from '#src/lib/format.ts'
import { recipeLights, saveRecipe } from '#src/lib/recipe-file.ts'
import { IconButton } from '#src/ui/button.tsx'
import { Menu, type MenuItem } from '#src/ui/menu.tsx'
import { RecipeSketch } from './recipe-sketch.tsx'

export type RecipeCardProps = {
  kept: KeptRecipe
  mayChange: boolean
  onRename: () => void
  onRemove: () => void
}

/** "Main: 90 cm octa, 85 mm at f/8". */
function mainWords({ lights, setup }: Recipe): string {
  const main = lights.find((light) => light.purpose === 'main')
  const made = main ? `Main: ${main.modifier?.name ?? main.unit.name}` : 'No main'
  return `${made} · ${setup.camera.focalMm} mm at ${fNumberLabel(setup.camera.fNumber)}`
}

/** A recipe with its plan, its lights, and who kept it. */
export function RecipeCard({ kept, mayChange, onRename, onRemove }: RecipeCardProps) {
  const { recipe, name, problem, by, atMs } = kept
  const items: MenuItem[] = [
    ...(mayChange && recipe ? [{ label: 'Rename', onSelect: onRename }] : []),
    ...(recipe ? [{ label: 'Save as JSON', onSelect: () => saveRecipe(recipe) }] : []),
    ...(mayChange ? ['line' as const, { label: 'Remove', onSelect: onRemove, danger: true }] : []),
  ]
  return (
    <article className="flex h-full flex-col rounded-r border border-hair bg-paper">
      {recipe ? <RecipeSketch recipe={recipe} /> : <div className="min-h-24 flex-1 border-b border-hair bg-surround" />}
      <div className="flex items-start gap-2 px-3.5 pt-3 pb-3.5">
        <div className="min-w-0 flex-1">
          <h2 className="text-[1.0625rem] leading-snug break-words">{name}</h2>
          {recipe ? (
            <>
              <p className="mt-0.5 text-sm text-ink-soft">{recipeLights(recipe)}</p>
              <p className="text-sm text-ink-soft">{mainWords(recipe)}</p>
              {recipe.note.trim() !== '' && <p className="mt-1 line-clamp-2 text-sm">{recipe.note}</p>}
            </>
          ) : (
            <p className="mt-0.5 text-sm text-velvet">{problem}</p>
          )}
          <p className="mt-1.5 text-xs text-ink-soft">
            {by === null ? '' : `${by}, `}
            {shortInstant(atMs)}
          </p>
        </div>
        {items.length > 0 && (
          <div className="-mt-1 -mr-2">
            <Menu
              trigger={
                <IconButton label={`More for ${name}`}>
                  <MoreHorizontal size={18} aria-hidden />
                </IconButton>
              }
              items={items}
            />
          </div>
        )}
      </div>
    </article>
  )
}
