import { fNumberOfThirds, shutterLabel } from '#shared/domain/lighting/stops.ts'
import { fNumberLabel } from '#shared/domain/lighting/words.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { Field } from '#src/ui/field.tsx'
import { NumberInput } from '#src/ui/number-input.tsx'
import { Select } from '#src/ui/select.tsx'
import type { SetupWriter } from '../../use-setup-writer.ts'
import { EditorFrame, FieldGroup } from './editor-frame.tsx'
import { PointFields } from './point-fields.tsx'
import { facePoint } from '#shared/domain/lighting/geometry.ts'
import { Button } from '#src/ui/button.tsx'

const F_NUMBERS = Array.from({ length: 31 }, (_, thirds) => fNumberOfThirds(thirds))
const ISOS = [
  50, 64, 80, 100, 125, 160, 200, 250, 320, 400, 500, 640, 800, 1000, 1250, 1600, 2000, 2500, 3200, 6400, 12800,
]
const SHUTTERS = [
  1 / 500,
  1 / 400,
  1 / 320,
  1 / 250,
  1 / 200,
  1 / 160,
  1 / 125,
  1 / 100,
  1 / 80,
  1 / 60,
  1 / 50,
  1 / 40,
  1 / 30,
  1 / 20,
  1 / 15,
  1 / 10,
  1 / 8,
  1 / 4,
  0.5,
  1,
  2,
]

const SYNCS = [1 / 500, 1 / 400, 1 / 320, 1 / 250, 1 / 200, 1 / 180, 1 / 160, 1 / 125, 1 / 60]
/** Assumed while nobody has said it. */
const SYNC_S = 1 / 200
const UNKNOWN = ''

type CameraEditorProps = { whole: WholeSetup; writer: SetupWriter; mayWrite: boolean; onBack: (() => void) | null }

function options(values: readonly number[], label: (value: number) => string, own: number) {
  const labels = [
    ...new Set([...(values.some((value) => label(value) === label(own)) ? [] : [label(own)]), ...values.map(label)]),
  ]
  return labels.map((text) => ({ value: text, label: text }))
}

/** Camera and exposure of the setup, and the daylight or lamps that are there anyway. */
export function CameraEditor({ whole, writer, mayWrite, onBack }: CameraEditorProps) {
  const { camera, ambientLux, ambientK } = whole.setup
  const pick =
    (values: readonly number[], label: (value: number) => string, give: (value: number) => void) => (text: string) => {
      const value = values.find((candidate) => label(candidate) === text)
      if (value !== undefined) give(value)
    }
  const iso = (value: number) => `ISO ${value}`
  return (
    <EditorFrame title="Camera" mayWrite={mayWrite} onBack={onBack}>
      <div className="grid grid-cols-2 gap-x-2 gap-y-3">
        <Field label="Lens">
          <NumberInput
            value={camera.focalMm}
            unit="mm"
            min={8}
            max={1200}
            step={5}
            decimals={0}
            onChange={(focalMm) => writer.patchCamera({ focalMm })}
          />
        </Field>
        <Field label="Aperture">
          <Select
            options={options(F_NUMBERS, fNumberLabel, camera.fNumber)}
            value={fNumberLabel(camera.fNumber)}
            onChange={pick(F_NUMBERS, fNumberLabel, (fNumber) => writer.patchCamera({ fNumber }))}
          />
        </Field>
        <Field label="Sensitivity">
          <Select
            options={options(ISOS, iso, camera.iso)}
            value={iso(camera.iso)}
            onChange={pick(ISOS, iso, (value) => writer.patchCamera({ iso: value }))}
          />
        </Field>
        <Field label="Shutter">
          <Select
            options={options(SHUTTERS, shutterLabel, camera.shutterS)}
            value={shutterLabel(camera.shutterS)}
            onChange={pick(SHUTTERS, shutterLabel, (shutterS) => writer.patchCamera({ shutterS }))}
          />
        </Field>
        <Field label="White balance">
          <NumberInput
            value={camera.whiteBalanceK}
            unit="K"
            min={1500}
            max={20000}
            step={100}
            decimals={0}
            onChange={(whiteBalanceK) => writer.patchCamera({ whiteBalanceK })}
          />
        </Field>
        <Field label="Sync speed" hint={camera.syncS === null ? '1/200 s is assumed' : undefined}>
          <Select
            options={[{ value: UNKNOWN, label: 'Not known' }, ...options(SYNCS, shutterLabel, camera.syncS ?? SYNC_S)]}
            value={camera.syncS === null ? UNKNOWN : shutterLabel(camera.syncS)}
            onChange={(text) =>
              text === UNKNOWN
                ? writer.patchCamera({ syncS: null })
                : pick(SYNCS, shutterLabel, (syncS) => writer.patchCamera({ syncS }))(text)
            }
          />
        </Field>
        <Field label="Ambient at the sitter" hint="Empty: not measured, left out">
          <NumberInput
            value={ambientLux}
            allowEmpty
            unit="lux"
            min={0}
            max={200000}
            step={10}
            decimals={0}
            onChange={(lux) => writer.patchSetup({ ambientLux: lux })}
          />
        </Field>
        <Field label="Colour of the ambient" hint="Empty: as the white balance">
          <NumberInput
            value={ambientK}
            allowEmpty
            unit="K"
            min={1500}
            max={20000}
            step={100}
            decimals={0}
            onChange={(kelvin) => writer.patchSetup({ ambientK: kelvin })}
          />
        </Field>
      </div>
      <FieldGroup title="Where it stands, from the sitter’s mark">
        <PointFields
          point={camera.at}
          onChange={(change) => writer.move({ kind: 'camera', setupId: whole.setup.id }, change)}
        />
      </FieldGroup>
      <FieldGroup title="Where it looks">
        {camera.aim === null ? (
          <>
            <p className="text-sm text-ink-soft">At the sitters, eyes a third below the top edge.</p>
            <Button size="small" className="self-start" onClick={() => writer.patchCamera({ aim: facePoint(whole) })}>
              Look at a point instead
            </Button>
          </>
        ) : (
          <>
            <PointFields
              point={camera.aim}
              onChange={(change) => camera.aim && writer.patchCamera({ aim: change(camera.aim) })}
            />
            <Button size="small" className="self-start" onClick={() => writer.patchCamera({ aim: null })}>
              Look at the sitters
            </Button>
          </>
        )}
      </FieldGroup>
    </EditorFrame>
  )
}
