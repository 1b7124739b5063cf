import { type Prop, PROP_SHAPES } from '#shared/domain/lighting/schema.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { Button } from '#src/ui/button.tsx'
import { ColourInput } from '#src/ui/colour-input.tsx'
import { Field } from '#src/ui/field.tsx'
import { NumberInput } from '#src/ui/number-input.tsx'
import { Select } from '#src/ui/select.tsx'
import { inShape } from '../../new-items.ts'
import type { Kit } from '../../use-kit.ts'
import type { SetupWriter } from '../../use-setup-writer.ts'
import { CommitInput } from './commit-input.tsx'
import { EditorFrame, FieldGroup } from './editor-frame.tsx'
import { LengthInput } from './length-input.tsx'
import { PointFields } from './point-fields.tsx'

type PropEditorProps = {
  whole: WholeSetup
  writer: SetupWriter
  mayWrite: boolean
  onBack: (() => void) | null
  prop: Prop
  kit: Kit
  onGone: () => void
}

const SHAPES = PROP_SHAPES.map((shape) => ({ value: shape, label: shape.charAt(0).toUpperCase() + shape.slice(1) }))

export function PropEditor({ prop, kit, writer, mayWrite, onBack, onGone }: PropEditorProps) {
  const patch = (change: Parameters<SetupWriter['patchProp']>[1]) => writer.patchProp(prop.id, change)
  return (
    <EditorFrame
      title={prop.name}
      mayWrite={mayWrite}
      onBack={onBack}
      foot={
        <Button
          variant="danger"
          onClick={() => {
            writer.removeProp(prop.id)
            onGone()
          }}
        >
          Remove
        </Button>
      }
    >
      <div className="grid grid-cols-2 gap-x-2 gap-y-3">
        <Field label="Name">
          <CommitInput value={prop.name} maxLength={80} required onCommit={(name) => patch({ name })} />
        </Field>
        <Field label="Kind">
          <Select
            options={[
              { value: 'panel', label: 'Panel' },
              { value: 'flag', label: 'Flag' },
              { value: 'prop', label: 'Part of the set' },
            ]}
            value={prop.kind}
            onChange={(kind) => patch({ kind })}
          />
        </Field>
        {prop.kind === 'prop' && (
          <Field label="Shape" className="col-span-2">
            <Select options={SHAPES} value={prop.shape} onChange={(shape) => patch(inShape(prop, shape))} />
          </Field>
        )}
        <Field label="Width">
          <LengthInput value={prop.widthM} min={0.01} max={10} onChange={(widthM) => patch({ widthM })} />
        </Field>
        <Field label="Height">
          <LengthInput value={prop.heightM} min={0.01} max={10} onChange={(heightM) => patch({ heightM })} />
        </Field>
        <Field label="Turned" hint="0 faces the camera">
          <NumberInput
            value={prop.turnDeg}
            unit="°"
            min={-180}
            max={180}
            step={5}
            decimals={0}
            onChange={(turnDeg) => patch({ turnDeg })}
          />
        </Field>
        <Field label="Colour">
          <ColourInput value={prop.colour} onCommit={(colour) => patch({ colour })} />
        </Field>
      </div>
      {prop.kind !== 'prop' && kit.panels.length > 0 && (
        <Field label="Name and size from the kit">
          <Select
            options={[
              { value: '', label: 'Choose' },
              ...kit.panels.map((item) => ({ value: String(item.kitId), label: item.name })),
            ]}
            value=""
            onChange={(kitId) => {
              const item = kit.panels.find((candidate) => candidate.kitId === kitId)
              if (item)
                patch({
                  name: item.name.slice(0, 80),
                  kind: item.numbers.use,
                  widthM: item.numbers.widthM,
                  heightM: item.numbers.heightM,
                  colour: item.numbers.colour,
                })
            }}
          />
        </Field>
      )}
      {prop.kind === 'flag' && (
        <p className="text-xs text-ink-soft">
          Drawn, watched for the frame and counted in changeovers. What it shades is not worked out.
        </p>
      )}
      <FieldGroup title="Where its middle is, from the sitter’s mark">
        <PointFields point={prop.at} onChange={(change) => writer.move({ kind: 'prop', prop }, change)} />
      </FieldGroup>
    </EditorFrame>
  )
}
