import { Link } from 'react-router-dom'
import type { ShootCard } from '#shared/api/shoots.ts'
import { nextStep } from '#shared/domain/shoots/readiness.ts'
import { civilShort } from '#src/lib/format.ts'
import type { UnsentOfShoot } from '#src/realtime/use-unsent-by-shoot.ts'
import { UnsentLine } from './unsent-line.tsx'

export type PastShootsProps = {
  shoots: readonly ShootCard[]
  /** By shoot id. */
  unsent: Readonly<Record<string, UnsentOfShoot>>
}

/** Shoots whose first day is over, latest first. */
export function PastShoots({ shoots, unsent }: PastShootsProps) {
  return (
    <div className="mt-5 overflow-x-auto rounded-r border border-hair bg-paper">
      <table className="w-full border-collapse text-sm">
        <thead>
          <tr className="label-small text-left">
            <th className="px-4 py-2.5 font-semibold">Date</th>
            <th className="px-4 py-2.5 font-semibold">Done</th>
            <th className="px-4 py-2.5 font-semibold max-md:hidden">Place</th>
            <th className="px-4 py-2.5 font-semibold max-md:hidden">Shots</th>
            <th className="px-4 py-2.5 font-semibold">How it ended</th>
          </tr>
        </thead>
        <tbody>
          {shoots.map((shoot) => {
            const left = unsent[shoot.id]
            return (
              <tr key={shoot.id} className="border-t border-hair-soft hover:bg-white">
                <td className="px-4 py-2.5 whitespace-nowrap">{shoot.date === null ? '' : civilShort(shoot.date)}</td>
                <td className="px-4 py-2.5 font-semibold">
                  <Link
                    to={`/shoots/${shoot.id}`}
                    className="underline-offset-2 hover:underline max-md:inline-flex max-md:min-h-11 max-md:items-center"
                  >
                    {shoot.title}
                  </Link>
                  {left && (
                    <div className="font-normal">
                      <UnsentLine unsent={left} />
                    </div>
                  )}
                </td>
                <td className="px-4 py-2.5 max-md:hidden">{shoot.place}</td>
                <td className="px-4 py-2.5 max-md:hidden">{shoot.shots}</td>
                <td className="px-4 py-2.5">
                  {shoot.readiness.find(({ section }) => section === 'day')?.why ?? nextStep(shoot.readiness)?.why}
                </td>
              </tr>
            )
          })}
        </tbody>
      </table>
    </div>
  )
}
