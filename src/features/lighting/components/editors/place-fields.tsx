import { useState } from 'react'
import type { Point } from '#shared/domain/lighting/schema.ts'
import { facePoint } from '#shared/domain/lighting/geometry.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { Field } from '#src/ui/field.tsx'
import { NumberInput } from '#src/ui/number-input.tsx'
import { Select } from '#src/ui/select.tsx'
import { measuresOf, pointAt } from '../../measures.ts'
import { LengthInput } from './length-input.tsx'
import { PointFields } from './point-fields.tsx'

type PlaceFieldsProps = {
  point: Point
  whole: WholeSetup
  onChange: (change: (written: Point) => Point) => void
}

const WAYS = [
  { value: 'mark', label: 'From the sitter’s mark: right, front, height' },
  { value: 'eyes', label: 'From the eyes: distance, angle, height' },
] as const

/** Where a light stands, as a plan says it or as a tape does. */
export function PlaceFields({ point, whole, onChange }: PlaceFieldsProps) {
  const [way, setWay] = useState<(typeof WAYS)[number]['value']>('mark')
  return (
    <>
      <Field label="Measured" hideLabel>
        <Select options={WAYS} value={way} onChange={setWay} />
      </Field>
      {way === 'mark' ? (
        <PointFields point={point} onChange={onChange} />
      ) : (
        <ByTape point={point} whole={whole} onChange={onChange} />
      )}
    </>
  )
}

/** The angle is about the sitter, from the camera; a new height leaves the stand where it is. */
function ByTape({ point, whole, onChange }: PlaceFieldsProps) {
  const { toEyesM, fromAxisDeg } = measuresOf(point, whole)
  const rise = Math.abs(point[1] - facePoint(whole)[1])
  const again = (next: { toEyesM?: number; fromAxisDeg?: number }) =>
    onChange((written) => pointAt({ ...measuresOf(written, whole), ...next }, written[1], whole))
  return (
    <>
      <div className="grid grid-cols-3 gap-2">
        <Field label="To the eyes">
          <LengthInput value={toEyesM} min={rise} max={50} onChange={(metres) => again({ toEyesM: metres })} />
        </Field>
        <Field label="Angle (left −)">
          <NumberInput
            value={fromAxisDeg}
            unit="°"
            min={-180}
            max={180}
            step={5}
            decimals={0}
            onChange={(deg) => again({ fromAxisDeg: deg })}
          />
        </Field>
        <Field label="Height">
          <LengthInput
            value={point[1]}
            min={0}
            max={12}
            onChange={(next) => onChange(([across, , deep]) => [across, next, deep])}
          />
        </Field>
      </div>
      <p className="text-xs text-ink-soft">
        The angle is about the sitter: 0° at the camera, 180° straight behind. The distance is never less than the
        height over or under the eyes.
      </p>
    </>
  )
}
