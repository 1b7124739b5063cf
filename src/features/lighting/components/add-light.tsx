import { useState } from 'react'
import { LIGHT_PURPOSES, type Light, type LightPurpose } from '#shared/domain/lighting/schema.ts'
import { purposeWord } from '#shared/domain/lighting/words.ts'
import { cn } from '#src/lib/cn.ts'
import { Button } from '#src/ui/button.tsx'
import { Dialog } from '#src/ui/dialog.tsx'
import { Field } from '#src/ui/field.tsx'
import { Select } from '#src/ui/select.tsx'
import type { NewLight } from '../new-items.ts'
import { type Kit, unitWords } from '../use-kit.ts'

type AddLightProps = {
  open: boolean
  onOpenChange: (open: boolean) => void
  lights: readonly Light[]
  kit: Kit
  /** What it is for to begin with; absent: what is missing. */
  purpose?: LightPurpose | null
  onAdd: (light: NewLight) => void
}

const HINTS: Record<LightPurpose, string> = {
  main: 'Models the face',
  fill: 'Opens the shadows',
  background: 'Lights the wall',
  rim: 'Edges from behind',
  accent: 'A touch somewhere',
}

/** Asks what the light is for and what it is made of; it comes to stand at the usual place and is then dragged. */
export function AddLight({ open, onOpenChange, ...rest }: AddLightProps) {
  return (
    <Dialog open={open} onOpenChange={onOpenChange} title="Add a light">
      {open && <AddLightForm {...rest} onClose={() => onOpenChange(false)} />}
    </Dialog>
  )
}

function AddLightForm({
  lights,
  kit,
  purpose: wanted = null,
  onAdd,
  onClose,
}: Omit<AddLightProps, 'open' | 'onOpenChange'> & { onClose: () => void }) {
  const has = (purpose: LightPurpose) => lights.some((light) => light.purpose === purpose)
  const [purpose, setPurpose] = useState<LightPurpose>(
    () => wanted ?? LIGHT_PURPOSES.find((candidate) => !has(candidate)) ?? 'accent',
  )
  const [unitId, setUnitId] = useState(() => lights.at(-1)?.unit.kitId ?? '')
  const [modifierId, setModifierId] = useState('')
  const [supportId, setSupportId] = useState(() => lights.at(-1)?.support?.kitId ?? '')
  const unit = kit.units.find((candidate) => candidate.kitId === unitId) ?? kit.units[0]
  const support = kit.supports.find((candidate) => candidate.kitId === supportId) ?? kit.supports[0] ?? null
  if (!unit) {
    return (
      <p className="text-base text-ink-soft">
        {kit.state === 'there'
          ? 'The kit room has no flash unit and no lamp yet. Put one in there first; its numbers are what the light is worked out from.'
          : kit.state === 'coming'
            ? 'The kit is on its way…'
            : 'The kit room cannot be reached. Lights that stand already can still be changed; add new ones when you have a signal.'}
      </p>
    )
  }
  return (
    <form
      className="flex flex-col gap-4"
      onSubmit={(event) => {
        event.preventDefault()
        onAdd({
          purpose,
          unit,
          modifier: kit.modifiers.find((candidate) => candidate.kitId === modifierId) ?? null,
          support,
        })
        onClose()
      }}
    >
      <fieldset>
        <legend className="label-small mb-1">What it is for</legend>
        <div className="grid grid-cols-2 gap-1.5 sm:grid-cols-3">
          {LIGHT_PURPOSES.map((candidate) => (
            <label
              key={candidate}
              className={cn(
                'cursor-pointer rounded-r border px-3 py-2 text-base has-focus-visible:outline-2 has-focus-visible:outline-draft',
                purpose === candidate ? 'border-ink bg-white font-semibold' : 'border-edge hover:border-ink-soft',
              )}
            >
              <input
                type="radio"
                name="purpose"
                className="sr-only"
                checked={purpose === candidate}
                onChange={() => setPurpose(candidate)}
              />
              {candidate.charAt(0).toUpperCase() + candidate.slice(1)}
              <span className="block text-xs font-normal text-ink-soft">{HINTS[candidate]}</span>
            </label>
          ))}
        </div>
      </fieldset>
      <Field label="Unit">
        <Select
          options={kit.units.map((item) => ({ value: String(item.kitId), label: unitWords(item) }))}
          value={unit.kitId}
          onChange={setUnitId}
        />
      </Field>
      <Field label="Modifier">
        <Select
          options={[
            { value: '', label: 'None, bare' },
            ...kit.modifiers.map((item) => ({ value: String(item.kitId), label: item.name })),
          ]}
          value={modifierId}
          onChange={setModifierId}
        />
      </Field>
      {support && (
        <Field label="Stands on">
          <Select
            options={kit.supports.map((item) => ({ value: String(item.kitId), label: item.name }))}
            value={support.kitId}
            onChange={setSupportId}
          />
        </Field>
      )}
      <div className="flex justify-end">
        <Button type="submit" variant="primary">
          Add the {purposeWord(purpose).toLowerCase()}
        </Button>
      </div>
    </form>
  )
}
