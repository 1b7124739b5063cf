import { useState } from 'react'
import { colourWords } from '#shared/domain/sign-off/colour-words.ts'
import { Button } from '#src/ui/button.tsx'
import { Field } from '#src/ui/field.tsx'
import { Input } from '#src/ui/input.tsx'
import { Swatch } from '#src/ui/swatch.tsx'

export type ColourFieldProps = {
  value: string | null
  onChange: (colour: string | null) => void
  /** Colours of the look's pictures, to take one from. */
  from: readonly string[]
  readOnly: boolean
}

/** A colour by eye, by number, or out of a picture's palette. */
export function ColourField({ value, onChange, from, readOnly }: ColourFieldProps) {
  const [typed, setTyped] = useState<string | null>(null)
  if (readOnly) {
    return (
      <div>
        <div className="label-small mb-1">Colour</div>
        <p className="flex items-center gap-2">
          <Swatch colour={value} sizePx={20} />
          {value === null ? 'Not chosen' : colourWords(value)}
        </p>
      </div>
    )
  }
  const isColour = (text: string) => /^#[0-9a-f]{6}$/i.test(text)
  return (
    <div>
      <Field
        label="Colour"
        hint={value === null ? 'Not chosen yet.' : colourWords(value)}
        error={typed !== null && typed !== '' && !isColour(typed) ? 'A colour is # and six of 0–9, a–f.' : undefined}
      >
        <span className="flex items-stretch gap-2">
          <input
            type="color"
            aria-label="Choose the colour by eye"
            value={value ?? '#808080'}
            onChange={(event) => onChange(event.target.value)}
            className="h-9 w-12 flex-none cursor-pointer rounded-r border border-edge bg-white p-1 max-md:h-11"
          />
          <Input
            aria-label="Colour as a number"
            value={typed ?? value ?? ''}
            placeholder="#8e6a22"
            spellCheck={false}
            maxLength={7}
            onChange={(event) => {
              const text = event.target.value.trim()
              setTyped(text)
              if (isColour(text)) onChange(text.toLowerCase())
            }}
            onBlur={() => setTyped(null)}
          />
          {value !== null && (
            <Button variant="quiet" size="small" onClick={() => onChange(null)}>
              None
            </Button>
          )}
        </span>
      </Field>
      {from.length > 0 && (
        <div className="mt-1.5 flex flex-wrap items-center gap-1 text-xs text-ink-soft">
          From its pictures
          {from.map((colour) => (
            <button
              key={colour}
              type="button"
              title={colourWords(colour)}
              aria-label={`Take ${colourWords(colour)}`}
              onClick={() => onChange(colour)}
              className="grid size-7 place-items-center rounded-r hover:bg-ink/8 max-md:size-11"
            >
              <Swatch colour={colour} sizePx={20} />
            </button>
          ))}
        </div>
      )}
    </div>
  )
}
