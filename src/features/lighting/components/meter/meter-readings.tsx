import { useId, useState } from 'react'
import type { LightId } from '#shared/ids.ts'
import { meterFaults } from '#shared/domain/kit/meter-reading.ts'
import type { LightReading, SetupReading } from '#shared/domain/lighting/readings.ts'
import { type Light, isLamp } from '#shared/domain/lighting/schema.ts'
import { powersOf, stopsBetween } from '#shared/domain/lighting/stops.ts'
import { fNumberLabel, lightSummary, powerLabel, purposeWord, stopsLabel } from '#shared/domain/lighting/words.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { civilShort, count, today } from '#src/lib/format.ts'
import { useMayWrite, useShoot } from '#src/realtime/shoot-realtime.tsx'
import { Button } from '#src/ui/button.tsx'
import { Dialog } from '#src/ui/dialog.tsx'
import { Field } from '#src/ui/field.tsx'
import { FormError } from '#src/ui/form-error.tsx'
import { NumberInput } from '#src/ui/number-input.tsx'
import { Select } from '#src/ui/select.tsx'
import { toast } from '#src/ui/toast.ts'
import { type MeterDraft, SHARE_LEAST, assumedFNumber, draftOf, readingOf } from '../../meter-draft.ts'
import { useKeepReadings } from '../../use-keep-readings.ts'
import type { Kit } from '../../use-kit.ts'
import type { SetupWriter } from '../../use-setup-writer.ts'
import { LengthInput } from '../editors/length-input.tsx'
import { GroupLetter } from '../group-letter.tsx'

export type MeterReadingsProps = {
  whole: WholeSetup
  reading: SetupReading
  kit: Kit
  writer: SetupWriter
  open: boolean
  onOpenChange: (open: boolean) => void
}

/** What a meter reads of each light, in the place of what was assumed. */
export function MeterReadings(props: MeterReadingsProps) {
  return props.open ? <Readings {...props} /> : null
}

function Readings({ whole, reading, kit, writer, onOpenChange }: MeterReadingsProps) {
  const mayWrite = useMayWrite('lighting')
  const { inStudio } = useShoot()
  const keep = useKeepReadings()
  const [drafts, setDrafts] = useState<ReadonlyMap<LightId, MeterDraft>>(new Map())
  const [refusals, setRefusals] = useState<readonly string[]>([])
  const { iso } = whole.setup.camera
  const rows = whole.lights.flatMap((light) => {
    const at = reading.lights.find(({ lightId }) => lightId === light.id)
    return at ? [{ light, at, draft: drafts.get(light.id) ?? draftOf(light, at) }] : []
  })
  const entered = rows.filter(({ draft }) => draft.fNumber !== null)
  const good = entered.filter(({ light, at, draft }) => faultsOf(light, at, draft, iso).length === 0)

  function save() {
    const measured = good.map(({ light, at, draft }) => ({ light, reading: readingOf(light, at, draft, iso) }))
    keep.mutate(
      { measured, when: civilShort(today()) },
      {
        onSuccess: (kept) => {
          for (const { light, unit } of kept) writer.patchLight(light.id, { unit })
          // Readings that only the kit room lacks stay in their fields: pressing again tells it again.
          const refused = inStudio ? kept.filter(({ notKept }) => notKept !== null) : []
          setRefusals([...new Set(refused.flatMap(({ notKept }) => (notKept === null ? [] : [notKept])))])
          setDrafts((before) => {
            const left = new Map(before)
            for (const { light } of kept) if (!refused.some((one) => one.light.id === light.id)) left.delete(light.id)
            return left
          })
          if (refused.length > 0) return
          toast.say(
            inStudio
              ? `${count(kept.length, 'reading')} taken over, here and in the kit room.`
              : `${count(kept.length, 'reading')} taken over in this setup. The kit room is the studio’s and stays as it is.`,
          )
          if (good.length === entered.length) onOpenChange(false)
        },
      },
    )
  }

  return (
    <Dialog
      open
      wide
      onOpenChange={onOpenChange}
      title="Meter readings"
      description={`One light at a time, the others off; the meter at ISO ${iso}, where the light is read, looking at the light. ${
        inStudio
          ? 'The kit room keeps what was read, and offers it to other open shoots.'
          : 'You are not in the studio: readings go into this setup, and the kit room stays as it is.'
      }`}
      footer={
        <>
          <Button onClick={() => onOpenChange(false)}>Close</Button>
          {mayWrite && (
            <Button variant="primary" disabled={good.length === 0} busy={keep.isPending} onClick={save}>
              {good.length === 0 ? 'Take readings over' : `Take ${count(good.length, 'reading')} over`}
            </Button>
          )}
        </>
      }
    >
      <div className="flex flex-col gap-3">
        <FormError>
          {refusals.length > 0
            ? `${refusals.join(' ')} The lights of this setup have the readings.`
            : keep.error
              ? 'The readings could not be taken over. They are still here; try again.'
              : null}
        </FormError>
        {rows.length === 0 && <p className="text-base text-ink-soft">No light yet. Add one, then measure it.</p>}
        {kit.state === 'not there' && (
          <p className="text-sm text-ink-soft">The kit room cannot be reached; readings go into this setup.</p>
        )}
        <ul className="flex flex-col divide-y divide-hair">
          {rows.map(({ light, at, draft }) => (
            <MeterRow
              key={light.id}
              light={light}
              at={at}
              draft={draft}
              iso={iso}
              mayWrite={mayWrite}
              onChange={(next) => setDrafts(new Map([...drafts, [light.id, next]]))}
            />
          ))}
        </ul>
      </div>
    </Dialog>
  )
}

function faultsOf(light: Light, at: LightReading, draft: MeterDraft, iso: number) {
  const { numbers } = light.unit
  return isLamp(numbers) ? [] : meterFaults(readingOf(light, at, draft, iso), numbers)
}

type MeterRowProps = {
  light: Light
  at: LightReading
  draft: MeterDraft
  iso: number
  mayWrite: boolean
  onChange: (draft: MeterDraft) => void
}

function MeterRow({ light, at, draft, iso, mayWrite, onChange }: MeterRowProps) {
  const id = useId()
  const { numbers } = light.unit
  const name = purposeWord(light.purpose)
  const why = isLamp(numbers)
    ? 'A lamp that burns all the time: put its light at a metre into the kit room.'
    : at.beamShare < SHARE_LEAST
      ? `It looks elsewhere, and hardly any of it reaches ${at.where === 'wall' ? 'that part of the wall' : 'the sitter'}. Aim it there to measure it.`
      : null
  return (
    <li aria-labelledby={id} className="flex flex-col gap-2 py-3 first:pt-0">
      <h3 id={id} className="flex flex-wrap items-center gap-x-2 gap-y-0.5 font-sans text-base font-semibold">
        <GroupLetter group={light.group} />
        {name}
        <span className="min-w-0 text-sm font-normal text-ink-soft">{lightSummary(light)}</span>
      </h3>
      {why !== null || isLamp(numbers) ? (
        <p className="text-sm text-ink-soft">{why}</p>
      ) : (
        <MeterFields
          light={light}
          at={at}
          draft={draft}
          iso={iso}
          mayWrite={mayWrite}
          leastDenominator={numbers.minPowerDenominator}
          onChange={onChange}
        />
      )}
    </li>
  )
}

function MeterFields({
  light,
  at,
  draft,
  iso,
  mayWrite,
  leastDenominator,
  onChange,
}: MeterRowProps & { leastDenominator: number }) {
  const assumed = assumedFNumber(light, at, draft, iso)
  const faults = draft.fNumber === null ? [] : faultsOf(light, at, draft, iso)
  const faultOf = (field: string) => faults.find((fault) => fault.field === field)?.message
  const powers = powersOf(leastDenominator)
  const labels = powers.map(powerLabel)
  const power = powerLabel(draft.power)
  const was = at.measured === null ? 'assumed' : 'measured before'
  return (
    <>
      {mayWrite && (
        <div className="grid grid-cols-2 items-start gap-2 sm:grid-cols-3">
          <Field label="The meter reads f/" error={faultOf('fNumber')} className="max-sm:col-span-2">
            <NumberInput
              allowEmpty
              step={0.1}
              inputMode="decimal"
              value={draft.fNumber}
              // What is wrong goes with the first key: were it to go on leaving, the dialog would shrink under a press.
              onInput={() => {
                if (faults.length > 0) onChange({ ...draft, fNumber: null })
              }}
              onChange={(fNumber) => onChange({ ...draft, fNumber })}
            />
          </Field>
          <Field
            label={at.where === 'wall' ? 'At the wall, off by' : 'At the eyes, off by'}
            error={faultOf('distanceM')}
          >
            <LengthInput
              min={0}
              max={60}
              value={draft.distanceM}
              onChange={(distanceM) => onChange({ ...draft, distanceM })}
            />
          </Field>
          <Field label="Power" error={faultOf('power')}>
            <Select
              options={[...(labels.includes(power) ? [] : [power]), ...labels].map((label) => ({
                value: label,
                label,
              }))}
              value={power}
              onChange={(label) => onChange({ ...draft, power: powers[labels.indexOf(label)] ?? draft.power })}
            />
          </Field>
        </div>
      )}
      {faultOf('zoomMm') !== undefined && <p className="text-xs font-semibold text-velvet">{faultOf('zoomMm')}</p>}
      <p role="status" className="text-sm">
        {was} {fNumberLabel(assumed)}
        {draft.fNumber !== null && faults.length === 0 && (
          <>
            , measured <b className="font-semibold">{fNumberLabel(draft.fNumber)}</b>
            {assumed > 0 && ` (${stopsLabel(stopsBetween(draft.fNumber, assumed))})`}
          </>
        )}
      </p>
    </>
  )
}
