import { useState } from 'react'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { useMayWrite, useShoot } from '#src/realtime/shoot-realtime.tsx'
import { usePlan } from '#src/realtime/use-plan.ts'
import { Button } from '#src/ui/button.tsx'
import { Confirm } from '#src/ui/confirm.tsx'
import { Empty } from '#src/ui/empty.tsx'
import { ScreenBar } from '#src/ui/screen-bar.tsx'
import { useIsPhone } from '#src/ui/use-media.ts'
import { setupUse } from '#shared/domain/lighting/setup-use.ts'
import { wearingOf } from '#shared/domain/lighting/wearing.ts'
import { useSheetFrames } from '../test-frame/use-sheet-frames.ts'
import { useKit } from '../use-kit.ts'
import { useSetups } from '../use-setups.ts'
import { BringList } from './bring-list.tsx'
import { UseRecipe } from './recipe/use-recipe.tsx'
import { useRecipeDialogs } from './recipe/use-recipe-dialogs.tsx'
import { SetupCard } from './setup-card.tsx'
import { UnitSwitch, useUnitAction } from './unit-switch.tsx'

/** All setups of the shoot. */
export function LightingScreen() {
  const plan = usePlan()
  const shoot = useShoot()
  const mayWrite = useMayWrite('lighting')
  const setups = useSetups()
  const isPhone = useIsPhone()
  const unitAction = useUnitAction()
  const recipes = useRecipeDialogs(useSheetFrames(plan))
  const [isUsing, setIsUsing] = useState(false)
  const [removing, setRemoving] = useState<WholeSetup | null>(null)
  const all = [...plan.setups.values()]
  const address = (setupId: string) => `/shoots/${shoot.id}/lighting/${setupId}`
  const kit = useKit()
  const used = all.filter((whole) => setupUse(plan, whole.setup.id).shots.length > 0)
  const losing = removing ? setupUse(plan, removing.setup.id).shots : []
  return (
    <>
      <ScreenBar
        title="Lighting"
        sub={all.length === 0 ? undefined : `${all.length} ${all.length === 1 ? 'setup' : 'setups'}`}
        actions={[
          ...(isPhone ? [unitAction] : []),
          ...(mayWrite
            ? [
                { label: 'Use a recipe', onPress: () => setIsUsing(true) },
                { label: 'Add a setup', variant: 'primary' as const, onPress: setups.add },
              ]
            : []),
        ]}
      >
        {isPhone ? undefined : <UnitSwitch />}
      </ScreenBar>
      {all.length === 0 ? (
        <Empty
          title="No setup yet"
          action={
            mayWrite && (
              <>
                <Button onClick={() => setIsUsing(true)}>Use a recipe</Button>
                <Button variant="primary" onClick={setups.add}>
                  Light the first setup
                </Button>
              </>
            )
          }
        >
          A setup is camera, sitter, background and lights, drawn to scale. Shots share setups: the fewer differ, the
          shorter the changeovers.
        </Empty>
      ) : (
        <ul className="grid grid-cols-[repeat(auto-fill,minmax(min(100%,17rem),1fr))] gap-4 px-[18px] py-4 md:px-6 md:pt-1 md:pb-8">
          {all.map((whole) => (
            <li key={whole.setup.id}>
              <SetupCard
                whole={whole}
                use={setupUse(plan, whole.setup.id)}
                wearing={wearingOf(plan, whole.setup.id)}
                to={address(whole.setup.id)}
                mayWrite={mayWrite}
                actions={setups}
                recipeItems={recipes.itemsOf(whole)}
                onRemove={() => setRemoving(whole)}
              />
            </li>
          ))}
        </ul>
      )}
      {used.length > 0 && <BringList setups={used} kit={kit} />}
      {recipes.dialogs}
      <UseRecipe open={isUsing} onOpenChange={setIsUsing} onUse={setups.byRecipe} />
      <Confirm
        open={removing !== null}
        onOpenChange={(open) => {
          if (!open) setRemoving(null)
        }}
        title={`Remove “${removing?.setup.name ?? ''}”?`}
        action="Remove"
        onConfirm={() => {
          if (removing) setups.remove(removing)
          setRemoving(null)
        }}
      >
        {losing.length === 0 ? (
          'No shot uses it. Its lights go with it; Undo brings them back.'
        ) : (
          <>
            {losing.length === 1 ? 'This shot loses its light:' : 'These shots lose their light:'}
            <ul className="mt-1 list-disc pl-5 text-ink">
              {losing.map((shot) => (
                <li key={shot.shot.id}>
                  {shot.number === null ? '' : `${shot.number} · `}
                  {shot.shot.title}
                </li>
              ))}
            </ul>
          </>
        )}
      </Confirm>
    </>
  )
}
