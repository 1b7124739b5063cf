import { MoreHorizontal } from 'lucide-react'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { IconButton } from '#src/ui/button.tsx'
import { Menu } from '#src/ui/menu.tsx'
import { ScreenBar } from '#src/ui/screen-bar.tsx'
import { useIsPhone } from '#src/ui/use-media.ts'
import type { SetupWriter } from '../use-setup-writer.ts'
import { useSetups, wholeItems } from '../use-setups.ts'
import { UnitSwitch, useUnitAction } from './unit-switch.tsx'

type Item = { label: string; onSelect: () => void }

type SetupBarProps = {
  whole: WholeSetup
  /** The shots that use it, in words. */
  usedWords: string
  mayWrite: boolean
  undo: SetupWriter['undo']
  recipeItems: readonly Item[]
  onMeter: () => void
  onAddLight: () => void
}

/** The head of a setup: its name, and what is done with it as a whole. */
export function SetupBar({ whole, usedWords, mayWrite, undo, recipeItems, onMeter, onAddLight }: SetupBarProps) {
  const isPhone = useIsPhone()
  const setups = useSetups()
  const unitAction = useUnitAction()
  const own: readonly Item[] = mayWrite ? wholeItems(whole, setups) : []
  // A phone has one menu for everything.
  const folded = isPhone
    ? [...[...own, ...recipeItems].map(({ label, onSelect }) => ({ label, onPress: onSelect })), unitAction]
    : []
  const actions = mayWrite
    ? [
        { label: 'Undo', variant: 'quiet' as const, disabled: !undo.canUndo, onPress: undo.undo },
        { label: 'Redo', variant: 'quiet' as const, disabled: !undo.canRedo, onPress: undo.redo },
        { label: 'Meter readings', variant: 'quiet' as const, onPress: onMeter },
        ...folded,
        { label: 'Add a light', variant: 'primary' as const, onPress: onAddLight },
      ]
    : folded
  return (
    <ScreenBar title={whole.setup.name} sub={mayWrite ? usedWords : `${usedWords} · to read only`} actions={actions}>
      {isPhone ? undefined : (
        <>
          <UnitSwitch />
          <Menu
            trigger={
              <IconButton label="More for this setup">
                <MoreHorizontal size={18} aria-hidden />
              </IconButton>
            }
            items={[...own, ...(own.length > 0 ? ['line' as const] : []), ...recipeItems]}
          />
        </>
      )}
    </ScreenBar>
  )
}
