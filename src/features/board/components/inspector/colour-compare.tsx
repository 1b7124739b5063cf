import { useMemo, useState } from 'react'
import { deltaEWords, nearestIn } from '#shared/domain/board/colour.ts'
import type { Palette } from '#shared/domain/board/schema.ts'
import type { Plan } from '#shared/domain/plan/read-plan.ts'
import { palettes } from '#shared/realtime/documents.ts'
import { cn } from '#src/lib/cn.ts'
import { useItems } from '#src/realtime/use-items.ts'
import { useBoardPlan } from '../../board-plan.ts'
import { lookLabel } from '../../words.ts'
import { QUIET } from './row.tsx'

type Target = { value: string; label: string; colours: { name: string; hex: string }[] }

function targetsOf(plan: Plan, wall: ReadonlyMap<string, Palette>, without: string): Target[] {
  const looks = [...plan.looks.values()].map((planned) => ({
    value: String(planned.look.id),
    label: lookLabel(planned),
    colours: planned.pieces.flatMap((piece) =>
      piece.colour === null ? [] : [{ name: piece.name, hex: piece.colour }],
    ),
  }))
  const sets = [...plan.sets.values()].flatMap((set) =>
    set.colour === null
      ? []
      : [
          {
            value: String(set.id),
            label: `Background of ${set.name}`,
            colours: [{ name: set.background || set.name, hex: set.colour }],
          },
        ],
  )
  const hung = [...wall.values()].map((palette) => ({
    value: String(palette.id),
    label: `Palette ${palette.title || 'without title'}`,
    colours: palette.colours.map((hex) => ({ name: hex, hex })),
  }))
  return [...looks, ...sets, ...hung].filter((target) => target.value !== without && target.colours.length > 0)
}

/** The target whose farthest colour is the least far. */
function nearestTarget(palette: readonly string[], targets: readonly Target[]): Target | undefined {
  let best: { target: Target; worst: number } | undefined
  for (const target of targets) {
    const worst = Math.max(...target.colours.map(({ hex }) => nearestIn(palette, hex)?.deltaE ?? Infinity))
    if (!best || worst < best.worst) best = { target, worst }
  }
  return best?.target
}

/** From this on, two colours are not called near any more: common practice, no source. */
const NEAR = 10

function headline(label: string, distances: readonly number[]): string {
  const worst = Math.max(...distances)
  if (worst < NEAR) return `Lands within ΔE ${Math.max(1, Math.ceil(worst))} of ${label}`
  const near = distances.filter((distance) => distance < NEAR).length
  return near === 0
    ? `None of ${label} is near: the closest is ΔE ${Math.round(Math.min(...distances))} away`
    : `${near} of ${distances.length} colours of ${label} land within ΔE ${NEAR}`
}

type ColourCompareProps = {
  palette: readonly string[]
  /** What is compared with at first: the look the frame is for. */
  prefer: string | null
  /** The palette itself, which is not offered. */
  without?: string
}

/** How near a palette is to what is worn, to a wall, or to another palette. */
export function ColourCompare({ palette, prefer, without = '' }: ColourCompareProps) {
  const plan = useBoardPlan()
  const wall = useItems('board', palettes)
  const [chosen, setChosen] = useState<string | null>(null)
  const targets = useMemo(() => targetsOf(plan, wall, without), [plan, wall, without])
  const fallback = useMemo(() => nearestTarget(palette, targets), [palette, targets])
  const target =
    targets.find(({ value }) => value === chosen) ?? targets.find(({ value }) => value === prefer) ?? fallback
  if (!target || palette.length === 0) return null
  const rows = target.colours.flatMap(({ name, hex }) => {
    const nearest = nearestIn(palette, hex)
    return nearest ? [{ name, hex, nearest }] : []
  })
  return (
    <details className="mt-1 text-xs text-ink-soft">
      <summary className="rounded-r leading-[1.4] max-md:py-2">
        {headline(
          target.label,
          rows.map(({ nearest }) => nearest.deltaE),
        )}
      </summary>
      <select
        aria-label="Compare with"
        value={target.value}
        onChange={(event) => setChosen(event.target.value)}
        className={cn(QUIET, 'mt-1 w-full border-edge bg-white')}
      >
        {targets.map(({ value, label }) => (
          <option key={value} value={value}>
            {label}
          </option>
        ))}
      </select>
      <ul className="mt-1.5">
        {rows.map(({ name, hex, nearest }, index) => (
          <li key={index} className="flex items-center gap-2 border-t border-hair-soft py-1">
            <span className="flex flex-none" aria-hidden>
              <i className="size-4" style={{ background: hex }} />
              <i className="size-4" style={{ background: nearest.hex }} />
            </span>
            <span className="min-w-0 flex-1 truncate">{name}</span>
            <span className="flex-none text-right">
              ΔE {nearest.deltaE < 10 ? nearest.deltaE.toFixed(1) : Math.round(nearest.deltaE)},{' '}
              {deltaEWords(nearest.deltaE)}
            </span>
          </li>
        ))}
      </ul>
      <p className="mt-1 border-t border-hair-soft pt-1.5">
        ΔE 2000 between each colour and the nearest in the palette, in CIELAB under D65 (Sharma, Wu, Dalal 2005). About
        1 is the least an eye finds side by side, a rule of thumb. Colours are the screen’s: cloth under flash can
        differ.
      </p>
    </details>
  )
}
