import { Plus } from 'lucide-react'
import { useState } from 'react'
import type { Caution } from '#shared/domain/lighting/cautions.ts'
import { sizeLabel } from '#shared/domain/lighting/reading-words.ts'
import type { SetupReading } from '#shared/domain/lighting/readings.ts'
import type { SetupUse } from '#shared/domain/lighting/setup-use.ts'
import { shutterLabel } from '#shared/domain/lighting/stops.ts'
import { fNumberLabel } from '#shared/domain/lighting/words.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { lengthLabel, useLengthUnit } from '#src/lib/length-unit.ts'
import { Button } from '#src/ui/button.tsx'
import { Field } from '#src/ui/field.tsx'
import { Menu } from '#src/ui/menu.tsx'
import type { SetupWriter } from '../../use-setup-writer.ts'
import { CommitInput, CommitTextarea } from '../editors/commit-input.tsx'
import { SuggestPower } from '../power/suggest-power.tsx'
import { CautionList } from './caution-list.tsx'
import { Figures } from './figures.tsx'
import { KitGroups } from './kit-groups.tsx'
import { LightGroups } from './light-groups.tsx'
import { LightTable } from './light-table.tsx'
import type { OpenGroups } from './lines.tsx'

type OverviewProps = {
  whole: WholeSetup
  reading: SetupReading
  use: Pick<SetupUse, 'orientations' | 'frames'>
  cautions: readonly Caution[]
  writer: SetupWriter
  mayWrite: boolean
  chosenKey: string | null
  groups: OpenGroups
  nameOfPlace: (placeId: string) => string
  onChoose: (key: string) => void
}

const KINDS = { panel: 'panel', flag: 'flag', prop: 'part of the set' } as const

/** The numbers of a setup beside its drawings. */
export function Overview({
  whole,
  reading,
  use,
  cautions,
  writer,
  mayWrite,
  chosenKey,
  groups,
  nameOfPlace,
  onChoose,
}: OverviewProps) {
  const unit = useLengthUnit()
  const [isSuggesting, setIsSuggesting] = useState(false)
  const { setup, places, props } = whole
  const { camera, background } = setup
  const length = (metres: number) => lengthLabel(metres, unit)
  return (
    <>
      {whole.lights.length === 0 && (
        <p className="mb-3 text-base text-ink-soft">
          No light yet. Add the main first: everything else is measured against it.
        </p>
      )}
      <LightTable
        whole={whole}
        reading={reading}
        chosenKey={chosenKey}
        onChoose={onChoose}
        {...(mayWrite
          ? {
              onSwitch: (id, isOn) => writer.patchLight(id, { isOn }),
              aside: whole.lights.length > 0 && (
                <Button size="small" onClick={() => setIsSuggesting(true)}>
                  Suggest power
                </Button>
              ),
            }
          : {})}
      />
      <SuggestPower whole={whole} writer={writer} open={isSuggesting} onOpenChange={setIsSuggesting} />
      <Figures whole={whole} reading={reading} />
      <CautionList cautions={cautions} onChoose={onChoose} />
      {whole.lights.length > 0 && (
        <div className="mt-4 border-b border-hair">
          <LightGroups whole={whole} reading={reading} groups={groups} />
          <KitGroups whole={whole} reading={reading} use={use} nameOfPlace={nameOfPlace} groups={groups} />
        </div>
      )}
      <section aria-labelledby="around-the-light" className="mt-5">
        <h2 id="around-the-light" className="mb-1 text-[1.1875rem]">
          Camera and set
        </h2>
        <ul className="text-sm [&>li]:border-t [&>li]:border-hair-soft [&>li]:py-1.5">
          <li>
            <RowButton
              onPress={() => onChoose(`${setup.id}:camera`)}
              title="Camera"
              sub={`${camera.focalMm} mm · ${fNumberLabel(camera.fNumber)} · ISO ${camera.iso} · ${shutterLabel(camera.shutterS)} · ${camera.whiteBalanceK} K · ${length(camera.at[1])} up`}
            />
          </li>
          <li>
            <RowButton
              onPress={() => onChoose(`${setup.id}:background`)}
              title={background.what === '' ? 'Background' : background.what}
              sub={`${sizeLabel(background.widthM, background.heightM, unit)} · ${length(-background.zM)} behind the sitter’s mark`}
            />
          </li>
          {places.map((place) => (
            <li key={place.id}>
              <RowButton
                onPress={() => onChoose(place.id)}
                title={nameOfPlace(place.id)}
                sub={`eyes ${lengthLabel(place.eyeHeightM, unit, true)} up`}
              />
            </li>
          ))}
          {props.map((prop) => (
            <li key={prop.id}>
              <RowButton
                onPress={() => onChoose(prop.id)}
                title={prop.name}
                sub={`${KINDS[prop.kind]} · ${sizeLabel(prop.widthM, prop.heightM, unit)}`}
              />
            </li>
          ))}
        </ul>
        {mayWrite && (
          <Menu
            align="start"
            trigger={
              <Button size="small" className="mt-1.5">
                <Plus size={14} aria-hidden />
                Add to the set
              </Button>
            }
            items={[
              { label: 'A place for a sitter', onSelect: () => onChoose(writer.addPlace()) },
              { label: 'A panel', onSelect: () => onChoose(writer.addProp('panel')) },
              { label: 'A flag', onSelect: () => onChoose(writer.addProp('flag')) },
              { label: 'A part of the set', onSelect: () => onChoose(writer.addProp('prop')) },
            ]}
          />
        )}
      </section>
      <fieldset disabled={!mayWrite} className="mt-5 flex flex-col gap-3">
        <Field label="Name of the setup">
          <CommitInput value={setup.name} maxLength={80} required onCommit={(name) => writer.patchSetup({ name })} />
        </Field>
        <Field label="Note">
          <CommitTextarea value={setup.note} maxLength={2000} onCommit={(note) => writer.patchSetup({ note })} />
        </Field>
      </fieldset>
    </>
  )
}

/** The words of a row; pressing them opens what it stands for. */
function RowButton({ onPress, title, sub }: { onPress: () => void; title: string; sub: string }) {
  return (
    <button
      type="button"
      onClick={onPress}
      className="block w-full rounded-r text-left hover:text-draft max-md:min-h-11"
    >
      {title} <span className="block text-xs text-ink-soft">{sub}</span>
    </button>
  )
}
