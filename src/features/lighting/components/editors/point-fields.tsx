import type { Point } from '#shared/domain/lighting/schema.ts'
import { Field } from '#src/ui/field.tsx'
import { NumberInput } from '#src/ui/number-input.tsx'

type PointFieldsProps = { point: Point; onChange: (point: Point) => void; heightLabel?: string }

/** A place as three numbers: sideways, towards the camera, height. */
export function PointFields({ point, onChange, heightLabel = 'Height' }: PointFieldsProps) {
  const [x, y, z] = point
  return (
    <div className="grid grid-cols-3 gap-2">
      <Field label="Right (left −)">
        <NumberInput
          value={x}
          unit="m"
          min={-50}
          max={50}
          step={0.1}
          decimals={2}
          onChange={(next) => onChange([next, y, z])}
        />
      </Field>
      <Field label="Front (back −)">
        <NumberInput
          value={z}
          unit="m"
          min={-50}
          max={50}
          step={0.1}
          decimals={2}
          onChange={(next) => onChange([x, y, next])}
        />
      </Field>
      <Field label={heightLabel}>
        <NumberInput
          value={y}
          unit="m"
          min={0}
          max={12}
          step={0.1}
          decimals={2}
          onChange={(next) => onChange([x, next, z])}
        />
      </Field>
    </div>
  )
}
