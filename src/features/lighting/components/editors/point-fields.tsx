import type { Point } from '#shared/domain/lighting/schema.ts'
import { Field } from '#src/ui/field.tsx'
import { LengthInput } from './length-input.tsx'

type PointFieldsProps = {
  point: Point
  /** What has changed, from whatever is written: the numbers that were not touched stay as others have them. */
  onChange: (change: (written: Point) => Point) => void
  heightLabel?: string
  heights?: { min: number; max: number }
}

/** A place as three numbers: sideways, towards the camera, height. */
export function PointFields({ point, onChange, heightLabel = 'Height', heights }: PointFieldsProps) {
  const [x, y, z] = point
  return (
    <div className="grid grid-cols-3 gap-2">
      <Field label="Right (left −)">
        <LengthInput value={x} min={-50} max={50} onChange={(next) => onChange(([, up, deep]) => [next, up, deep])} />
      </Field>
      <Field label="Front (back −)">
        <LengthInput value={z} min={-50} max={50} onChange={(next) => onChange(([across, up]) => [across, up, next])} />
      </Field>
      <Field label={heightLabel}>
        <LengthInput
          value={y}
          min={heights?.min ?? 0}
          max={heights?.max ?? 12}
          onChange={(next) => onChange(([across, , deep]) => [across, next, deep])}
        />
      </Field>
    </div>
  )
}
