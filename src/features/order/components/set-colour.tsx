import { useEffect, useRef, useState } from 'react'
import { Button } from '#src/ui/button.tsx'
import { Field } from '#src/ui/field.tsx'
import { Input } from '#src/ui/input.tsx'

export type SetColourProps = { value: string | null; readOnly: boolean; onChange: (colour: string | null) => void }

/** The colour of a set's walls; taken over once the picker is closed, not at every shade on the way. */
export function SetColour({ value, readOnly, onChange }: SetColourProps) {
  const [draft, setDraft] = useState<string | null>(null)
  const input = useRef<HTMLInputElement>(null)
  useEffect(() => {
    const element = input.current
    // React's onChange is the browser's `input`; `change` comes once.
    const handle = () => {
      setDraft(null)
      if (element && element.value !== value) onChange(element.value)
    }
    element?.addEventListener('change', handle)
    return () => element?.removeEventListener('change', handle)
  }, [value, onChange])
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
      <Input
        ref={input}
        type="color"
        disabled={readOnly}
        className="h-[34px] !p-1 max-md:h-11"
        value={draft ?? value ?? '#8a8a86'}
        onChange={(event) => setDraft(event.target.value)}
      />
    </Field>
  )
}
