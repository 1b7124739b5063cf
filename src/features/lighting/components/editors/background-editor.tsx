import { BACKGROUND_SURFACES, type Walled } from '#shared/domain/lighting/schema.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import type { Room } from '#shared/domain/shoots/schema.ts'
import { Button } from '#src/ui/button.tsx'
import { ColourInput } from '#src/ui/colour-input.tsx'
import { Field } from '#src/ui/field.tsx'
import { NumberInput } from '#src/ui/number-input.tsx'
import { Select } from '#src/ui/select.tsx'
import type { SetupWriter } from '../../use-setup-writer.ts'
import { walledFrom } from '../../walled-from.ts'
import { CommitInput } from './commit-input.tsx'
import { EditorFrame, FieldGroup } from './editor-frame.tsx'
import { LengthInput } from './length-input.tsx'

type BackgroundEditorProps = {
  whole: WholeSetup
  writer: SetupWriter
  /** Rooms of the shots that use the setup. */
  rooms: readonly Room[]
  mayWrite: boolean
  onBack: (() => void) | null
}

const SURFACES = BACKGROUND_SURFACES.map((surface) => ({
  value: surface,
  label: surface.charAt(0).toUpperCase() + surface.slice(1),
}))

/** The wall behind the sitter, the room around it and the current that is there. */
export function BackgroundEditor({ whole, writer, rooms, mayWrite, onBack }: BackgroundEditorProps) {
  const { background } = whole.setup
  const patch = writer.patchBackground
  return (
    <EditorFrame title="Background and room" mayWrite={mayWrite} onBack={onBack}>
      <Field label="What it is">
        <CommitInput
          value={background.what}
          maxLength={120}
          placeholder="Grey plaster, 2.7 m paper"
          onCommit={(what) => patch({ what })}
        />
      </Field>
      <div className="grid grid-cols-2 gap-x-2 gap-y-3">
        <Field label="Surface">
          <Select options={SURFACES} value={background.surface} onChange={(surface) => patch({ surface })} />
        </Field>
        <Field label="Colour">
          <ColourInput value={background.colour} onCommit={(colour) => patch({ colour })} />
        </Field>
        <Field label="Behind the sitter’s mark" className="col-span-2">
          <LengthInput value={-background.zM} min={0} max={50} onChange={(distanceM) => patch({ zM: -distanceM })} />
        </Field>
        <Field label="Width">
          <LengthInput value={background.widthM} min={0.2} max={60} onChange={(widthM) => patch({ widthM })} />
        </Field>
        <Field label="Height">
          <LengthInput value={background.heightM} min={0.2} max={20} onChange={(heightM) => patch({ heightM })} />
        </Field>
      </div>
      <RoomFields whole={whole} writer={writer} rooms={rooms} />
      <CircuitFields whole={whole} writer={writer} />
    </EditorFrame>
  )
}

const FIRST_ROOM: Walled = { leftM: 3, rightM: 3, frontM: 5, ceilingM: 2.8 }

type FieldsProps = Pick<BackgroundEditorProps, 'whole' | 'writer'>

function RoomFields({ whole, writer, rooms }: FieldsProps & Pick<BackgroundEditorProps, 'rooms'>) {
  const { walled, background } = whole.setup
  const write = (next: Walled | null) => writer.patchSetup({ walled: next })
  const known = rooms.flatMap((room) => {
    const size = walledFrom(room, background)
    return size ? [{ room, size }] : []
  })
  const unmeasured = rooms.filter((room) => !known.some((entry) => entry.room.id === room.id))
  return (
    <FieldGroup title="Walls and ceiling, from the sitter’s mark">
      {walled && (
        <div className="grid grid-cols-2 gap-x-2 gap-y-3">
          <Field label="To the left wall">
            <LengthInput value={walled.leftM} min={0} max={100} onChange={(leftM) => write({ ...walled, leftM })} />
          </Field>
          <Field label="To the right wall">
            <LengthInput value={walled.rightM} min={0} max={100} onChange={(rightM) => write({ ...walled, rightM })} />
          </Field>
          <Field label="To the front wall" hint="Behind the camera">
            <LengthInput value={walled.frontM} min={0} max={100} onChange={(frontM) => write({ ...walled, frontM })} />
          </Field>
          <Field label="Ceiling">
            <LengthInput
              value={walled.ceilingM}
              min={0.5}
              max={60}
              onChange={(ceilingM) => write({ ...walled, ceilingM })}
            />
          </Field>
        </div>
      )}
      {!walled && <p className="text-sm text-ink-soft">Not drawn: the setup stands in the open.</p>}
      <div className="flex flex-wrap gap-2">
        {known.map(({ room, size }) => (
          <Button key={room.id} size="small" onClick={() => write(size)}>
            Take from {room.name}
          </Button>
        ))}
        {walled ? (
          <Button size="small" onClick={() => write(null)}>
            Leave the room out
          </Button>
        ) : (
          <Button size="small" onClick={() => write(FIRST_ROOM)}>
            Draw the room
          </Button>
        )}
      </div>
      {known.length > 0 && (
        <p className="text-xs text-ink-soft">
          From the brief, with the sitter midway between the side walls (assumed). Measure on the day.
        </p>
      )}
      {unmeasured.map((room) => (
        <p key={room.id} className="text-xs text-ink-soft">
          The brief does not say width, depth and ceiling of {room.name} yet.
        </p>
      ))}
    </FieldGroup>
  )
}

const FIRST_CIRCUIT = { volts: 230, amps: 16 }

function CircuitFields({ whole, writer }: FieldsProps) {
  const { circuit } = whole.setup
  return (
    <FieldGroup title="Circuit its mains lights share">
      {circuit ? (
        <>
          <div className="grid grid-cols-2 gap-2">
            <Field label="Voltage">
              <NumberInput
                value={circuit.volts}
                unit="V"
                min={50}
                max={500}
                step={10}
                decimals={0}
                onChange={(volts) => writer.patchSetup({ circuit: { ...circuit, volts } })}
              />
            </Field>
            <Field label="Breaker">
              <NumberInput
                value={circuit.amps}
                unit="A"
                min={1}
                max={200}
                decimals={0}
                onChange={(amps) => writer.patchSetup({ circuit: { ...circuit, amps } })}
              />
            </Field>
          </div>
          <p className="text-xs text-ink-soft">
            As the venue tells, never a permit: the venue’s rules, local code and a licensed electrician decide.
          </p>
          <Button size="small" className="self-start" onClick={() => writer.patchSetup({ circuit: null })}>
            Not known
          </Button>
        </>
      ) : (
        <Button size="small" className="self-start" onClick={() => writer.patchSetup({ circuit: FIRST_CIRCUIT })}>
          Write the circuit down
        </Button>
      )}
    </FieldGroup>
  )
}
