import type { KitItem } from '#shared/api/kit.ts'
import type { LampNumbers, UnitNumbers } from '#shared/domain/kit/schema.ts'
import { Checkbox } from '#src/ui/checkbox.tsx'
import { MeterList } from './meter-list.tsx'
import { GRID, LeastPower, Words } from './number-fields.tsx'
import { MaybeStatedInput, StatedInput } from './stated-input.tsx'
import { ZoomTable } from './zoom-table.tsx'

type UnitFieldsProps = {
  numbers: UnitNumbers
  modifiers: readonly KitItem[]
  onChange: (patch: Partial<UnitNumbers>) => void
}

export function UnitFields({ numbers, modifiers, onChange }: UnitFieldsProps) {
  return (
    <div className={GRID}>
      <StatedInput
        name="guideNumberM"
        label="Guide number at ISO 100"
        unit="m"
        value={numbers.guideNumberM}
        onChange={(guideNumberM) => onChange({ guideNumberM })}
      />
      <StatedInput
        name="flashColourK"
        label="Colour of the flash"
        unit="K"
        step={100}
        value={numbers.flashColourK}
        onChange={(flashColourK) => onChange({ flashColourK })}
      />
      <StatedInput
        name="fullPops"
        label="Full pops from one charge"
        step={10}
        value={numbers.fullPops}
        onChange={(fullPops) => onChange({ fullPops })}
      />
      <StatedInput
        name="fullRecycleS"
        label="Ready again after a full pop"
        unit="s"
        step={0.1}
        value={numbers.fullRecycleS}
        onChange={(fullRecycleS) => onChange({ fullRecycleS })}
      />
      <StatedInput
        name="massKg"
        label="Mass with its power inside"
        unit="kg"
        step={0.1}
        value={numbers.massKg}
        onChange={(massKg) => onChange({ massKg })}
      />
      <MaybeStatedInput
        name="mainsWatts"
        label="Draws while it charges"
        known="It runs on the mains"
        start={1000}
        unit="W"
        step={50}
        value={numbers.mainsWatts}
        onChange={(mainsWatts) => onChange({ mainsWatts })}
      />
      <LeastPower
        value={numbers.minPowerDenominator}
        onChange={(minPowerDenominator) => onChange({ minPowerDenominator })}
      />
      <Checkbox
        className="self-end"
        checked={numbers.remotePower}
        onChange={(remotePower) => onChange({ remotePower })}
      >
        Power can be set from the camera
      </Checkbox>
      <Words
        name="sync"
        label="Sync"
        hint="How it keeps time with the shutter."
        value={numbers.sync}
        onChange={(sync) => onChange({ sync })}
      />
      <Words
        name="triggers"
        label="Triggers"
        hint="What sets it off: radio, cable, its cell."
        value={numbers.triggers}
        onChange={(triggers) => onChange({ triggers })}
      />
      <ZoomTable zoom={numbers.zoom} onChange={(zoom) => onChange({ zoom })} />
      <MeterList numbers={numbers} modifiers={modifiers} onChange={onChange} />
    </div>
  )
}

type LampFieldsProps = { numbers: LampNumbers; onChange: (patch: Partial<LampNumbers>) => void }

export function LampFields({ numbers, onChange }: LampFieldsProps) {
  return (
    <div className={GRID}>
      <StatedInput
        name="luxAtMetre"
        label="Light at a metre, bare and full"
        unit="lx"
        step={100}
        value={numbers.luxAtMetre}
        onChange={(luxAtMetre) => onChange({ luxAtMetre })}
      />
      <StatedInput
        name="watts"
        label="Draws"
        unit="W"
        step={5}
        value={numbers.watts}
        onChange={(watts) => onChange({ watts })}
      />
      <StatedInput
        name="colourK"
        label="Colour of its light"
        unit="K"
        step={100}
        value={numbers.colourK}
        onChange={(colourK) => onChange({ colourK })}
      />
      <StatedInput
        name="massKg"
        label="Mass"
        unit="kg"
        step={0.1}
        value={numbers.massKg}
        onChange={(massKg) => onChange({ massKg })}
      />
      <LeastPower
        value={numbers.minPowerDenominator}
        onChange={(minPowerDenominator) => onChange({ minPowerDenominator })}
      />
      <MaybeStatedInput
        name="beamDeg"
        label="Full angle to half the light"
        known="The beam’s angle is known"
        start={60}
        unit="°"
        step={5}
        value={numbers.beamDeg}
        onChange={(beamDeg) => onChange({ beamDeg })}
      />
      <Checkbox checked={numbers.onMains} onChange={(onMains) => onChange({ onMains })}>
        It runs on the mains
      </Checkbox>
      <Checkbox checked={numbers.remotePower} onChange={(remotePower) => onChange({ remotePower })}>
        Power can be set from the camera
      </Checkbox>
    </div>
  )
}
