import type { SetupId, ShootId } from '#shared/ids.ts'
import type { RecipeSheetInput } from '#shared/api/recipes.ts'
import { setupUse, widestOf } from '#shared/domain/lighting/setup-use.ts'
import { recipeFileName } from '#shared/domain/recipes/recipe.ts'
import { sheetOf } from '#shared/domain/recipes/sheet.ts'
import type { Ctx } from '#server/context.ts'
import { AppError } from '#server/errors.ts'
import { readShootPlan } from '#server/features/plan/read-shoot-plan.ts'
import { readFrames } from './frame-pictures.ts'
import { layOut } from './sheet-thread.ts'

export type MakeRecipeSheet = RecipeSheetInput & {
  shootId: ShootId
  setupId: SetupId
  /** Pictures in the order of `captions`. */
  frames: readonly Uint8Array[]
}

/**
 * The recipe sheet of a setup as it stands: bytes of a PDF, and a name for the file. For whoever may read the shoot.
 *
 * @throws SIGNED_OUT; NOT_FOUND (shoot or setup); BAD_REQUEST, UNSUPPORTED for a picture that cannot be read
 */
export async function makeRecipeSheet(
  ctx: Ctx,
  { shootId, setupId, paper, unit, captions, frames }: MakeRecipeSheet,
): Promise<{ pdf: Buffer; fileName: string }> {
  const plan = await readShootPlan(ctx, shootId)
  const whole = plan.setups.get(setupId)
  if (!whole)
    throw new AppError(
      'NOT_FOUND',
      'This setup is not in the shoot any more. No sheet was made; look at the list again.',
    )
  const use = setupUse(plan, setupId)
  const date = new Intl.DateTimeFormat('en-GB', { dateStyle: 'long', timeZone: plan.brief.zone }).format(ctx.now())
  const pictures = await readFrames(frames.map((bytes, index) => ({ caption: captions[index] ?? '', bytes })))
  const pdf = await layOut({
    paper,
    unit,
    shoot: plan.brief.title,
    date,
    used: use.words.charAt(0).toUpperCase() + use.words.slice(1),
    orientation: widestOf(use.orientations),
    whole,
    sheet: sheetOf(whole, use, unit),
    frames: pictures,
  })
  return { pdf: Buffer.from(pdf), fileName: recipeFileName(whole.setup.name).replace(/\.json$/, '.pdf') }
}
