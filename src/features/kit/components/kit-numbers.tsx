import { type KitBody, MODIFIER_SHAPES, SUPPORT_KINDS } from '#shared/domain/kit/schema.ts'
import { Checkbox } from '#src/ui/checkbox.tsx'
import { Field } from '#src/ui/field.tsx'
import { Input } from '#src/ui/input.tsx'
import { NumberInput } from '#src/ui/number-input.tsx'
import { Select } from '#src/ui/select.tsx'
import { StatedInput } from './stated-input.tsx'
import { ZoomTable } from './zoom-table.tsx'

export type KitNumbersProps = { body: KitBody; onChange: (body: KitBody) => void }

const GRID = 'grid gap-x-6 gap-y-4 sm:grid-cols-2'
const POWERS = [1, 2, 4, 8, 16, 32, 64, 128, 256, 512, 1024]

export function KitNumbers({ body, onChange }: KitNumbersProps) {
  switch (body.kind) {
    case 'unit': {
      const { numbers } = body
      const set = (patch: Partial<typeof numbers>) => onChange({ kind: 'unit', numbers: { ...numbers, ...patch } })
      return (
        <div className={GRID}>
          <StatedInput
            label="Guide number at ISO 100"
            unit="m"
            max={500}
            value={numbers.guideNumberM}
            onChange={(guideNumberM) => set({ guideNumberM })}
          />
          <StatedInput
            label="Colour of the flash"
            unit="K"
            min={2000}
            max={12000}
            step={100}
            value={numbers.flashColourK}
            onChange={(flashColourK) => set({ flashColourK })}
          />
          <StatedInput
            label="Full pops from one charge"
            max={5000}
            step={10}
            value={numbers.fullPops}
            onChange={(fullPops) => set({ fullPops })}
          />
          <StatedInput
            label="Ready again after a full pop"
            unit="s"
            max={60}
            step={0.1}
            value={numbers.fullRecycleS}
            onChange={(fullRecycleS) => set({ fullRecycleS })}
          />
          <StatedInput
            label="Mass with its power inside"
            unit="kg"
            max={60}
            step={0.1}
            value={numbers.massKg}
            onChange={(massKg) => set({ massKg })}
          />
          <div className="flex flex-col gap-2">
            <Field label="Smallest power">
              <Select
                options={[...new Set([...POWERS, numbers.minPowerDenominator])]
                  .sort((a, b) => a - b)
                  .map((power) => ({ value: String(power), label: `1/${power}` }))}
                value={String(numbers.minPowerDenominator)}
                onChange={(power) => set({ minPowerDenominator: Number(power) })}
              />
            </Field>
            <Checkbox checked={numbers.remotePower} onChange={(remotePower) => set({ remotePower })}>
              Power can be set from the camera
            </Checkbox>
          </div>
          <ZoomTable className="sm:col-span-2" zoom={numbers.zoom} onChange={(zoom) => set({ zoom })} />
        </div>
      )
    }
    case 'modifier': {
      const { numbers } = body
      const set = (patch: Partial<typeof numbers>) => onChange({ kind: 'modifier', numbers: { ...numbers, ...patch } })
      return (
        <div className={GRID}>
          <Field label="Shape">
            <Select
              options={MODIFIER_SHAPES.map((shape) => ({ value: shape, label: shape }))}
              value={numbers.shape}
              onChange={(shape) => set({ shape })}
            />
          </Field>
          <div className="grid grid-cols-2 gap-2">
            <Field label="Width of the face">
              <NumberInput
                unit="m"
                min={0}
                max={6}
                step={0.05}
                value={numbers.widthM}
                onChange={(widthM) => set({ widthM })}
              />
            </Field>
            <Field label="Height of the face">
              <NumberInput
                unit="m"
                min={0}
                max={6}
                step={0.05}
                value={numbers.heightM}
                onChange={(heightM) => set({ heightM })}
              />
            </Field>
          </div>
          <StatedInput
            label="Stops it takes, against the bare head"
            unit="stops"
            max={12}
            min={-4}
            step={0.1}
            value={numbers.lossStops}
            onChange={(lossStops) => set({ lossStops })}
          />
          <StatedInput
            label="Mass"
            unit="kg"
            max={60}
            step={0.1}
            value={numbers.massKg}
            onChange={(massKg) => set({ massKg })}
          />
          <div>
            <Checkbox
              checked={numbers.beamDeg !== null}
              onChange={(known) => set({ beamDeg: known ? { value: 90, from: 'assumed', source: '' } : null })}
            >
              The beam’s angle is known
            </Checkbox>
            {numbers.beamDeg && (
              <StatedInput
                label="Full angle to half the light"
                unit="°"
                min={1}
                max={360}
                step={5}
                value={numbers.beamDeg}
                onChange={(beamDeg) => set({ beamDeg })}
              />
            )}
          </div>
        </div>
      )
    }
    case 'gel': {
      const { numbers } = body
      const set = (patch: Partial<typeof numbers>) => onChange({ kind: 'gel', numbers: { ...numbers, ...patch } })
      return (
        <div className={GRID}>
          <StatedInput
            label="Shift; plus is warmer"
            unit="mired"
            min={-500}
            max={500}
            step={5}
            value={numbers.miredShift}
            onChange={(miredShift) => set({ miredShift })}
          />
          <StatedInput
            label="Light it lets through, of 1"
            min={0.001}
            max={1}
            step={0.01}
            value={numbers.transmission}
            onChange={(transmission) => set({ transmission })}
          />
          <Field label="What the maker prints" hint="Where it differs from the shift computed with.">
            <NumberInput
              allowEmpty
              unit="mired"
              min={-500}
              max={500}
              value={numbers.printedMired}
              onChange={(printedMired) => set({ printedMired })}
            />
          </Field>
          <Field label="Colour it is drawn with">
            <Input
              type="color"
              className="!h-9 !p-1 max-md:!h-11"
              value={numbers.colour}
              onChange={(event) => set({ colour: event.target.value })}
            />
          </Field>
        </div>
      )
    }
    case 'support': {
      const { numbers } = body
      const set = (patch: Partial<typeof numbers>) => onChange({ kind: 'support', numbers: { ...numbers, ...patch } })
      return (
        <div className={GRID}>
          <Field label="Kind">
            <Select
              options={SUPPORT_KINDS.map((kind) => ({ value: kind, label: kind }))}
              value={numbers.kind}
              onChange={(kind) => set({ kind })}
            />
          </Field>
          <span className="max-sm:hidden" />
          <StatedInput
            label="Reaches"
            unit="m"
            max={12}
            step={0.1}
            value={numbers.maxHeightM}
            onChange={(maxHeightM) => set({ maxHeightM })}
          />
          <StatedInput
            label="Carries, as the maker allows"
            unit="kg"
            max={200}
            step={0.5}
            value={numbers.maxLoadKg}
            onChange={(maxLoadKg) => set({ maxLoadKg })}
          />
        </div>
      )
    }
  }
}
