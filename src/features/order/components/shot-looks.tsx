import { X } from 'lucide-react'
import { Link } from 'react-router-dom'
import type { Plan, PlannedShot } from '#shared/domain/plan/read-plan.ts'
import { useShoot } from '#src/realtime/shoot-realtime.tsx'
import { IconButton } from '#src/ui/button.tsx'
import { Field } from '#src/ui/field.tsx'
import { Select } from '#src/ui/select.tsx'
import type { OrderWriter } from '../use-order-writer.ts'

export type ShotLooksProps = { planned: PlannedShot; plan: Plan; writer: OrderWriter }

/** Who wears what in a shot. */
export function ShotLooks({ planned, plan, writer }: ShotLooksProps) {
  const shoot = useShoot()
  const worn = new Set(planned.looks.map(({ look }) => String(look.id)))
  const others = [...plan.looks.values()].filter(({ look }) => !worn.has(look.id))
  const wearer = (look: (typeof others)[number]) => look.sitter?.character || look.sitter?.name || 'nobody yet'
  return (
    <div className="flex flex-col gap-2">
      {planned.looks.length > 0 && (
        <ul aria-label="Looks in this shot">
          {planned.looks.map((look) => (
            <li
              key={look.look.id}
              className="flex items-center gap-2 border-t border-hair-soft py-0.5 first:border-t-0"
            >
              <span className="min-w-0 flex-1 truncate">
                {look.look.name} <span className="text-ink-soft">· {wearer(look)}</span>
              </span>
              {writer.mayBoard && (
                <IconButton
                  label={`Take out ${look.look.name}`}
                  className="size-8 max-md:size-11"
                  onClick={() => writer.takeOff(planned.shot.id, look.look.id)}
                >
                  <X size={15} aria-hidden />
                </IconButton>
              )}
            </li>
          ))}
        </ul>
      )}
      {plan.looks.size === 0 ? (
        <p className="text-sm text-ink-soft">
          No look hangs on a rail yet.{' '}
          <Link to={`/shoots/${shoot.id}/looks`} className="underline underline-offset-2">
            Go to the looks
          </Link>
        </p>
      ) : (
        writer.mayBoard &&
        others.length > 0 && (
          <Field label="Looks">
            <Select
              value=""
              options={[
                { value: '', label: planned.looks.length === 0 ? 'Choose a look' : 'Add another look' },
                ...others.map((look) => ({
                  value: String(look.look.id),
                  label: `${look.look.name} · ${wearer(look)}`,
                })),
              ]}
              onChange={(id) => id !== '' && writer.wear(planned.shot.id, id)}
            />
          </Field>
        )
      )}
    </div>
  )
}
