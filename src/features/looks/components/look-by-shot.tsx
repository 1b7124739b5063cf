import type { Plan } from '#shared/domain/plan/read-plan.ts'
import { Dialog } from '#src/ui/dialog.tsx'
import { sitterTitle } from '../words.ts'

export type LookByShotProps = { open: boolean; onOpenChange: (open: boolean) => void; plan: Plan }

/** Who wears what in which shot. */
export function LookByShot({ open, onOpenChange, plan }: LookByShotProps) {
  const shots = [...plan.days.flatMap((day) => day.shots), ...plan.loose]
  return (
    <Dialog
      wide
      open={open}
      onOpenChange={onOpenChange}
      title="Look by shot"
      description="Who wears what in which shot. Looks are given to shots on the board."
    >
      {shots.length === 0 ? (
        <p className="py-8 text-center text-ink-soft">
          No shots yet. Write them down on the board, and give each its looks.
        </p>
      ) : (
        <table className="w-full text-sm [&_td]:border-t [&_td]:border-hair-soft [&_td]:py-2 [&_td]:pr-3 [&_td]:align-top [&_th]:py-1.5 [&_th]:pr-3 [&_th]:text-left [&_th]:text-xs [&_th]:font-semibold [&_th]:text-ink-soft">
          <thead>
            <tr>
              <th scope="col">Shot</th>
              <th scope="col">Who wears what</th>
            </tr>
          </thead>
          <tbody>
            {shots.map(({ number, shot, looks }) => (
              <tr key={shot.id}>
                <td className="w-2/5">
                  <b className="font-semibold">{number === null ? shot.title : `${number} · ${shot.title}`}</b>
                </td>
                <td>
                  {looks.map(({ look, sitter }) => (
                    <div key={look.id}>
                      {sitterTitle(sitter)}: {look.name}
                    </div>
                  ))}
                  {looks.length === 0 && <span className="text-glow-ink">no look yet</span>}
                </td>
              </tr>
            ))}
          </tbody>
        </table>
      )}
    </Dialog>
  )
}
