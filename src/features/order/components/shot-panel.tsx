import { MoreHorizontal } from 'lucide-react'
import { Link } from 'react-router-dom'
import { NEEDS } from '#shared/domain/board/schema.ts'
import { clockLabel } from '#shared/domain/order/clock.ts'
import type { Plan, PlannedShot } from '#shared/domain/plan/read-plan.ts'
import { ORIENTATIONS } from '#shared/domain/plan/schema.ts'
import { useShoot } from '#src/realtime/shoot-realtime.tsx'
import { IconButton } from '#src/ui/button.tsx'
import { Caution } from '#src/ui/caution.tsx'
import { Field } from '#src/ui/field.tsx'
import { Menu, type MenuItem } from '#src/ui/menu.tsx'
import { NumberInput } from '#src/ui/number-input.tsx'
import { Select } from '#src/ui/select.tsx'
import { toast } from '#src/ui/toast.ts'
import type { OrderDay } from '../use-order-day.ts'
import type { List, OrderWriter } from '../use-order-writer.ts'
import { NEED_WORDS, ORIENTATION_WORDS, dayName } from '../words.ts'
import { CoverChoice } from './cover-choice.tsx'
import { Panel, PanelSection } from '#src/ui/panel.tsx'
import { ShotLooks } from './shot-looks.tsx'
import { ShotRules } from './shot-rules.tsx'
import { TextLine } from '#src/ui/text-line.tsx'

export type ShotPanelProps = {
  planned: PlannedShot
  plan: Plan
  shown: OrderDay
  lists: readonly List[]
  writer: OrderWriter
  onClose: () => void
  onOpen: (shotId: string) => void
  onSets: () => void
}

/** Everything about one shot. Who may only read sees the same, without the controls. */
export function ShotPanel({ planned, plan, shown, lists, writer, onClose, onOpen, onSets }: ShotPanelProps) {
  const shoot = useShoot()
  const { shot, plan: own, number } = planned
  const { mayBoard, mayPlan } = writer
  const list = lists.find(({ shots }) => shots.some((other) => other.shot.id === shot.id))
  const scheduled = shown.day.shots.find(({ shotId }) => shotId === shot.id)
  const broken = shown.day.broken.filter(({ shotId }) => shotId === shot.id)
  const index = Math.max(0, list?.shots.findIndex((other) => other.shot.id === shot.id) ?? 0)

  const remove = () => {
    writer.removeShot(shot.id)
    onClose()
    toast.say(`“${shot.title}” is taken out.`, { label: 'Undo', onPress: () => writer.putShotBack(shot) })
  }
  const moveTo = (target: List): MenuItem => {
    const dayIndex = plan.days.findIndex(({ day }) => day.id === target.id)
    const day = plan.days[dayIndex]
    return {
      label: day ? `Move to ${dayName(day, dayIndex)}` : 'Take off the day',
      onSelect: () => {
        writer.placeAtEnd(target, shot.id)
        toast.say(
          `“${shot.title}” ${day ? `is now the last shot of ${dayName(day, dayIndex)}` : 'is not placed any more'}.`,
          { label: 'Undo', onPress: () => writer.patchShot(shot.id, { place: shot.place }) },
        )
      },
    }
  }
  const items: MenuItem[] = [
    ...(list ? [{ label: 'Make a second one', onSelect: () => onOpen(writer.copyShot(list, planned)) }] : []),
    ...lists.filter((other) => other !== list).map(moveTo),
    'line',
    { label: 'Remove this shot', danger: true, onSelect: remove },
  ]

  return (
    <Panel
      className="w-[26.25rem] max-lg:w-[21rem]"
      title={number === null ? shot.title : `${number} · ${shot.title}`}
      onClose={onClose}
      aside={
        mayBoard && (
          <Menu
            trigger={
              <IconButton label="More about this shot" className="-mt-1.5">
                <MoreHorizontal size={18} aria-hidden />
              </IconButton>
            }
            items={items}
          />
        )
      }
    >
      {scheduled ? (
        <p className="text-sm text-ink-soft">
          {clockLabel(scheduled.startMin)} to {clockLabel(scheduled.endMin)}
          {!scheduled.made && <b className="font-semibold text-glow-ink"> · after the hard out</b>}
        </p>
      ) : (
        <p className="text-sm text-ink-soft">Not placed on this day.</p>
      )}
      {broken.length > 0 && (
        <Caution>
          {broken.map(({ key, words }) => (
            <p key={key}>{words}</p>
          ))}
        </Caution>
      )}
      <TextLine
        required
        label="Title"
        value={shot.title}
        maxLength={120}
        readOnly={!mayBoard}
        onChange={(title) => writer.patchShot(shot.id, { title })}
      />
      <Field label="Needed">
        <Select
          disabled={!mayBoard}
          value={shot.need}
          options={NEEDS.map((need) => ({ value: need, label: NEED_WORDS[need] }))}
          onChange={(need) => writer.patchShot(shot.id, { need })}
        />
      </Field>
      <div className="grid grid-cols-2 gap-3">
        <Field label="Set" error={planned.set === null ? 'No set yet.' : undefined}>
          <Select
            disabled={!mayPlan}
            value={planned.set?.id ?? ''}
            options={[
              { value: '', label: 'None yet' },
              ...[...plan.sets.values()].map((set) => ({ value: String(set.id), label: set.name })),
            ]}
            onChange={(id) => writer.patchPlan(shot.id, { setId: plan.sets.get(id)?.id ?? null })}
          />
        </Field>
        <Field label="Setup" error={planned.setup === null ? 'No setup yet.' : undefined}>
          <Select
            disabled={!mayPlan}
            value={planned.setup?.setup.id ?? ''}
            options={[
              { value: '', label: 'None yet' },
              ...[...plan.setups.values()].map(({ setup }) => ({ value: String(setup.id), label: setup.name })),
            ]}
            onChange={(id) => writer.patchPlan(shot.id, { setupId: plan.setups.get(id)?.setup.id ?? null })}
          />
        </Field>
      </div>
      <p className="-mt-2 flex gap-4 text-xs text-ink-soft">
        <button type="button" onClick={onSets} className="underline underline-offset-2 hover:text-ink max-md:min-h-11">
          {plan.sets.size === 0 ? 'Add the first set' : 'All sets and rooms'}
        </button>
        <Link
          to={planned.setup ? `/shoots/${shoot.id}/lighting/${planned.setup.setup.id}` : `/shoots/${shoot.id}/lighting`}
          className="underline underline-offset-2 hover:text-ink max-md:min-h-11 max-md:content-center"
        >
          {planned.setup ? 'Open this setup' : 'Setups are made under Lighting'}
        </Link>
      </p>
      <PanelSection title="Who wears what">
        <ShotLooks planned={planned} plan={plan} writer={writer} />
      </PanelSection>
      <PanelSection title="The picture">
        <div className="grid grid-cols-2 gap-3">
          <Field label="Minutes">
            <NumberInput
              value={own.minutes}
              unit="min"
              min={1}
              max={480}
              step={5}
              readOnly={!mayPlan}
              onChange={(minutes) => writer.patchPlan(shot.id, { minutes })}
            />
          </Field>
          <Field label="Frames" hint="Counted for cards and batteries.">
            <NumberInput
              value={own.frames}
              min={1}
              max={9999}
              step={10}
              decimals={0}
              readOnly={!mayPlan}
              onChange={(frames) => writer.patchPlan(shot.id, { frames: Math.round(frames) })}
            />
          </Field>
          <TextLine
            label="Lens"
            value={own.lens}
            maxLength={80}
            placeholder="85 mm"
            readOnly={!mayPlan}
            onChange={(lens) => writer.patchPlan(shot.id, { lens })}
          />
          <Field label="Orientation">
            <Select
              disabled={!mayPlan}
              value={own.orientation}
              options={ORIENTATIONS.map((value) => ({ value, label: ORIENTATION_WORDS[value] }))}
              onChange={(orientation) => writer.patchPlan(shot.id, { orientation })}
            />
          </Field>
        </div>
        <CoverChoice
          planned={planned}
          mayWrite={mayBoard}
          onChange={(coverFrameId) => writer.patchShot(shot.id, { coverFrameId })}
        />
        <TextLine
          prose
          label="Note"
          value={shot.note}
          maxLength={2000}
          readOnly={!mayBoard}
          onChange={(note) => writer.patchShot(shot.id, { note })}
        />
      </PanelSection>
      <PanelSection title="Rules of this shot">
        <ShotRules
          planned={planned}
          plan={plan}
          writer={writer}
          broken={shown.day.broken}
          index={index}
          startMin={scheduled?.startMin ?? shown.day.lightsOnMin}
        />
      </PanelSection>
    </Panel>
  )
}
