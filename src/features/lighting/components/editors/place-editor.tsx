import type { SitterPlace } from '#shared/domain/lighting/schema.ts'
import { lookIdSchema, sitterIdSchema } from '#shared/ids.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { Button } from '#src/ui/button.tsx'
import { Field } from '#src/ui/field.tsx'
import { NumberInput } from '#src/ui/number-input.tsx'
import { Select } from '#src/ui/select.tsx'
import { heightLimits } from '../../parts.ts'
import type { SetupWriter } from '../../use-setup-writer.ts'
import { AppearanceFields } from './appearance-fields.tsx'
import { EditorFrame, FieldGroup } from './editor-frame.tsx'
import { PointFields } from './point-fields.tsx'

/** Somebody of whom a place can be. */
export type SitterChoice = { id: string; label: string; looks: readonly { id: string; name: string }[] }

type PlaceEditorProps = {
  whole: WholeSetup
  writer: SetupWriter
  mayWrite: boolean
  onBack: (() => void) | null
  place: SitterPlace
  sitters: readonly SitterChoice[]
  onGone: () => void
}

/** About where eyes are, metres; what a new pose begins with while nobody has measured (common practice, no source). */
const EYES_M = { standing: 1.55, seated: 1.2 } as const

export function PlaceEditor({ place, sitters, writer, mayWrite, onBack, onGone }: PlaceEditorProps) {
  const patch = (change: Parameters<SetupWriter['patchPlace']>[1]) => writer.patchPlace(place.id, change)
  const sitter = sitters.find((candidate) => candidate.id === place.sitterId)
  const looks = sitter?.looks ?? []
  const turn = (label: string, value: number, most: number, onChange: (deg: number) => void, hint?: string) => (
    <Field label={label} hint={hint}>
      <NumberInput value={value} unit="°" min={-most} max={most} step={5} decimals={0} onChange={onChange} />
    </Field>
  )
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
          options={[{ value: '', label: 'Anybody' }, ...sitters.map(({ id, label }) => ({ value: id, label }))]}
          value={place.sitterId ?? ''}
          onChange={(id) =>
            // A look hangs on one sitter: it does not come along.
            patch({ sitterId: id === '' ? null : sitterIdSchema.parse(id), lookId: null })
          }
        />
      </Field>
      {place.sitterId !== null && (
        <Field label="Look" hint={looks.length === 0 ? 'No look hangs on this sitter yet.' : undefined}>
          <Select
            options={[
              { value: '', label: 'As in the first shot with this setup' },
              ...looks.map((look) => ({ value: look.id, label: look.name })),
            ]}
            value={place.lookId ?? ''}
            onChange={(id) => patch({ lookId: id === '' ? null : lookIdSchema.parse(id) })}
          />
        </Field>
      )}
      <FieldGroup title="Where the sitter is, from the mark">
        <PointFields
          point={[place.at[0], place.eyeHeightM, place.at[1]]}
          heightLabel="Eyes up"
          heights={heightLimits({ kind: 'place', place })}
          onChange={(change) => writer.move({ kind: 'place', place }, change)}
        />
        <p className="text-xs text-ink-soft">Measure yours: the light is worked out at the eyes.</p>
      </FieldGroup>
      <FieldGroup title="Pose">
        <div className="grid grid-cols-2 gap-x-2 gap-y-3">
          <Field label="Standing or seated">
            <Select
              options={[
                { value: 'standing', label: 'Standing' },
                { value: 'seated', label: 'Seated' },
              ]}
              value={place.pose}
              onChange={(pose) =>
                patch({
                  pose,
                  // Eyes somebody has measured stay; the usual ones become the usual ones of the new pose.
                  ...(place.eyeHeightM === EYES_M[place.pose] ? { eyeHeightM: EYES_M[pose] } : {}),
                })
              }
            />
          </Field>
          {turn('Body turned', place.turnDeg, 180, (turnDeg) => patch({ turnDeg }), '0 faces the camera')}
          {turn('Head turned', place.headTurnDeg, 80, (headTurnDeg) => patch({ headTurnDeg }), 'On top of the body')}
          {turn('Head nods', place.headNodDeg, 40, (headNodDeg) => patch({ headNodDeg }), 'Down is positive')}
        </div>
      </FieldGroup>
      <AppearanceFields place={place} onChange={(appearance) => patch({ appearance })} />
    </EditorFrame>
  )
}
