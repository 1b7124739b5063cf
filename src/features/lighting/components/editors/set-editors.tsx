import type { Prop, SitterPlace } from '#shared/domain/lighting/schema.ts'
import { sitterIdSchema } from '#shared/ids.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { Button } from '#src/ui/button.tsx'
import { Field } from '#src/ui/field.tsx'
import { NumberInput } from '#src/ui/number-input.tsx'
import { Select } from '#src/ui/select.tsx'
import type { Kit } from '../../use-kit.ts'
import type { SetupWriter } from '../../use-setup-writer.ts'
import { ColourInput } from '#src/ui/colour-input.tsx'
import { CommitInput } from './commit-input.tsx'
import { EditorFrame, FieldGroup } from './editor-frame.tsx'
import { PointFields } from './point-fields.tsx'

type Common = { whole: WholeSetup; writer: SetupWriter; mayWrite: boolean; onBack: (() => void) | null }

export function BackgroundEditor({ whole, writer, mayWrite, onBack }: Common) {
  const { background } = whole.setup
  const patch = writer.patchBackground
  return (
    <EditorFrame title="Background" mayWrite={mayWrite} onBack={onBack}>
      <Field label="What it is">
        <CommitInput
          value={background.what}
          maxLength={120}
          placeholder="Grey plaster, 2.7 m paper"
          onCommit={(what) => patch({ what })}
        />
      </Field>
      <div className="grid grid-cols-2 gap-x-2 gap-y-3">
        <Field label="Behind the sitter’s mark">
          <NumberInput
            value={-background.zM}
            unit="m"
            min={0}
            max={50}
            step={0.1}
            decimals={2}
            onChange={(distance) => patch({ zM: -distance })}
          />
        </Field>
        <Field label="Colour">
          <ColourInput value={background.colour} onCommit={(colour) => patch({ colour })} />
        </Field>
        <Field label="Width">
          <NumberInput
            value={background.widthM}
            unit="m"
            min={0.2}
            max={60}
            step={0.1}
            decimals={2}
            onChange={(widthM) => patch({ widthM })}
          />
        </Field>
        <Field label="Height">
          <NumberInput
            value={background.heightM}
            unit="m"
            min={0.2}
            max={20}
            step={0.1}
            decimals={2}
            onChange={(heightM) => patch({ heightM })}
          />
        </Field>
      </div>
    </EditorFrame>
  )
}

type PlaceEditorProps = Common & {
  place: SitterPlace
  sitters: readonly { id: string; label: string }[]
  onGone: () => void
}

export function PlaceEditor({ place, sitters, writer, mayWrite, onBack, onGone }: PlaceEditorProps) {
  const patch = (change: Parameters<SetupWriter['patchPlace']>[1]) => writer.patchPlace(place.id, change)
  return (
    <EditorFrame
      title="Sitter’s place"
      mayWrite={mayWrite}
      onBack={onBack}
      foot={
        <Button
          variant="danger"
          onClick={() => {
            writer.removePlace(place.id)
            onGone()
          }}
        >
          Remove this place
        </Button>
      }
    >
      <Field label="Who" hint={sitters.length === 0 ? 'Sitters are written down in Looks.' : undefined}>
        <Select
          options={[
            { value: '', label: 'Anybody' },
            ...sitters.map((sitter) => ({ value: sitter.id, label: sitter.label })),
          ]}
          value={place.sitterId ?? ''}
          onChange={(id) => patch({ sitterId: id === '' ? null : sitterIdSchema.parse(id) })}
        />
      </Field>
      <div className="grid grid-cols-3 gap-2">
        <Field label="Right (left −)">
          <NumberInput
            value={place.at[0]}
            unit="m"
            min={-50}
            max={50}
            step={0.1}
            decimals={2}
            onChange={(x) => patch({ at: [x, place.at[1]] })}
          />
        </Field>
        <Field label="Front (back −)">
          <NumberInput
            value={place.at[1]}
            unit="m"
            min={-50}
            max={50}
            step={0.1}
            decimals={2}
            onChange={(z) => patch({ at: [place.at[0], z] })}
          />
        </Field>
        <Field label="Eyes up">
          <NumberInput
            value={place.eyeHeightM}
            unit="m"
            min={0.3}
            max={2.4}
            step={0.05}
            decimals={2}
            onChange={(eyeHeightM) => patch({ eyeHeightM })}
          />
        </Field>
      </div>
      <p className="text-xs text-ink-soft">
        Sitting on a chair, eyes are at about 1.2 m; standing at about 1.55 m. Measure yours.
      </p>
    </EditorFrame>
  )
}

type PropEditorProps = Common & { prop: Prop; kit: Kit; onGone: () => void }

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
        <Field label="Width">
          <NumberInput
            value={prop.widthM}
            unit="m"
            min={0.01}
            max={10}
            step={0.1}
            decimals={2}
            onChange={(widthM) => patch({ widthM })}
          />
        </Field>
        <Field label="Height">
          <NumberInput
            value={prop.heightM}
            unit="m"
            min={0.01}
            max={10}
            step={0.1}
            decimals={2}
            onChange={(heightM) => patch({ heightM })}
          />
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
                patch({ name: item.name.slice(0, 80), widthM: item.numbers.widthM, heightM: item.numbers.heightM })
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
        <PointFields point={prop.at} onChange={(at) => patch({ at })} />
      </FieldGroup>
    </EditorFrame>
  )
}
