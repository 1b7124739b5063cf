import { setupUse } from '#shared/domain/lighting/setup-use.ts'
import { wearingOf } from '#shared/domain/lighting/wearing.ts'
import type { Plan, WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { type SheetFrame, framesForSheet } from './frames-for-sheet.ts'
import { useFrameRenderer } from './shared-renderer.ts'

/** The test frames of any setup of the plan as files, for its recipe sheet. */
export function useSheetFrames(plan: Plan): (whole: WholeSetup) => Promise<SheetFrame[]> {
  const renderer = useFrameRenderer()
  return (whole) =>
    framesForSheet(
      renderer,
      whole,
      setupUse(plan, whole.setup.id).orientations[0] ?? 'upright',
      wearingOf(plan, whole.setup.id),
    )
}
