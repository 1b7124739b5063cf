import { Copy, Trash2 } from 'lucide-react'
import { useState } from 'react'
import { Link } from 'react-router-dom'
import type { Plan } from '#shared/domain/plan/read-plan.ts'
import type { Set as ShootSet } from '#shared/domain/plan/schema.ts'
import { count } from '#src/lib/format.ts'
import { useShoot } from '#src/realtime/shoot-realtime.tsx'
import { Button, IconButton } from '#src/ui/button.tsx'
import { Confirm } from '#src/ui/confirm.tsx'
import { Field } from '#src/ui/field.tsx'
import { NumberInput } from '#src/ui/number-input.tsx'
import { Select } from '#src/ui/select.tsx'
import { Sheet } from '#src/ui/sheet.tsx'
import { Swatch } from '#src/ui/swatch.tsx'
import { toast } from '#src/ui/toast.ts'
import { useIsPhone } from '#src/ui/use-media.ts'
import type { OrderWriter } from '../use-order-writer.ts'
import { RoomMoves } from './room-moves.tsx'
import { SetColour } from './set-colour.tsx'
import { TextLine } from '#src/ui/text-line.tsx'

export type SetsSheetProps = { plan: Plan; writer: OrderWriter; onClose: () => void }

/** The places that are dressed and lit, and the ways between the rooms they are in. */
export function SetsSheet({ plan, writer, onClose }: SetsSheetProps) {
  const isPhone = useIsPhone()
  const shoot = useShoot()
  const sets = [...plan.sets.values()].sort((a, b) => a.name.localeCompare(b.name))
  const [openId, setOpenId] = useState<string | null>(null)
  const [removing, setRemoving] = useState<ShootSet | null>(null)
  const usesOf = (set: ShootSet) => [...plan.shots.values()].filter((planned) => planned.set?.id === set.id)
  const roomName = (set: ShootSet) => plan.brief.rooms.find((room) => room.id === set.roomId)?.name ?? 'no room yet'

  const remove = (set: ShootSet) => {
    writer.removeSet(set.id)
    setRemoving(null)
    toast.say(`“${set.name}” is taken out.`, { label: 'Undo', onPress: () => writer.putSetBack(set) })
  }

  return (
    <Sheet open onOpenChange={(open) => !open && onClose()} title="Sets and rooms" side={isPhone ? 'bottom' : 'right'}>
      <p className="mb-3 text-sm text-ink-soft">
        A set is a place that is dressed and lit. Minutes to dress and strike it, and the way between two rooms, count
        in every changeover.
      </p>
      {sets.length === 0 && <p className="mb-3 text-sm">There is no set yet.</p>}
      <ul>
        {sets.map((set) => {
          const uses = usesOf(set)
          const isOpen = openId === set.id
          return (
            <li key={set.id} className="border-t border-hair py-1.5">
              <div className="flex items-center gap-1">
                <button
                  type="button"
                  aria-expanded={isOpen}
                  onClick={() => setOpenId(isOpen ? null : set.id)}
                  className="flex min-h-11 min-w-0 flex-1 items-center gap-2.5 text-left"
                >
                  <Swatch colour={set.colour} sizePx={18} />
                  <span className="min-w-0 flex-1">
                    <span className="block truncate font-semibold">{set.name}</span>
                    <span className="block truncate text-xs text-ink-soft">
                      {roomName(set)} · {count(uses.length, 'shot')}
                    </span>
                  </span>
                </button>
                {writer.mayPlan && (
                  <>
                    <IconButton
                      label={`Make a second ${set.name}`}
                      onClick={() => setOpenId(writer.addSet({ ...set, name: `${set.name}, second`.slice(0, 80) }))}
                    >
                      <Copy size={16} aria-hidden />
                    </IconButton>
                    <IconButton
                      label={`Remove ${set.name}`}
                      onClick={() => (uses.length > 0 ? setRemoving(set) : remove(set))}
                    >
                      <Trash2 size={16} aria-hidden />
                    </IconButton>
                  </>
                )}
              </div>
              {isOpen && <SetFields set={set} plan={plan} writer={writer} />}
            </li>
          )
        })}
      </ul>
      {writer.mayPlan && (
        <Button
          className="mt-2"
          onClick={() =>
            setOpenId(writer.addSet({ name: `Set ${sets.length + 1}`, roomId: plan.brief.rooms[0]?.id ?? null }))
          }
        >
          Add a set
        </Button>
      )}
      <RoomMoves plan={plan} writer={writer} />
      <p className="mt-4 text-xs text-ink-soft">
        Rooms are written down in the{' '}
        <Link to={`/shoots/${shoot.id}/brief`} className="underline underline-offset-2">
          brief
        </Link>
        .
      </p>
      <Confirm
        open={removing !== null}
        onOpenChange={(open) => !open && setRemoving(null)}
        title={`Remove ${removing?.name ?? ''}?`}
        action="Remove"
        onConfirm={() => removing && remove(removing)}
      >
        {removing &&
          `Made there: ${usesOf(removing)
            .map(({ shot }) => shot.title)
            .join('; ')}. These shots stay where they are, without a set.`}
      </Confirm>
    </Sheet>
  )
}

function SetFields({ set, plan, writer }: { set: ShootSet; plan: Plan; writer: OrderWriter }) {
  const readOnly = !writer.mayPlan
  const patch = (change: Parameters<OrderWriter['patchSet']>[1]) => writer.patchSet(set.id, change)
  return (
    <div className="flex flex-col gap-3 pt-1 pb-3">
      <TextLine
        required
        label="Name"
        value={set.name}
        maxLength={80}
        readOnly={readOnly}
        onChange={(name) => patch({ name })}
      />
      <div className="grid grid-cols-2 gap-3">
        <Field label="Room">
          <Select
            disabled={readOnly}
            value={set.roomId ?? ''}
            options={[
              { value: '', label: 'No room yet' },
              ...plan.brief.rooms.map((room) => ({ value: String(room.id), label: room.name })),
            ]}
            onChange={(id) => patch({ roomId: plan.brief.rooms.find((room) => room.id === id)?.id ?? null })}
          />
        </Field>
        <SetColour value={set.colour} readOnly={readOnly} onChange={(colour) => patch({ colour })} />
      </div>
      <TextLine
        label="Background"
        value={set.background}
        maxLength={200}
        placeholder="Blue limewash"
        readOnly={readOnly}
        onChange={(background) => patch({ background })}
      />
      <div className="grid grid-cols-2 gap-3">
        <Field label="To dress">
          <NumberInput
            value={set.dressMin}
            unit="min"
            min={0}
            max={480}
            readOnly={readOnly}
            onChange={(dressMin) => patch({ dressMin })}
          />
        </Field>
        <Field label="To strike">
          <NumberInput
            value={set.strikeMin}
            unit="min"
            min={0}
            max={480}
            readOnly={readOnly}
            onChange={(strikeMin) => patch({ strikeMin })}
          />
        </Field>
      </div>
      <TextLine
        prose
        label="Note"
        value={set.note}
        maxLength={2000}
        readOnly={readOnly}
        onChange={(note) => patch({ note })}
      />
    </div>
  )
}
