import { useSuspenseQuery } from '@tanstack/react-query'
import { DEFAULT_MINUTES, type Minutes } from '#shared/domain/plan/minutes.ts'
import { NumberInput } from '#src/ui/number-input.tsx'
import { useSetMinutes } from '../mutations.ts'
import { studioQueries } from '../queries.ts'

const GROUPS: readonly { title: string; rows: readonly (readonly [keyof Minutes, string])[] }[] = [
  {
    title: 'Lights',
    rows: [
      ['standMove', 'Move a light on a stand'],
      ['boomMove', 'Move a light on a boom'],
      ['add', 'Put up a light'],
      ['strike', 'Take down a light'],
      ['support', 'Change what a light stands on'],
      ['modifier', 'Change a modifier'],
      ['gel', 'Put a gel on or take it off'],
      ['powerRemote', 'Change power from the camera'],
      ['powerByHand', 'Change power at the head'],
      ['testFrames', 'Test frames after a change'],
    ],
  },
  {
    title: 'Camera and set',
    rows: [
      ['cameraMove', 'Move the camera'],
      ['lens', 'Change the lens'],
      ['panel', 'Place or take away a panel, flag or prop'],
      ['background', 'Change the background'],
      ['roomMove', 'Move to another room'],
    ],
  },
]

export type MinutesFormProps = { studioId: string; mayChange: boolean }

/** How long things take here. What the studio has not changed is marked as common practice. */
export function MinutesForm({ studioId, mayChange }: MinutesFormProps) {
  const { data } = useSuspenseQuery(studioQueries.minutes(studioId))
  const set = useSetMinutes(studioId)
  return (
    <div className="grid max-w-5xl items-start gap-6 lg:grid-cols-2">
      <p className="max-w-3xl text-sm text-ink-soft lg:col-span-2">
        How long your people take. Every changeover and running order is counted with these minutes; until you change
        one it is an assumption.
      </p>
      {GROUPS.map((group) => (
        <section key={group.title} className="rounded-r border border-hair bg-paper">
          <h2 className="px-4 pt-3 pb-2 text-lg">{group.title}</h2>
          <ul>
            {group.rows.map(([key, words]) => {
              const value = data.minutes[key]
              const isDefault = value === DEFAULT_MINUTES[key]
              return (
                <li key={key} className="flex items-center gap-3 border-t border-hair-soft px-4 py-2">
                  <label htmlFor={`minutes-${key}`} className="min-w-0 flex-1">
                    {words}
                    <span className="block text-xs text-ink-soft">
                      {isDefault ? 'common practice, no source' : `yours (common practice: ${DEFAULT_MINUTES[key]})`}
                    </span>
                  </label>
                  <NumberInput
                    id={`minutes-${key}`}
                    className="w-26 flex-none"
                    unit="min"
                    min={0}
                    max={240}
                    step={0.5}
                    value={value}
                    readOnly={!mayChange}
                    onChange={(next) => set.mutate({ ...data.minutes, [key]: next })}
                  />
                </li>
              )
            })}
          </ul>
        </section>
      ))}
    </div>
  )
}
