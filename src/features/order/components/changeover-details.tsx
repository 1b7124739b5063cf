import type { ReactNode } from 'react'
import { clockLabel, minutesLabel } from '#shared/domain/order/clock.ts'
import type { ScheduledShot } from '#shared/domain/order/schedule-types.ts'

type Row = { what: string; detail?: string; minutes?: number | undefined }

/** The whole changeover before a shot: everything that is done, by whom it is waited for, and the minutes of each. */
export function ChangeoverDetails({ scheduled, hands }: { scheduled: ScheduledShot; hands: number }) {
  const { changeover } = scheduled
  const { setMove, lighting, wardrobe } = changeover
  const setRows: Row[] = setMove
    ? [
        ...(setMove.otherRoom
          ? [{ what: `Move from ${setMove.fromRoomName} to ${setMove.toRoomName}`, minutes: setMove.moveMin }]
          : []),
        ...(setMove.strikeMin > 0 ? [{ what: `Strike ${setMove.fromSetName}`, minutes: setMove.strikeMin }] : []),
        { what: `Dress ${setMove.toSetName}`, minutes: setMove.dressMin },
      ]
    : []
  const wardrobeRows = wardrobe.map((change): Row => {
    const work = [
      change.chairMin > 0 ? `${minutesLabel(change.chairMin)} in the chair` : '',
      change.changeMin > 0 ? `${minutesLabel(change.changeMin)} to change` : '',
      change.onClockMin > 0 ? `${minutesLabel(change.onClockMin)} on the clock` : 'hidden behind other work',
    ]
    return { what: `${change.sitterName}: ${change.lookName}`, detail: work.filter((part) => part !== '').join(' · ') }
  })
  return (
    <div className="flex flex-col gap-3">
      <p className="font-display text-lg font-semibold">{minutesLabel(changeover.minutes)} before this shot</p>
      <Part title="Set" rows={setRows} />
      <Part
        title={`Lights and camera · ${minutesLabel(changeover.lightingMin)} with ${hands === 1 ? 'one pair of hands' : `${hands} pairs of hands`}`}
        rows={lighting.map(({ what, detail, minutes }) => ({ what, detail, minutes }))}
      >
        {changeover.changesLight && 'Test frames are counted.'}
      </Part>
      <Part title="Wardrobe" rows={wardrobeRows} />
      {changeover.holdWaitMin > 0 && (
        <p className="text-sm">
          Everything is ready {minutesLabel(changeover.holdWaitMin)} early and waits until{' '}
          {clockLabel(scheduled.startMin)}: a window or a fixed time of this shot.
        </p>
      )}
      <p className="text-xs text-ink-soft">
        Minutes of each action are the studio’s own, assumptions until it has changed them.
      </p>
    </div>
  )
}

function Part({ title, rows, children }: { title: string; rows: readonly Row[]; children?: ReactNode }) {
  if (rows.length === 0) return null
  return (
    <section>
      <h3 className="label-small font-sans">{title}</h3>
      <ul className="mt-1">
        {rows.map(({ what, detail, minutes }, index) => (
          <li key={index} className="flex gap-3 border-t border-hair-soft py-1 text-sm">
            <span className="min-w-0 flex-1">
              {what}
              {detail !== undefined && detail !== '' && <span className="block text-xs text-ink-soft">{detail}</span>}
            </span>
            {minutes !== undefined && minutes > 0 && (
              <span className="whitespace-nowrap">{Number(minutes.toFixed(2))} min</span>
            )}
          </li>
        ))}
      </ul>
      {children !== undefined && children !== false && <p className="text-xs text-ink-soft">{children}</p>}
    </section>
  )
}
