import { Field } from '#src/ui/field.tsx'
import { Input } from '#src/ui/input.tsx'
import { NumberInput } from '#src/ui/number-input.tsx'
import { Select } from '#src/ui/select.tsx'
import { Textarea } from '#src/ui/textarea.tsx'
import { useKitIssue } from '../kit-issues.ts'

/** Boxes that stand side by side where there is room. */
export const GRID = 'grid gap-x-6 gap-y-4 sm:grid-cols-2'

const POWERS = [1, 2, 4, 8, 16, 32, 64, 128, 256, 512, 1024]

type LeastPowerProps = { value: number; onChange: (denominator: number) => void }

export function LeastPower({ value, onChange }: LeastPowerProps) {
  return (
    <Field label="Smallest power" error={useKitIssue('minPowerDenominator')}>
      <Select
        options={[...new Set([...POWERS, value])]
          .sort((a, b) => a - b)
          .map((power) => ({ value: String(power), label: power === 1 ? 'Full only' : `1/${power}` }))}
        value={String(value)}
        onChange={(power) => onChange(Number(power))}
      />
    </Field>
  )
}

type SizeProps = {
  /** What has the size: "face", "panel". */
  of: string
  widthM: number
  heightM: number
  onChange: (size: { widthM: number } | { heightM: number }) => void
}

export function Size({ of, widthM, heightM, onChange }: SizeProps) {
  return (
    <div className="grid grid-cols-2 items-start gap-2">
      <Field label={`Width of the ${of}`} error={useKitIssue('widthM')}>
        <NumberInput unit="m" step={0.05} value={widthM} onChange={(width) => onChange({ widthM: width })} />
      </Field>
      <Field label={`Height of the ${of}`} error={useKitIssue('heightM')}>
        <NumberInput unit="m" step={0.05} value={heightM} onChange={(height) => onChange({ heightM: height })} />
      </Field>
    </div>
  )
}

type DrawnColourProps = { value: string; onChange: (colour: string) => void }

export function DrawnColour({ value, onChange }: DrawnColourProps) {
  return (
    <Field label="Colour it is drawn with" error={useKitIssue('colour')}>
      <Input
        type="color"
        className="!h-9 !p-1 max-md:!h-11"
        value={value}
        onChange={(event) => onChange(event.target.value)}
      />
    </Field>
  )
}

type WordsProps = { name: string; label: string; hint: string; value: string; onChange: (words: string) => void }

export function Words({ name, label, hint, value, onChange }: WordsProps) {
  return (
    <Field label={label} hint={hint} error={useKitIssue(name)}>
      <Textarea rows={2} maxLength={200} value={value} onChange={(event) => onChange(event.target.value)} />
    </Field>
  )
}
