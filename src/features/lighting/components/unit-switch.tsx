import { chooseLengthUnit, useLengthUnit } from '#src/lib/length-unit.ts'
import { Button } from '#src/ui/button.tsx'
import type { ScreenAction } from '#src/ui/screen-bar.tsx'

/** The switch between metres and feet as a line of a phone’s menu. */
export function useUnitAction(): ScreenAction {
  const unit = useLengthUnit()
  return unit === 'm'
    ? { label: 'Lengths in feet', onPress: () => chooseLengthUnit('ft') }
    : { label: 'Lengths in metres', onPress: () => chooseLengthUnit('m') }
}

/** Metres or feet, for this device. */
export function UnitSwitch() {
  const unit = useLengthUnit()
  const other = unit === 'm' ? 'ft' : 'm'
  return (
    <Button
      size="small"
      variant="quiet"
      aria-label={`Lengths in ${unit === 'm' ? 'metres' : 'feet'}; change to ${unit === 'm' ? 'feet' : 'metres'}`}
      onClick={() => chooseLengthUnit(other)}
    >
      <span className={unit === 'm' ? 'text-ink underline' : ''}>m</span>
      <span aria-hidden>/</span>
      <span className={unit === 'ft' ? 'text-ink underline' : ''}>ft</span>
    </Button>
  )
}
