import { SKIN_STEPS, guessedAppearance, skinWord } from '#shared/domain/lighting/appearance.ts'
import { type Appearance, GARMENT_CUTS, HAIR_STYLES, type SitterPlace } from '#shared/domain/lighting/schema.ts'
import { Button } from '#src/ui/button.tsx'
import { ColourInput } from '#src/ui/colour-input.tsx'
import { Field, useFieldControl } from '#src/ui/field.tsx'
import { Select } from '#src/ui/select.tsx'
import { Checkbox } from '#src/ui/checkbox.tsx'
import { FieldGroup } from './editor-frame.tsx'

type AppearanceFieldsProps = { place: SitterPlace; onChange: (appearance: Appearance | null) => void }

const named = <Word extends string>(words: readonly Word[]) =>
  words.map((word) => ({ value: word, label: word.charAt(0).toUpperCase() + word.slice(1) }))
/** A garment whose colour is not the look's begins with this. */
const CLOTH = '#4a5d78'

/** How the sitter looks in test frames. Touching one thing writes all of it down, so that nothing jumps later. */
export function AppearanceFields({ place, onChange }: AppearanceFieldsProps) {
  const shown = place.appearance ?? guessedAppearance(place)
  const change = (part: Partial<Appearance>) => onChange({ ...shown, ...part })
  return (
    <FieldGroup title="In test frames">
      {place.appearance === null && <p className="text-xs text-ink-soft">A plain guess until you change it.</p>}
      <Field label="Skin" aside={<span className="text-sm">{skinWord(shown.skinItaDeg)}</span>}>
        <SkinSlider itaDeg={shown.skinItaDeg} onChange={(skinItaDeg) => change({ skinItaDeg })} />
      </Field>
      <div className="grid grid-cols-2 gap-x-2 gap-y-3">
        <Field label="Hair">
          <Select options={named(HAIR_STYLES)} value={shown.hair} onChange={(hair) => change({ hair })} />
        </Field>
        <Field label="Hair colour">
          <ColourInput value={shown.hairColour} onCommit={(hairColour) => change({ hairColour })} />
        </Field>
        <Field label="Garment">
          <Select options={named(GARMENT_CUTS)} value={shown.cut} onChange={(cut) => change({ cut })} />
        </Field>
        {shown.garmentColour !== null && (
          <Field label="Garment colour">
            <ColourInput value={shown.garmentColour} onCommit={(garmentColour) => change({ garmentColour })} />
          </Field>
        )}
      </div>
      <Checkbox
        checked={shown.garmentColour === null}
        onChange={(asLook) => change({ garmentColour: asLook ? null : CLOTH })}
      >
        Garment in the colour of the look
      </Checkbox>
      {place.appearance !== null && (
        <Button size="small" className="self-start" onClick={() => onChange(null)}>
          Back to the plain guess
        </Button>
      )}
    </FieldGroup>
  )
}

/** Six steps with a name each, from dark to very light. */
function SkinSlider({ itaDeg, onChange }: { itaDeg: number; onChange: (itaDeg: number) => void }) {
  const steps = SKIN_STEPS.toReversed()
  const word = skinWord(itaDeg)
  return (
    <input
      {...useFieldControl()}
      type="range"
      min={0}
      max={steps.length - 1}
      step={1}
      value={steps.findIndex((step) => step.words === word)}
      aria-valuetext={word}
      className="h-8 w-full accent-velvet max-md:h-11"
      onChange={(event) => {
        const step = steps[Number(event.target.value)]
        if (step) onChange(step.typicalDeg)
      }}
    />
  )
}
