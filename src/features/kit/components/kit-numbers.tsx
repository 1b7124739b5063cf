import type { KitItem } from '#shared/api/kit.ts'
import {
  type GelNumbers,
  type KitBody,
  MODIFIER_SHAPES,
  type ModifierNumbers,
  PANEL_USES,
  type PanelNumbers,
  SUPPORT_KINDS,
  type SupportNumbers,
} from '#shared/domain/kit/schema.ts'
import { Field } from '#src/ui/field.tsx'
import { NumberInput } from '#src/ui/number-input.tsx'
import { Select } from '#src/ui/select.tsx'
import { useKitIssue } from '../kit-issues.ts'
import { SUPPORT_WORDS } from '../kit-words.ts'
import { DrawnColour, GRID, Size } from './number-fields.tsx'
import { MaybeStatedInput, StatedInput } from './stated-input.tsx'
import { LampFields, UnitFields } from './unit-fields.tsx'

export type KitNumbersProps = {
  body: KitBody
  /** Modifiers of the kit, which meter readings of a unit name. */
  modifiers: readonly KitItem[]
  onChange: (body: KitBody) => void
}

/** The numbers of one item, by its kind. */
export function KitNumbers({ body, modifiers, onChange }: KitNumbersProps) {
  switch (body.kind) {
    case 'unit':
      return (
        <UnitFields
          numbers={body.numbers}
          modifiers={modifiers}
          onChange={(patch) => onChange({ kind: 'unit', numbers: { ...body.numbers, ...patch } })}
        />
      )
    case 'lamp':
      return (
        <LampFields
          numbers={body.numbers}
          onChange={(patch) => onChange({ kind: 'lamp', numbers: { ...body.numbers, ...patch } })}
        />
      )
    case 'modifier':
      return (
        <ModifierFields
          numbers={body.numbers}
          onChange={(patch) => onChange({ kind: 'modifier', numbers: { ...body.numbers, ...patch } })}
        />
      )
    case 'gel':
      return (
        <GelFields
          numbers={body.numbers}
          onChange={(patch) => onChange({ kind: 'gel', numbers: { ...body.numbers, ...patch } })}
        />
      )
    case 'support':
      return (
        <SupportFields
          numbers={body.numbers}
          onChange={(patch) => onChange({ kind: 'support', numbers: { ...body.numbers, ...patch } })}
        />
      )
    case 'panel':
      return (
        <PanelFields
          numbers={body.numbers}
          onChange={(patch) => onChange({ kind: 'panel', numbers: { ...body.numbers, ...patch } })}
        />
      )
  }
}

type FieldsProps<Numbers> = { numbers: Numbers; onChange: (patch: Partial<Numbers>) => void }

function ModifierFields({ numbers, onChange }: FieldsProps<ModifierNumbers>) {
  return (
    <div className={GRID}>
      <Field label="Shape">
        <Select
          options={MODIFIER_SHAPES.map((shape) => ({ value: shape, label: shape }))}
          value={numbers.shape}
          onChange={(shape) => onChange({ shape })}
        />
      </Field>
      <Size of="face" widthM={numbers.widthM} heightM={numbers.heightM} onChange={onChange} />
      <StatedInput
        name="lossStops"
        label="Stops it takes, against the bare head"
        unit="stops"
        step={0.1}
        value={numbers.lossStops}
        onChange={(lossStops) => onChange({ lossStops })}
      />
      <StatedInput
        name="massKg"
        label="Mass"
        unit="kg"
        step={0.1}
        value={numbers.massKg}
        onChange={(massKg) => onChange({ massKg })}
      />
      <MaybeStatedInput
        name="beamDeg"
        label="Full angle to half the light"
        known="The beam’s angle is known"
        start={90}
        unit="°"
        step={5}
        value={numbers.beamDeg}
        onChange={(beamDeg) => onChange({ beamDeg })}
      />
    </div>
  )
}

function GelFields({ numbers, onChange }: FieldsProps<GelNumbers>) {
  return (
    <div className={GRID}>
      <StatedInput
        name="miredShift"
        label="Shift; plus is warmer"
        unit="mired"
        step={5}
        value={numbers.miredShift}
        onChange={(miredShift) => onChange({ miredShift })}
      />
      <StatedInput
        name="transmission"
        label="Light it lets through, of 1"
        step={0.01}
        value={numbers.transmission}
        onChange={(transmission) => onChange({ transmission })}
      />
      <Field
        label="What the maker prints"
        hint="Where it differs from the shift computed with."
        error={useKitIssue('printedMired')}
      >
        <NumberInput
          allowEmpty
          unit="mired"
          value={numbers.printedMired}
          onChange={(printedMired) => onChange({ printedMired })}
        />
      </Field>
      <DrawnColour value={numbers.colour} onChange={(colour) => onChange({ colour })} />
    </div>
  )
}

function SupportFields({ numbers, onChange }: FieldsProps<SupportNumbers>) {
  const isBoom = numbers.kind === 'boom'
  return (
    <div className={GRID}>
      <Field label="Kind">
        <Select
          options={SUPPORT_KINDS.map((kind) => ({ value: kind, label: SUPPORT_WORDS[kind] }))}
          value={numbers.kind}
          onChange={(kind) => onChange({ kind })}
        />
      </Field>
      <span className="max-sm:hidden" />
      <StatedInput
        name="maxHeightM"
        label="Goes up to"
        unit="m"
        step={0.1}
        value={numbers.maxHeightM}
        onChange={(maxHeightM) => onChange({ maxHeightM })}
      />
      <StatedInput
        name="maxLoadKg"
        label="Carries, as the maker allows"
        unit="kg"
        step={0.5}
        value={numbers.maxLoadKg}
        onChange={(maxLoadKg) => onChange({ maxLoadKg })}
      />
      <MaybeStatedInput
        name="minHeightM"
        label="Goes down to"
        known="Its lowest height is known"
        start={0.8}
        unit="m"
        step={0.1}
        value={numbers.minHeightM}
        onChange={(minHeightM) => onChange({ minHeightM })}
      />
      {(isBoom || numbers.reachM) && (
        <MaybeStatedInput
          name="reachM"
          label="The head hangs out by"
          known="Its reach is known"
          start={1.5}
          unit="m"
          step={0.1}
          value={numbers.reachM}
          onChange={(reachM) => onChange({ reachM })}
        />
      )}
      {(isBoom || numbers.counterReachM) && (
        <MaybeStatedInput
          name="counterReachM"
          label="The counterweight sits at"
          known="Where its counterweight sits is known"
          start={0.5}
          unit="m"
          step={0.1}
          value={numbers.counterReachM}
          onChange={(counterReachM) => onChange({ counterReachM })}
        />
      )}
      {(isBoom || numbers.armMassKg) && (
        <MaybeStatedInput
          name="armMassKg"
          label="Mass of the arm"
          known="The mass of its arm is known"
          start={1}
          unit="kg"
          step={0.1}
          value={numbers.armMassKg}
          onChange={(armMassKg) => onChange({ armMassKg })}
        />
      )}
    </div>
  )
}

function PanelFields({ numbers, onChange }: FieldsProps<PanelNumbers>) {
  return (
    <div className={GRID}>
      <Field label="Use" hint="A panel gives light back, a flag keeps it off.">
        <Select
          options={PANEL_USES.map((use) => ({ value: use, label: use }))}
          value={numbers.use}
          onChange={(use) => onChange({ use })}
        />
      </Field>
      <Size of="panel" widthM={numbers.widthM} heightM={numbers.heightM} onChange={onChange} />
      <DrawnColour value={numbers.colour} onChange={(colour) => onChange({ colour })} />
      <StatedInput
        name="massKg"
        label="Mass"
        unit="kg"
        step={0.1}
        value={numbers.massKg}
        onChange={(massKg) => onChange({ massKg })}
      />
    </div>
  )
}
