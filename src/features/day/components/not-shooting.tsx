import { Link } from 'react-router-dom'
import type { DayProgress } from '#shared/domain/day/progress.ts'
import { useShoot } from '#src/realtime/shoot-realtime.tsx'
import { count } from '#src/lib/format.ts'
import { buttonClass } from '#src/ui/button.tsx'
import { Lamp } from '#src/ui/lamp.tsx'

/** Nothing stands in the running order yet. */
export function NothingToFollow() {
  const { id } = useShoot()
  return (
    <section className="m-auto flex max-w-sm flex-col items-center gap-3 p-6 text-center">
      <Lamp state="unlit" />
      <h1 className="text-2xl text-white">Nothing to follow yet</h1>
      <p className="text-bone-soft">
        As soon as shots stand in the running order, everyone follows them from here: what is made now, what changes for
        it, and what is next.
      </p>
      <Link to={`/shoots/${id}/order`} className={buttonClass('night', 'large')}>
        Go to the running order
      </Link>
    </section>
  )
}

/** Every shot is got or skipped. */
export function Wrapped({ progress }: { progress: DayProgress }) {
  return (
    <section className="flex flex-col gap-2 py-8">
      <Lamp state="lit" />
      <h1 className="text-2xl text-white">That is a wrap</h1>
      <p className="text-bone-soft">
        {count(progress.got, 'shot')} got{progress.skipped > 0 ? `, ${progress.skipped} skipped` : ''}. Thank everybody;
        hired things go back as agreed.
      </p>
    </section>
  )
}
