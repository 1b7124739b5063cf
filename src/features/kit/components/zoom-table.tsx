import { X } from 'lucide-react'
import type { UnitNumbers } from '#shared/domain/kit/schema.ts'
import { Button, IconButton } from '#src/ui/button.tsx'
import { Field } from '#src/ui/field.tsx'
import { NumberInput } from '#src/ui/number-input.tsx'
import { useKitIssue } from '../kit-issues.ts'

type ZoomStep = UnitNumbers['zoom'][number]
export type ZoomTableProps = { zoom: UnitNumbers['zoom']; onChange: (zoom: UnitNumbers['zoom']) => void }

/** Guide numbers by zoom setting, as the maker prints them. */
export function ZoomTable({ zoom, onChange }: ZoomTableProps) {
  const last = zoom[zoom.length - 1]
  return (
    <fieldset className="min-w-0">
      <legend className="label-small mb-1">Guide number by zoom, as the maker prints it</legend>
      <ul className="flex flex-col gap-1.5">
        {zoom.map((step, index) => (
          <li key={index}>
            <ZoomRow
              index={index}
              step={step}
              onChange={(next) => onChange(zoom.with(index, next))}
              onRemove={() => onChange(zoom.toSpliced(index, 1))}
            />
          </li>
        ))}
      </ul>
      <Button
        size="small"
        className="mt-1.5"
        disabled={zoom.length >= 20}
        onClick={() =>
          onChange([
            ...zoom,
            { focalMm: Math.min(400, (last?.focalMm ?? 17.5) * 2), guideNumberM: last?.guideNumberM ?? 30 },
          ])
        }
      >
        Add a zoom setting
      </Button>
    </fieldset>
  )
}

type ZoomRowProps = { index: number; step: ZoomStep; onChange: (step: ZoomStep) => void; onRemove: () => void }

function ZoomRow({ index, step, onChange, onRemove }: ZoomRowProps) {
  return (
    <div className="flex items-start gap-2">
      <Field
        label={`Zoom setting ${index + 1}`}
        hideLabel
        className="w-28"
        error={useKitIssue(`zoom.${index}.focalMm`)}
      >
        <NumberInput unit="mm" value={step.focalMm} onChange={(focalMm) => onChange({ ...step, focalMm })} />
      </Field>
      <Field
        label={`Guide number at ${step.focalMm} mm`}
        hideLabel
        className="w-28"
        error={useKitIssue(`zoom.${index}.guideNumberM`)}
      >
        <NumberInput
          unit="m"
          value={step.guideNumberM}
          onChange={(guideNumberM) => onChange({ ...step, guideNumberM })}
        />
      </Field>
      <IconButton label={`Remove ${step.focalMm} mm`} onClick={onRemove}>
        <X size={15} aria-hidden />
      </IconButton>
    </div>
  )
}
