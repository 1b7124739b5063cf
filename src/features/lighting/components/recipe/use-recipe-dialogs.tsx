import { type ReactNode, useState } from 'react'
import { toRecipe } from '#shared/domain/recipes/recipe.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { saveRecipe } from '#src/lib/recipe-file.ts'
import { useShoot } from '#src/realtime/shoot-realtime.tsx'
import type { SheetPicture } from '../../queries.ts'
import { KeepRecipe } from './keep-recipe.tsx'
import { RecipeSheetDialog } from './recipe-sheet-dialog.tsx'

type Open = { what: 'keep' | 'sheet'; whole: WholeSetup }

/** What is done with a setup as a recipe: lines for its menu, and the dialogs they open. */
export function useRecipeDialogs(framesOf: (whole: WholeSetup) => Promise<SheetPicture[]>): {
  itemsOf: (whole: WholeSetup) => { label: string; onSelect: () => void }[]
  dialogs: ReactNode
} {
  const { inStudio } = useShoot()
  const [open, setOpen] = useState<Open | null>(null)
  const common = {
    open: true,
    onOpenChange: (next: boolean) => {
      if (!next) setOpen(null)
    },
  }
  return {
    itemsOf: (whole) => [
      ...(inStudio ? [{ label: 'Keep as a recipe', onSelect: () => setOpen({ what: 'keep', whole }) }] : []),
      { label: 'Recipe sheet as PDF', onSelect: () => setOpen({ what: 'sheet', whole }) },
      { label: 'Save as JSON', onSelect: () => saveRecipe(toRecipe(whole)) },
    ],
    dialogs:
      open?.what === 'keep' ? (
        <KeepRecipe key={open.whole.setup.id} whole={open.whole} {...common} />
      ) : open?.what === 'sheet' ? (
        <RecipeSheetDialog
          key={open.whole.setup.id}
          whole={open.whole}
          frames={() => framesOf(open.whole)}
          {...common}
        />
      ) : null,
  }
}
