import { type Plan, moveId } from '#shared/domain/plan/read-plan.ts'
import { NumberInput } from '#src/ui/number-input.tsx'
import type { OrderWriter } from '../use-order-writer.ts'

/** Minutes for the whole party between each two rooms in which there is a set. */
export function RoomMoves({ plan, writer }: { plan: Plan; writer: OrderWriter }) {
  const used = new Set([...plan.sets.values()].map(({ roomId }) => roomId))
  const rooms = plan.brief.rooms.filter((room) => used.has(room.id))
  const pairs = rooms.flatMap((from, index) =>
    rooms.slice(index + 1).map((to) => ({ from, to, id: moveId(from.id, to.id) })),
  )
  if (pairs.length === 0) return null
  return (
    <section aria-label="Between rooms" className="mt-5 border-t border-hair pt-3">
      <h3 className="label-small mb-2 font-sans">Between rooms</h3>
      <ul className="flex flex-col gap-2">
        {pairs.map(({ from, to, id }) => {
          const given = plan.moves.get(id)
          const name = `Minutes between ${from.name} and ${to.name}`
          return (
            <li key={id} className="flex items-center gap-3">
              <span className="min-w-0 flex-1">
                {from.name} and {to.name}
                {!given && (
                  <span className="block text-xs text-ink-soft">The studio’s own minutes, an assumption.</span>
                )}
              </span>
              <NumberInput
                aria-label={name}
                className="w-28"
                value={given?.minutes ?? plan.minutes.roomMove}
                unit="min"
                min={0}
                max={480}
                readOnly={!writer.mayPlan}
                onChange={(minutes) => writer.setMove(id, minutes)}
              />
            </li>
          )
        })}
      </ul>
    </section>
  )
}
