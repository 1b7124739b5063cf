import { METRES_PER_INCH, lengthText, parseLength, useLengthUnit } from '#src/lib/length-unit.ts'
import { NumberInput } from '#src/ui/number-input.tsx'

type LengthInputProps = {
  /** Metres, whatever the device shows and takes. */
  value: number
  min: number
  max: number
  /** One press of an arrow key, metres; in feet the nearest whole inch. */
  stepM?: number
  onChange: (metres: number) => void
}

/** A length, shown and typed in metres or in feet and inches; each also takes the other. */
export function LengthInput({ value, min, max, stepM = 0.1, onChange }: LengthInputProps) {
  const unit = useLengthUnit()
  return (
    <NumberInput
      value={value}
      min={min}
      max={max}
      step={unit === 'm' ? stepM : Math.round(stepM / METRES_PER_INCH) * METRES_PER_INCH}
      read={(text) => parseLength(text, unit)}
      write={(metres) => lengthText(metres, unit)}
      onChange={onChange}
      {...(unit === 'm' ? { unit } : { inputMode: 'text' as const })}
    />
  )
}
