import { LIGHT_PURPOSES, type Light } from '#shared/domain/lighting/schema.ts'
import { facePoint } from '#shared/domain/lighting/geometry.ts'
import { ownColourK, zoomTableOf } from '#shared/domain/lighting/light-source.ts'
import type { SetupReading } from '#shared/domain/lighting/readings.ts'
import { powersOf } from '#shared/domain/lighting/stops.ts'
import { fNumberLabel, metresLabel, powerLabel, purposeWord, stopsLabel } from '#shared/domain/lighting/words.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { Button } from '#src/ui/button.tsx'
import { Field } from '#src/ui/field.tsx'
import { NumberInput } from '#src/ui/number-input.tsx'
import { Select } from '#src/ui/select.tsx'
import type { Kit } from '../../use-kit.ts'
import type { SetupWriter } from '../../use-setup-writer.ts'
import { GroupLetter } from '../group-letter.tsx'
import { CommitTextarea } from './commit-input.tsx'
import { EditorFrame, FieldGroup } from './editor-frame.tsx'
import { GelsField } from './gels-field.tsx'
import { KitSelect } from './kit-select.tsx'
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
      {own && (
        <p className="text-sm text-ink-soft">
          Reads <b className="font-semibold text-ink">{fNumberLabel(own.fNumber)}</b>{' '}
          {own.where === 'wall' ? 'on the wall' : 'at the sitter'}, {metresLabel(own.distanceM)} off
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
        value={light.unit}
        kit={kit}
        onChange={(unit) =>
          unit && patch({ unit, ...(zoomTableOf(unit.numbers).length === 0 ? { zoomMm: null } : {}) })
        }
      />
      <div className="grid grid-cols-2 gap-2">
        <Field label="Power">
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
      <FieldGroup title="Where it stands, from the sitter’s mark">
        <PointFields point={light.at} onChange={(at) => patch({ at })} />
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
        <PointFields point={light.aim} onChange={(aim) => patch({ aim })} />
      </FieldGroup>
      <Field label="Note">
        <CommitTextarea value={light.note} maxLength={500} onCommit={(note) => patch({ note })} />
      </Field>
    </EditorFrame>
  )
}
