import { useState } from 'react'
import type { PlannedDay } from '#shared/domain/plan/read-plan.ts'
import { count } from '#src/lib/format.ts'
import { Button } from '#src/ui/button.tsx'
import { Caution } from '#src/ui/caution.tsx'
import { Checkbox } from '#src/ui/checkbox.tsx'
import { Confirm } from '#src/ui/confirm.tsx'
import { Dialog } from '#src/ui/dialog.tsx'
import { Field } from '#src/ui/field.tsx'
import { Input } from '#src/ui/input.tsx'
import { NumberInput } from '#src/ui/number-input.tsx'
import type { OrderWriter } from '../use-order-writer.ts'
import { dayName } from '../words.ts'
import { ClockInput } from './clock-input.tsx'

export type DaySettingsProps = {
  planned: PlannedDay
  index: number
  days: number
  writer: OrderWriter
  onClose: () => void
  onAdded: (dayId: string) => void
}

/** Longer than this a day is called long, minutes (common practice, no source). */
const LONG_DAY_MIN = 600

/** The hours, meal, hands and chairs of a day. */
export function DaySettings({ planned, index, days, writer, onClose, onAdded }: DaySettingsProps) {
  const { day } = planned
  const [isRemoving, setIsRemoving] = useState(false)
  const readOnly = !writer.mayPlan
  const patch = (change: Parameters<OrderWriter['patchDay']>[1]) => writer.patchDay(day.id, change)
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      title={dayName(planned, index)}
      footer={
        !readOnly && (
          <>
            {days > 1 && (
              <Button
                variant="quiet"
                className="mr-auto"
                onClick={() => (planned.shots.length > 0 ? setIsRemoving(true) : remove())}
              >
                Remove this day
              </Button>
            )}
            <Button onClick={() => onAdded(writer.addDay(day))}>Add another day</Button>
          </>
        )
      }
    >
      <div className="flex flex-col gap-4">
        <Field label="Date">
          <Input
            type="date"
            readOnly={readOnly}
            value={day.date ?? ''}
            onChange={(event) => patch({ date: event.target.value === '' ? null : event.target.value })}
          />
        </Field>
        <div className="grid grid-cols-2 gap-3">
          <Field label="Lights on">
            <ClockInput
              readOnly={readOnly}
              valueMin={day.lightsOnMin}
              onChange={(lightsOnMin) => patch({ lightsOnMin })}
            />
          </Field>
          <Field label="Hard out" hint={day.hardOutMin >= 1440 ? 'Of the next day.' : ''}>
            <ClockInput
              readOnly={readOnly}
              valueMin={day.hardOutMin}
              notBeforeMin={day.lightsOnMin}
              onChange={(hardOutMin) => patch({ hardOutMin })}
            />
          </Field>
        </div>
        {day.hardOutMin - day.lightsOnMin > LONG_DAY_MIN && (
          <Caution
            title={`A long day: ${((day.hardOutMin - day.lightsOnMin) / 60).toFixed(1).replace('.0', '')} hours from lights on to hard out`}
          >
            Tired people make mistakes around stands and mains. Local law on working hours, breaks and children goes
            first; ask before you issue the calls.
          </Caution>
        )}
        <div>
          <Checkbox
            disabled={readOnly}
            checked={day.meal !== null}
            onChange={(has) => patch({ meal: has ? { minutes: 45, latestAfterMin: 300 } : null })}
          >
            A meal
          </Checkbox>
          {day.meal && (
            <div className="mt-2 grid grid-cols-2 gap-3">
              <Field label="Meal">
                <NumberInput
                  readOnly={readOnly}
                  value={day.meal.minutes}
                  unit="min"
                  min={5}
                  max={180}
                  step={5}
                  decimals={0}
                  onChange={(minutes) => day.meal && patch({ meal: { ...day.meal, minutes: Math.round(minutes) } })}
                />
              </Field>
              <Field label="At the latest after lights on">
                <NumberInput
                  readOnly={readOnly}
                  value={day.meal.latestAfterMin}
                  unit="min"
                  min={30}
                  max={720}
                  step={15}
                  decimals={0}
                  onChange={(latestAfterMin) =>
                    day.meal && patch({ meal: { ...day.meal, latestAfterMin: Math.round(latestAfterMin) } })
                  }
                />
              </Field>
            </div>
          )}
        </div>
        <div className="grid grid-cols-2 gap-3">
          <Field label="Hands" hint="People who can move lights.">
            <NumberInput
              readOnly={readOnly}
              value={day.hands}
              min={1}
              max={20}
              decimals={0}
              onChange={(hands) => patch({ hands: Math.round(hands) })}
            />
          </Field>
          <Field
            label="Chairs"
            hint={day.chairs === null ? 'Empty: as many as it takes, an assumption.' : 'Places for hair and make-up.'}
          >
            <NumberInput
              allowEmpty
              readOnly={readOnly}
              value={day.chairs}
              min={1}
              max={20}
              decimals={0}
              placeholder="Unlimited"
              onChange={(chairs) => patch({ chairs: chairs === null ? null : Math.round(chairs) })}
            />
          </Field>
        </div>
      </div>
      <Confirm
        open={isRemoving}
        onOpenChange={setIsRemoving}
        title={`Remove ${dayName(planned, index)}?`}
        action="Remove the day"
        onConfirm={remove}
      >
        {count(planned.shots.length, 'shot')} of it will be “not placed yet”. Nothing of them is lost.
      </Confirm>
    </Dialog>
  )

  function remove() {
    writer.removeDay(day.id)
    onClose()
  }
}
