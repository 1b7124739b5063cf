import { LIGHT_PURPOSES, type Light, isLamp } from '#shared/domain/lighting/schema.ts'
import { facePoint } from '#shared/domain/lighting/geometry.ts'
import { ownColourK, zoomTableOf } from '#shared/domain/lighting/light-source.ts'
import type { SetupReading } from '#shared/domain/lighting/readings.ts'
import { powersOf } from '#shared/domain/lighting/stops.ts'
import { fNumberLabel, powerLabel, purposeWord, stopsLabel } from '#shared/domain/lighting/words.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { lengthLabel, useLengthUnit } from '#src/lib/length-unit.ts'
import { Button } from '#src/ui/button.tsx'
import { Checkbox } from '#src/ui/checkbox.tsx'
import { Field } from '#src/ui/field.tsx'
import { NumberInput } from '#src/ui/number-input.tsx'
import { Select } from '#src/ui/select.tsx'
import type { LightUnit } from '#shared/domain/lighting/schema.ts'
import { type Kit, unitWords } from '../../use-kit.ts'
import type { SetupWriter } from '../../use-setup-writer.ts'
import { GroupLetter } from '../group-letter.tsx'
import { CommitTextarea } from './commit-input.tsx'
import { EditorFrame, FieldGroup } from './editor-frame.tsx'
import { GelsField } from './gels-field.tsx'
import { KitSelect } from './kit-select.tsx'
import { PlaceFields } from './place-fields.tsx'
import { PointFields } from './point-fields.tsx'

type LightEditorProps = {
  light: Light
  whole: WholeSetup
  reading: SetupReading
  kit: Kit
  writer: SetupWriter
  mayWrite: boolean
  onBack: (() => void) | null
  onChoose: (lightId: string) => void
  onGone: () => void
}

const GROUPS = [{ value: '', label: 'None' }, ...[...'ABCDEFGHIJ'].map((letter) => ({ value: letter, label: letter }))]

function ordinal(place: number): string {
  return ['first', 'second', 'third'][place - 1] ?? `${place}th`
}

/** A unit for its light: no zoom where it has none, and no less power than it can give. */
function withUnit(light: Light, unit: LightUnit): Pick<Light, 'unit'> & Partial<Light> {
  const least = 1 / unit.numbers.minPowerDenominator
  return {
    unit,
    ...(zoomTableOf(unit.numbers).length === 0 ? { zoomMm: null } : {}),
    ...(light.power < least ? { power: least } : {}),
  }
}

/** Everything of one light, as numbers. */
export function LightEditor({
  light,
  whole,
  reading,
  kit,
  writer,
  mayWrite,
  onBack,
  onChoose,
  onGone,
}: LightEditorProps) {
  const unit = useLengthUnit()
  const index = whole.lights.findIndex((other) => other.id === light.id)
  const patch = (change: Parameters<SetupWriter['patchLight']>[1]) => writer.patchLight(light.id, change)
  const own = reading.lights.find((entry) => entry.lightId === light.id)
  const powers = powersOf(light.unit.numbers.minPowerDenominator)
  const labels = powers.map(powerLabel)
  const power = powerLabel(light.power)
  const wall = whole.setup.background.zM
  const face = facePoint(whole)
  return (
    <EditorFrame
      mayWrite={mayWrite}
      onBack={onBack}
      title={
        <>
          <GroupLetter group={light.group} />
          {purposeWord(light.purpose)}
        </>
      }
      foot={
        <>
          <Button
            onClick={() => {
              const id = writer.duplicateLight(light.id)
              if (id) onChoose(id)
            }}
          >
            Duplicate
          </Button>
          <Button
            variant="danger"
            onClick={() => {
              writer.removeLight(light.id)
              onGone()
            }}
          >
            Remove this light
          </Button>
        </>
      }
    >
      <Checkbox checked={light.isOn} onChange={(isOn) => patch({ isOn })}>
        Switched on
        {!light.isOn && <span className="block text-xs text-ink-soft">It stands there and gives no light.</span>}
      </Checkbox>
      {own && light.isOn && (
        <p className="text-sm text-ink-soft">
          Reads <b className="font-semibold text-ink">{fNumberLabel(own.fNumber)}</b>{' '}
          {own.where === 'wall' ? 'on the wall' : 'at the sitter'}, {lengthLabel(own.distanceM, unit)} off
          {own.underMainStops !== null &&
            light.purpose !== 'main' &&
            `, ${stopsLabel(-own.underMainStops)} against the main`}
          .
        </p>
      )}
      <div className="grid grid-cols-2 gap-2">
        <Field label="What it is for">
          <Select
            options={LIGHT_PURPOSES.map((purpose) => ({ value: purpose, label: purposeWord(purpose) }))}
            value={light.purpose}
            onChange={(purpose) => patch({ purpose })}
          />
        </Field>
        <Field label="Group">
          <Select
            options={GROUPS}
            value={light.group ?? ''}
            onChange={(group) => patch({ group: group === '' ? null : group })}
          />
        </Field>
      </div>
      <KitSelect
        label="Unit"
        items={kit.units}
        wordsFor={unitWords}
        value={light.unit}
        kit={kit}
        onChange={(next) => next && patch(withUnit(light, next))}
      />
      <div className="grid grid-cols-2 gap-2">
        <Field label={isLamp(light.unit.numbers) ? 'Dimmed to' : 'Power'}>
          <Select
            options={[...(labels.includes(power) ? [] : [power]), ...labels].map((label) => ({ value: label, label }))}
            value={power}
            onChange={(label) => {
              const next = powers[labels.indexOf(label)]
              if (next !== undefined) patch({ power: next })
            }}
          />
        </Field>
        {zoomTableOf(light.unit.numbers).length > 0 && (
          <Field label="Zoom">
            <NumberInput
              value={light.zoomMm}
              allowEmpty
              unit="mm"
              min={10}
              max={400}
              step={5}
              decimals={0}
              onChange={(zoomMm) => patch({ zoomMm })}
            />
          </Field>
        )}
      </div>
      <KitSelect
        label="Modifier"
        items={kit.modifiers}
        value={light.modifier}
        kit={kit}
        none="None, bare"
        onChange={(modifier) => patch({ modifier })}
      />
      <GelsField
        gels={light.gels}
        kit={kit}
        flashK={ownColourK(light.unit.numbers)}
        onChange={(gels) => patch({ gels })}
      />
      <KitSelect
        label="Stands on"
        items={kit.supports}
        value={light.support}
        kit={kit}
        none="Not said"
        onChange={(support) => patch({ support })}
      />
      <FieldGroup title="Where it stands">
        <PlaceFields
          point={light.at}
          whole={whole}
          onChange={(change) => writer.move({ kind: 'light', light }, change)}
        />
      </FieldGroup>
      <FieldGroup title="Where it looks">
        <div className="flex flex-wrap gap-2">
          <Button size="small" onClick={() => patch({ aim: face })}>
            At the eyes
          </Button>
          <Button size="small" onClick={() => patch({ aim: [face[0], Math.max(0, face[1] - 0.2), wall] })}>
            At the wall behind
          </Button>
        </div>
        <PointFields point={light.aim} onChange={(change) => writer.move({ kind: 'aim', light }, change)} />
      </FieldGroup>
      <FieldGroup title={`Built ${ordinal(index + 1)} of ${whole.lights.length}`}>
        <div className="flex flex-wrap gap-2">
          <Button size="small" disabled={index <= 0} onClick={() => writer.shiftLight(light.id, -1)}>
            Build it earlier
          </Button>
          <Button
            size="small"
            disabled={index >= whole.lights.length - 1}
            onClick={() => writer.shiftLight(light.id, 1)}
          >
            Build it later
          </Button>
        </div>
      </FieldGroup>
      <Field label="Note">
        <CommitTextarea value={light.note} maxLength={500} onCommit={(note) => patch({ note })} />
      </Field>
    </EditorFrame>
  )
}
