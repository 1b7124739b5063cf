import { useState } from 'react'
import type { Plan, PlannedShot } from '#shared/domain/plan/read-plan.ts'
import { type RuleBody, ruleBodySchema } from '#shared/domain/plan/schema.ts'
import { Button } from '#src/ui/button.tsx'
import { Field } from '#src/ui/field.tsx'
import { NumberInput } from '#src/ui/number-input.tsx'
import { Select } from '#src/ui/select.tsx'
import { ClockInput } from './clock-input.tsx'

const KINDS = [
  { value: 'pin-place', label: 'Stays at this place' },
  { value: 'pin-clock', label: 'Starts at …' },
  { value: 'after', label: 'Comes after …' },
  { value: 'together', label: 'Together with …' },
  { value: 'window', label: 'Only between … and …' },
] as const

type Kind = RuleBody['kind']

export type RuleFormProps = {
  planned: PlannedShot
  plan: Plan
  /** Place among the shots of its day, counted from 0. */
  index: number
  startMin: number
  onAdd: (rule: RuleBody) => void
  onCancel: () => void
}

/** A new rule for one shot, in plain words. */
export function RuleForm({ planned, plan, index, startMin, onAdd, onCancel }: RuleFormProps) {
  const [kind, setKind] = useState<Kind>('pin-place')
  const [place, setPlace] = useState<'here' | 'first' | 'last'>('here')
  const [atMin, setAtMin] = useState(Math.ceil(startMin / 5) * 5)
  const [toleranceMin, setToleranceMin] = useState(10)
  const [fromMin, setFromMin] = useState(Math.floor(startMin / 30) * 30)
  const [toMin, setToMin] = useState(Math.floor(startMin / 30) * 30 + 120)
  const others = [...plan.shots.values()]
    .filter(({ shot }) => shot.id !== planned.shot.id)
    .sort((a, b) => (a.number ?? 999) - (b.number ?? 999))
  const [other, setOther] = useState('')
  const otherId = other === '' ? String(others[0]?.shot.id ?? '') : other
  const shotId = planned.shot.id
  const bodies: Record<Kind, unknown> = {
    'pin-place': { kind, shotId, index: place === 'here' ? index : place === 'first' ? 0 : -1 },
    'pin-clock': { kind, shotId, atMin, toleranceMin },
    after: { kind, shotId, afterShotId: otherId },
    together: { kind, shotIds: [shotId, otherId] },
    window: { kind, shotId, fromMin, toMin },
  }
  const rule = ruleBodySchema.safeParse(bodies[kind])
  const needsOther = kind === 'after' || kind === 'together'
  return (
    <div className="flex flex-col gap-3 border-l-3 border-draft bg-draft-wash/50 px-3 py-2.5">
      <Field label="Rule">
        <Select
          value={kind}
          options={
            needsOther || others.length > 0
              ? KINDS
              : KINDS.filter(({ value }) => value !== 'after' && value !== 'together')
          }
          onChange={setKind}
        />
      </Field>
      {kind === 'pin-place' && (
        <Field label="Place">
          <Select
            value={place}
            options={[
              { value: 'here', label: `This place, number ${index + 1} of the day` },
              { value: 'first', label: 'First of the day' },
              { value: 'last', label: 'Last of the day' },
            ]}
            onChange={setPlace}
          />
        </Field>
      )}
      {kind === 'pin-clock' && (
        <div className="grid grid-cols-2 gap-3">
          <Field label="Starts at">
            <ClockInput valueMin={atMin} onChange={setAtMin} />
          </Field>
          <Field label="At most later">
            <NumberInput value={toleranceMin} unit="min" min={0} max={240} step={5} onChange={setToleranceMin} />
          </Field>
        </div>
      )}
      {needsOther && (
        <Field label={kind === 'after' ? 'Comes after' : 'Together with'}>
          <Select
            value={otherId}
            options={others.map(({ shot, number }) => ({
              value: String(shot.id),
              label: `${number ?? 'Not placed:'} ${shot.title}`,
            }))}
            onChange={setOther}
          />
        </Field>
      )}
      {kind === 'window' && (
        <div className="grid grid-cols-2 gap-3">
          <Field label="Between">
            <ClockInput valueMin={fromMin} onChange={setFromMin} />
          </Field>
          <Field label="And">
            <ClockInput valueMin={toMin} notBeforeMin={fromMin} onChange={setToMin} />
          </Field>
        </div>
      )}
      <div className="flex gap-2">
        <Button size="small" disabled={!rule.success} onClick={() => rule.success && onAdd(rule.data)}>
          Add this rule
        </Button>
        <Button size="small" variant="quiet" onClick={onCancel}>
          Cancel
        </Button>
      </div>
    </div>
  )
}
