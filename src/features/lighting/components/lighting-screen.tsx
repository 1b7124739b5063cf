import { useState } from 'react'
import { useNavigate } from 'react-router-dom'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { useDoc, useMayWrite, useShoot } from '#src/realtime/shoot-realtime.tsx'
import { usePlan } from '#src/realtime/use-plan.ts'
import { useUndo } from '#src/realtime/use-undo.ts'
import { Button } from '#src/ui/button.tsx'
import { Confirm } from '#src/ui/confirm.tsx'
import { Empty } from '#src/ui/empty.tsx'
import { ScreenBar } from '#src/ui/screen-bar.tsx'
import { toast } from '#src/ui/toast.ts'
import { copyOf, newSetup } from '../new-items.ts'
import { setupUse } from '#shared/domain/lighting/setup-use.ts'
import { putSetup, removeSetup, restoreSetup } from '../write-setups.ts'
import { SetupCard } from './setup-card.tsx'

/** All setups of the shoot. */
export function LightingScreen() {
  const plan = usePlan()
  const shoot = useShoot()
  const doc = useDoc('lighting')
  const mayWrite = useMayWrite('lighting')
  const undo = useUndo(['lighting'])
  const navigate = useNavigate()
  const [removing, setRemoving] = useState<WholeSetup | null>(null)
  const all = [...plan.setups.values()]
  const address = (setupId: string) => `/shoots/${shoot.id}/lighting/${setupId}`
  const ranks = all.map((whole) => whole.setup.rank)

  function freeName(wanted: string): string {
    const names = new Set(all.map((whole) => whole.setup.name))
    if (!names.has(wanted)) return wanted
    for (let number = 2; ; number++) if (!names.has(`${wanted} ${number}`)) return `${wanted} ${number}`
  }
  function step(write: () => void) {
    undo.stop()
    write()
    undo.stop()
  }
  function add() {
    const { setup, place } = newSetup(freeName(`Setup ${all.length + 1}`), ranks, Math.random)
    step(() => putSetup(doc, { setup, places: [place], lights: [], props: [] }))
    void navigate(address(setup.id))
  }
  function duplicate(whole: WholeSetup) {
    const copy = copyOf(whole, freeName(`${whole.setup.name}, variation`.slice(0, 76)), ranks, Math.random)
    step(() => putSetup(doc, copy))
    toast.say(`“${copy.setup.name}” is a setup of its own now.`)
  }
  function remove(whole: WholeSetup) {
    step(() => removeSetup(doc, whole))
    setRemoving(null)
    toast.say(`“${whole.setup.name}” is removed.`, {
      label: 'Undo',
      onPress: () => step(() => restoreSetup(doc, whole)),
    })
  }

  const losing = removing ? setupUse(plan, removing.setup.id).shots : []
  return (
    <>
      <ScreenBar
        title="Lighting"
        sub={all.length === 0 ? undefined : `${all.length} ${all.length === 1 ? 'setup' : 'setups'}`}
        actions={mayWrite ? [{ label: 'Add a setup', variant: 'primary', onPress: add }] : []}
      />
      {all.length === 0 ? (
        <Empty
          title="No setup yet"
          action={
            mayWrite && (
              <Button variant="primary" onClick={add}>
                Light the first setup
              </Button>
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
                to={address(whole.setup.id)}
                mayWrite={mayWrite}
                onDuplicate={() => duplicate(whole)}
                onRemove={() => setRemoving(whole)}
              />
            </li>
          ))}
        </ul>
      )}
      <Confirm
        open={removing !== null}
        onOpenChange={(open) => {
          if (!open) setRemoving(null)
        }}
        title={`Remove “${removing?.setup.name ?? ''}”?`}
        action="Remove"
        onConfirm={() => {
          if (removing) remove(removing)
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
