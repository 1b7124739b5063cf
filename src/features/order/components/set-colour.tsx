import { Button } from '#src/ui/button.tsx'
import { ColourInput } from '#src/ui/colour-input.tsx'
import { Field } from '#src/ui/field.tsx'

export type SetColourProps = { value: string | null; readOnly: boolean; onChange: (colour: string | null) => void }

/** The colour of a set's walls; taken over once the picker is closed, not at every shade on the way. */
export function SetColour({ value, readOnly, onChange }: SetColourProps) {
  return (
    <Field
      label="Colour"
      hint={value === null ? 'None chosen.' : ''}
      aside={
        value !== null &&
        !readOnly && (
          <Button variant="quiet" size="small" className="!-my-1 !min-h-0 !py-0.5" onClick={() => onChange(null)}>
            None
          </Button>
        )
      }
    >
      <ColourInput disabled={readOnly} value={value ?? '#8a8a86'} onCommit={onChange} />
    </Field>
  )
}
