import { useSuspenseQuery } from '@tanstack/react-query'
import { type ChangeEvent, useRef, useState } from 'react'
import type { KeptRecipe } from '#shared/api/recipes.ts'
import { count } from '#src/lib/format.ts'
import { readRecipeFile } from '#src/lib/recipe-file.ts'
import { Button } from '#src/ui/button.tsx'
import { Confirm } from '#src/ui/confirm.tsx'
import { Empty } from '#src/ui/empty.tsx'
import { FormError } from '#src/ui/form-error.tsx'
import { ScreenBar } from '#src/ui/screen-bar.tsx'
import { toast } from '#src/ui/toast.ts'
import { useChangeRecipes } from '../mutations.ts'
import { recipeQueries } from '../queries.ts'
import { RecipeCard } from './recipe-card.tsx'
import { RenameRecipe } from './rename-recipe.tsx'

export type RecipesScreenProps = { studioId: string; name: string; mayChange: boolean }

/** The studio's recipes: setups written so that any of its shoots can use them. */
export function RecipesScreen({ studioId, name, mayChange }: RecipesScreenProps) {
  const { data } = useSuspenseQuery(recipeQueries.ofStudio(studioId))
  const change = useChangeRecipes(studioId)
  const file = useRef<HTMLInputElement>(null)
  const [problem, setProblem] = useState<string | null>(null)
  const [renaming, setRenaming] = useState<KeptRecipe | null>(null)
  const [removing, setRemoving] = useState<KeptRecipe | null>(null)
  const { recipes } = data

  async function handleFile(event: ChangeEvent<HTMLInputElement>) {
    const [chosen] = event.target.files ?? []
    if (!chosen) return
    const { recipe, problem: unread } = await readRecipeFile(chosen)
    // The same file may be chosen again.
    event.target.value = ''
    setProblem(unread)
    if (!recipe) return
    change.mutate(
      { kind: 'keep', recipe },
      {
        onSuccess: () => toast.say(`“${recipe.name}” is kept.`),
        onError: (error) => setProblem(error.message),
      },
    )
  }
  const choose = () => file.current?.click()
  return (
    <>
      <title>{`Recipes · ${name} · Sconce`}</title>
      <ScreenBar
        title="Recipes"
        sub={recipes.length === 0 ? 'Setups to use again' : `${count(recipes.length, 'setup')} to use again`}
        actions={
          mayChange && recipes.length > 0
            ? [{ label: 'Add from a JSON file', onPress: choose, busy: change.isPending }]
            : []
        }
      />
      <input
        ref={file}
        type="file"
        accept=".json,application/json"
        hidden
        aria-label="Recipe to add"
        onChange={(event) => void handleFile(event)}
      />
      <div className="px-[18px] pt-4 pb-10 md:px-6 md:pt-1">
        <div className="mb-3 max-w-3xl empty:hidden">
          <FormError>{problem}</FormError>
        </div>
        {recipes.length === 0 ? (
          <Empty title="No recipe yet" action={mayChange && <Button onClick={choose}>Add from a JSON file</Button>}>
            In the lighting of a shoot, the menu of a setup has <b className="text-ink">Keep as a recipe</b>. Every
            shoot of the studio can use what is kept here.
          </Empty>
        ) : (
          <ul className="grid grid-cols-[repeat(auto-fill,minmax(min(100%,17rem),1fr))] gap-4">
            {recipes.map((kept) => (
              <li key={kept.id}>
                <RecipeCard
                  kept={kept}
                  mayChange={mayChange}
                  onRename={() => setRenaming(kept)}
                  onRemove={() => setRemoving(kept)}
                />
              </li>
            ))}
          </ul>
        )}
      </div>
      {renaming && (
        <RenameRecipe
          key={renaming.id}
          kept={renaming}
          isBusy={change.isPending}
          refusal={change.error?.message ?? null}
          onClose={() => {
            setRenaming(null)
            change.reset()
          }}
          onSave={(next) =>
            change.mutate({ kind: 'rename', kept: renaming, name: next }, { onSuccess: () => setRenaming(null) })
          }
        />
      )}
      <Confirm
        open={removing !== null}
        onOpenChange={(open) => !open && setRemoving(null)}
        title={`Remove “${removing?.name ?? ''}” from the recipes?`}
        action="Remove"
        onConfirm={() => {
          if (removing)
            change.mutate({ kind: 'remove', kept: removing }, { onError: (error) => toast.error(error.message) })
          setRemoving(null)
        }}
      >
        It cannot be brought back; save it as JSON first if it may be needed. Setups made by it stay as they are.
      </Confirm>
    </>
  )
}
