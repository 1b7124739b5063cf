import { useEffect, useRef, useState } from 'react'
import { Input } from './input.tsx'

export type ColourInputProps = { value: string; onCommit: (colour: string) => void; disabled?: boolean }

/** A colour; taken over once the picker is closed, not at every shade on the way. */
export function ColourInput({ value, onCommit, disabled = false }: ColourInputProps) {
  const [draft, setDraft] = useState<string | null>(null)
  const input = useRef<HTMLInputElement>(null)
  useEffect(() => {
    const element = input.current
    // React's onChange is the browser's `input`; `change` comes once.
    const handle = () => {
      setDraft(null)
      if (element && element.value !== value) onCommit(element.value)
    }
    element?.addEventListener('change', handle)
    return () => element?.removeEventListener('change', handle)
  }, [value, onCommit])
  return (
    <Input
      ref={input}
      type="color"
      disabled={disabled}
      className="h-[34px] !p-1 max-md:h-11"
      value={draft ?? value}
      onChange={(event) => setDraft(event.target.value)}
    />
  )
}
