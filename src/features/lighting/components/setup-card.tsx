import { MoreHorizontal } from 'lucide-react'
import { Link } from 'react-router-dom'
import { redCautions } from '#shared/domain/lighting/cautions.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { count } from '#src/lib/format.ts'
import { IconButton } from '#src/ui/button.tsx'
import { Lamp, type LampState } from '#src/ui/lamp.tsx'
import { Menu, type MenuItem } from '#src/ui/menu.tsx'
import type { Wearing } from '#shared/domain/lighting/test-frame/scene-of.ts'
import type { SetupUse } from '#shared/domain/lighting/setup-use.ts'
import { type SetupActions, wholeItems } from '../use-setups.ts'
import { CardFrame } from './frames/card-frame.tsx'
import { PlanSketch } from './plan/plan-sketch.tsx'

type SetupCardProps = {
  whole: WholeSetup
  use: SetupUse
  wearing: Wearing
  to: string
  mayWrite: boolean
  actions: SetupActions
  recipeItems: readonly MenuItem[]
  onRemove: () => void
}

/** How far a setup is, in one lamp and a few words. */
function lampOf(whole: WholeSetup, use: SetupUse): { state: LampState; why: string } {
  if (whole.lights.length === 0) return { state: 'unlit', why: 'No light yet' }
  if (!whole.lights.some((light) => light.purpose === 'main')) return { state: 'half', why: 'No main yet' }
  const red = redCautions(whole, { orientations: use.orientations, frames: use.frames })[0]
  return red === undefined ? { state: 'lit', why: 'Nothing in its way' } : { state: 'half', why: red }
}

export function SetupCard({ whole, use, to, mayWrite, actions, wearing, recipeItems, onRemove }: SetupCardProps) {
  const { setup, lights } = whole
  const lamp = lampOf(whole, use)
  const off = lights.filter((light) => !light.isOn).length
  const purposes = lights.map((light) => light.purpose)
  return (
    <article className="relative h-full rounded-r border border-hair bg-paper hover:border-edge has-[a:focus-visible]:border-draft">
      <div className="flex">
        <div className="min-w-0 flex-1">
          <PlanSketch whole={whole} />
        </div>
        <CardFrame whole={whole} orientation={use.orientations[0] ?? 'upright'} wearing={wearing} />
      </div>
      <div className="flex items-start gap-2 px-3.5 pt-3 pb-3.5">
        <div className="min-w-0 flex-1">
          <h2 className="text-[1.0625rem] leading-snug">
            <Link to={to} className="after:absolute after:inset-0">
              {setup.name}
            </Link>
          </h2>
          <p className="mt-0.5 text-sm text-ink-soft">
            {count(lights.length, 'light')}
            {purposes.length > 0 && `: ${[...new Set(purposes)].join(', ')}`}
            {off > 0 && ` · ${off} off`}
          </p>
          <p className="text-sm text-ink-soft">{use.words.charAt(0).toUpperCase() + use.words.slice(1)}</p>
          <p className="mt-2 flex items-center gap-2 text-sm">
            <Lamp state={lamp.state} />
            {lamp.why}
          </p>
        </div>
        <div className="relative z-10 -mt-1 -mr-2">
          <Menu
            trigger={
              <IconButton label={`More for ${setup.name}`}>
                <MoreHorizontal size={18} aria-hidden />
              </IconButton>
            }
            items={
              mayWrite
                ? [
                    ...wholeItems(whole, actions),
                    'line',
                    ...recipeItems,
                    'line',
                    { label: 'Remove', onSelect: onRemove, danger: true },
                  ]
                : recipeItems
            }
          />
        </div>
      </div>
    </article>
  )
}
